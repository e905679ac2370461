import { Problem } from '@/lib/errors'
import { DIMENSIONLESS, dimensionWords, divide, isDimensionless, multiply, sameDimension, unitOf } from '@/lib/units'
import type { Dimension } from '@/lib/units'
import type { BinaryOperator } from './ast'
import type { Scale, Type, Vocabulary } from './types'

/*
 * Which quantities may be joined, and what comes of it. Temperatures and gauge pressures are points on a scale: they
 * have differences, but no sum. The difference of two pressures is no pressure either: a gauge unit would take the
 * ambient pressure off it. `15 K` and `2 bar` may stand for a point or a difference: they are open.
 */

export type QuantityType = Extract<Type, { kind: 'quantity' }>

export const NUMBER: QuantityType = { kind: 'quantity', dimension: DIMENSIONLESS, scale: 'ratio' }
export const TEXT: Type = { kind: 'text' }
export const LOGICAL: Type = { kind: 'logical' }

const TEMPERATURE = unitOf('K').dimension
const PRESSURE = unitOf('Pa').dimension
const isTemperature = (dimension: Dimension) => sameDimension(dimension, TEMPERATURE)
const hasDifferences = (dimension: Dimension) => isTemperature(dimension) || sameDimension(dimension, PRESSURE)

export const quantityType = (dimension: Dimension, scale: Scale): QuantityType => ({
  kind: 'quantity',
  dimension,
  scale,
})

/** What a calculation gives: a temperature or a pressure may be meant as itself or as a difference. */
export const derived = (dimension: Dimension): QuantityType =>
  quantityType(dimension, hasDifferences(dimension) ? 'open' : 'ratio')

/** The type of a literal: a unit with an offset gives a point; kelvin and absolute pressure are open. */
export function literalType(unit: {
  readonly dimension: Dimension
  readonly offset: number
  readonly gauge: boolean
}): QuantityType {
  return unit.offset !== 0 || unit.gauge ? quantityType(unit.dimension, 'point') : derived(unit.dimension)
}

export function typeWords(type: Type, vocabulary: Vocabulary): string {
  switch (type.kind) {
    case 'quantity':
      return dimensionWords(type.dimension, type.scale)
    case 'text':
      return 'a text'
    case 'logical':
      return 'yes or no'
    case 'thing':
      return vocabulary.things.get(type.thing)?.words ?? `a ${type.thing}`
    case 'list':
      return 'a whole column'
    case 'any':
      return 'anything'
  }
}

/** Whether a value of one type may stand where another is wanted. */
export function fits(type: Type, wanted: Type): boolean {
  if (wanted.kind === 'any' || type.kind === 'any') return true
  if (type.kind !== wanted.kind) return false
  switch (wanted.kind) {
    case 'quantity':
      return fitsQuantity(type as QuantityType, wanted)
    case 'thing':
      return (type as typeof wanted).thing === wanted.thing
    case 'list':
      return fits((type as typeof wanted).of, wanted.of)
    default:
      return true
  }
}

const fitsQuantity = (type: QuantityType, wanted: QuantityType): boolean =>
  sameDimension(type.dimension, wanted.dimension) && !scalesClash(type.scale, wanted.scale)

/** A difference stands on one side, a reading or an absolute value on the other. */
const scalesClash = (a: Scale, b: Scale) =>
  (a === 'difference') !== (b === 'difference') && a !== 'open' && b !== 'open'

/** Two quantities as their error names them. */
export interface Operands {
  readonly left: { readonly words: string }
  readonly right: { readonly words: string }
}

export function binaryType(operator: BinaryOperator, left: QuantityType, right: QuantityType, words: Operands): Type {
  switch (operator) {
    case '+':
    case '-':
      return sumType(operator, left, right, words)
    case '*':
    case '/':
      return productType(operator, left, right, words)
    case '^':
    case '&':
      throw new Error(`${operator} has a rule of its own`)
    default:
      alike(left, right, words, 'compared')
      return LOGICAL
  }
}

function alike(left: QuantityType, right: QuantityType, words: Operands, done: string): void {
  const clash = done === 'compared' && scalesClash(left.scale, right.scale)
  if (sameDimension(left.dimension, right.dimension) && !clash) return
  const [a, b] = [dimensionWords(left.dimension, left.scale), dimensionWords(right.dimension, right.scale)]
  throw new Problem('dimension', `${words.left.words} is ${a} and ${words.right.words} is ${b}: they cannot be ${done}`)
}

function sumType(operator: '+' | '-', left: QuantityType, right: QuantityType, words: Operands): Type {
  alike(left, right, words, operator === '+' ? 'added' : 'subtracted')
  const scale = operator === '+' ? sumScale(left, right, words) : differenceScale(left, right, words)
  return quantityType(left.dimension, scale)
}

function sumScale(left: QuantityType, right: QuantityType, words: Operands): Scale {
  const scales = [left.scale, right.scale]
  if (scales.every((scale) => scale === 'point')) {
    const what = isTemperature(left.dimension)
      ? 'two temperatures cannot be added: a difference is written in K, a mean is average(…)'
      : 'two gauge readings cannot be added'
    throw new Problem('dimension', `${words.left.words} + ${words.right.words}: ${what}`)
  }
  if (scales.includes('point')) {
    if (scales.includes('ratio')) throw gaugeAndAbsolute(words)
    return 'point'
  }
  if (scales.includes('ratio')) return 'ratio'
  return scales.includes('open') ? 'open' : 'difference'
}

function differenceScale(left: QuantityType, right: QuantityType, words: Operands): Scale {
  const [a, b] = [left.scale, right.scale]
  if (!hasDifferences(left.dimension)) return 'ratio'
  if (b === 'point' || b === 'ratio') {
    if (a !== 'difference') return 'difference'
    const whole = dimensionWords(right.dimension, b)
    throw new Problem(
      'dimension',
      `${words.left.words} − ${words.right.words}: ${whole} cannot be taken from a difference`,
    )
  }
  // 15 °C − 10 K is 5 °C, T − 300 K is −11.85 K: the same number either way, so what it is stays open
  return b === 'open' && a !== 'difference' ? 'open' : a
}

const gaugeAndAbsolute = (words: Operands) =>
  new Problem(
    'dimension',
    `${words.left.words} + ${words.right.words}: a gauge reading and an absolute pressure cannot be added`,
  )

function productType(operator: '*' | '/', left: QuantityType, right: QuantityType, words: Operands): Type {
  for (const [type, operand] of [
    [left, words.left],
    [right, words.right],
  ] as const) {
    if (type.scale === 'point' && !isTemperature(type.dimension)) {
      throw new Problem(
        'dimension',
        `${operand.words} is a gauge reading: it cannot be multiplied or divided; write it as an absolute pressure`,
      )
    }
  }
  const dimension =
    operator === '*' ? multiply(left.dimension, right.dimension) : divide(left.dimension, right.dimension)
  // a factor leaves a difference a difference; an absolute temperature times a number may be used as either
  const scaled = isDimensionless(right.dimension) ? left : operator === '*' && isDimensionless(left.dimension) && right
  return scaled && scaled.scale !== 'point' ? scaled : derived(dimension)
}

/** The one type that several results have together (the branches of an if); undefined where they have none. */
export function commonType(types: readonly Type[]): Type | undefined {
  return types.reduce<Type | undefined>((so, type) => so && joined(so, type), types[0])
}

function joined(a: Type, b: Type): Type | undefined {
  if (a.kind === 'any') return b
  if (b.kind === 'any') return a
  if (a.kind === 'list' && b.kind === 'list') {
    const of = joined(a.of, b.of)
    return of && { kind: 'list', of }
  }
  if (a.kind !== 'quantity' || b.kind !== 'quantity') return fits(a, b) && fits(b, a) ? a : undefined
  if (!fitsQuantity(a, b)) return undefined
  if (a.scale === 'open') return b
  return b.scale === 'open' || a.scale === b.scale ? a : quantityType(a.dimension, 'ratio')
}
