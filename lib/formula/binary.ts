import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import { power } from '@/lib/units'
import type { Ast, BinaryOperator } from './ast'
import { compiled, needed, quantityNode } from './node'
import type { Compiled, Context, Frame } from './node'
import { compareValues, numericOperation } from './operators'
import { LOGICAL, NUMBER, TEXT, binaryType, derived, fits, typeWords } from './typing'
import type { QuantityType } from './typing'
import type { Fault, Type, Value } from './types'
import { isFault } from './values'

type BinaryAst = Extract<Ast, { type: 'binary' }>

/** Two operands and a sign between them: of what quantity the result is, and how it is worked out. */
export function compileBinary(ast: BinaryAst, context: Context): Compiled {
  const left = context.node(ast.left, context)
  const right = context.node(ast.right, context)
  const type = typeOfBinary(ast, left, right, context)
  const operate = operationFor(ast.operator, ast.span)
  const run = (frame: Frame): Value => {
    const a = needed(left.run(frame), left)
    if (isFault(a)) return a
    const b = needed(right.run(frame), right)
    return isFault(b) ? b : operate(a, b)
  }
  return compiled(context, ast.span, type, run)
}

function operationFor(operator: BinaryOperator, span: Span): (a: Value, b: Value) => Value | Fault {
  switch (operator) {
    case '&':
      return (a, b) => `${String(a)}${String(b)}`
    case '=':
    case '<>':
    case '<':
    case '>':
    case '<=':
    case '>=':
      return (a, b) => compareValues(operator, a, b)
    default:
      return (a, b) => numericOperation(operator, a as number, b as number, span)
  }
}

function typeOfBinary(
  { operator, span, right: rightAst }: BinaryAst,
  left: Compiled,
  right: Compiled,
  context: Context,
): Type {
  const equality = operator === '=' || operator === '<>'
  if (operator === '&') {
    for (const side of [left, right]) {
      if (side.type.kind !== 'text') {
        throw new Problem(
          'dimension',
          `${side.words} is ${typeWords(side.type, context.vocabulary)}: & joins texts`,
          side.span,
        )
      }
    }
    return TEXT
  }
  const plain = left.type.kind === 'text' || left.type.kind === 'logical'
  if (plain && right.type.kind === left.type.kind && (equality || left.type.kind === 'text')) {
    if (['=', '<>', '<', '>', '<=', '>='].includes(operator)) return LOGICAL
  }
  if (left.type.kind === 'thing' && right.type.kind === 'thing' && left.type.thing === right.type.thing && equality)
    return LOGICAL
  const [a, b] = [quantityNode(left, context), quantityNode(right, context)]
  if (operator === '^') return powerType(a, rightAst, b)
  try {
    return binaryType(operator, a.type, b.type, { left: a, right: b })
  } catch (mistake) {
    throw mistake instanceof Problem ? new Problem(mistake.code, mistake.reason, span) : mistake
  }
}

const HIGHEST_POWER = 99

function powerType(base: Compiled & { readonly type: QuantityType }, exponentAst: Ast, exponent: Compiled): Type {
  if (!fits(exponent.type, NUMBER))
    throw new Problem('dimension', `${exponent.words} is no plain number: it cannot be an exponent`, exponent.span)
  if (fits(base.type, NUMBER)) return NUMBER
  const value = constantOf(exponentAst)
  if (value === null) {
    throw new Problem(
      'dimension',
      `${base.words} has a unit, so its exponent has to be a number that stands in the formula`,
      exponent.span,
    )
  }
  const dimension = power(base.type.dimension, value)
  if (dimension.some((exponent) => Math.abs(exponent) > HIGHEST_POWER))
    throw new Problem('dimension', `nothing is measured in such a power of ${base.words}`, exponent.span)
  return derived(dimension)
}

function constantOf(ast: Ast): number | null {
  if (ast.type === 'number') return ast.value
  if (ast.type === 'negative') {
    const of = constantOf(ast.of)
    return of === null ? null : -of
  }
  if (ast.type !== 'binary' || ast.operator !== '/') return null
  const [over, under] = [constantOf(ast.left), constantOf(ast.right)]
  return over === null || under === null || under === 0 ? null : over / under
}
