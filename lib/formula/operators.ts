import type { Span } from '@/lib/errors'
import type { BinaryOperator } from './ast'
import type { Value } from './types'
import { fault, isThing } from './values'

/** Arithmetic on SI numbers. Division by zero and results that are no number are faults. */
export function numericOperation(operator: BinaryOperator, a: number, b: number, span: Span): Value {
  const result = arithmetic(operator, a, b)
  if (Number.isFinite(result)) return result
  if (operator === '/' && b === 0) return fault('range', 'division by zero', span)
  return fault(
    'range',
    operator === '^' && Number.isNaN(result) ? 'a broken power of a negative number' : 'the result is no finite number',
    span,
  )
}

function arithmetic(operator: BinaryOperator, a: number, b: number): number {
  switch (operator) {
    case '+':
      return a + b
    case '-':
      return a - b
    case '*':
      return a * b
    case '/':
      return a / b
    case '^':
      return a ** b
    default:
      throw new Error(`${operator} is no arithmetic`)
  }
}

/** Numbers by size, texts by letters whatever their case, as spreadsheets do; things by content. */
export function compareValues(operator: BinaryOperator, a: Value, b: Value): boolean {
  const [x, y] = [comparable(a), comparable(b)]
  switch (operator) {
    case '=':
      return x === y
    case '<>':
      return x !== y
    case '<':
      return x < y
    case '>':
      return x > y
    case '<=':
      return x <= y
    case '>=':
      return x >= y
    default:
      throw new Error(`${operator} compares nothing`)
  }
}

function comparable(value: Value): string | number | boolean {
  if (typeof value === 'string') return value.toLowerCase()
  if (typeof value === 'number' || typeof value === 'boolean') return value
  if (value !== null && isThing(value)) return value.key
  throw new Error('only numbers, texts, yes or no and things are compared')
}
