import { Problem } from '@/lib/errors'
import { DIMENSIONLESS, dimensionWords, divide, isDimensionless, multiply, sameDimension, unitOf } from '@/lib/units'
import type { Dimension } from '@/lib/units'
import type { BinaryOperator } from './ast'
import type { Scale, Type, Vocabulary } from './types'

/*
 * Which quantities may be joined, and what comes of it. Temperatures and gauge pressures are points on a scale: they
 * have differences, but no sum. `15 K` and `2 bar` may stand for a point or a difference: they are open.
 */

export type QuantityType = Extract<Type, { kind: 'quantity' }>

export const NUMBER: QuantityType = { kind: 'quantity', dimension: DIMENSIONLESS, scale: 'ratio' }
export const TEXT: Type = { kind: 'text' }
export const LOGICAL: Type = { kind: 'logical' }

const TEMPERATURE = unitOf('K').dimension
const PRESSURE = unitOf('Pa').dimension
const isTemperature = (dimension: Dimension) => sameDimension(dimension, TEMPERATURE)

export const quantityType = (dimension: Dimension, scale: Scale): QuantityType => ({
  kind: 'quantity',
  dimension,
  scale,
})

/** The type of a literal: a unit with an offset gives a point; kelvin and absolute pressure are open. */
export function literalType(unit: {
  readonly dimension: Dimension
  readonly offset: number
  readonly gauge: boolean
}): QuantityType {
  if (unit.offset !== 0 || unit.gauge) return quantityType(unit.dimension, 'point')
  const open = isTemperature(unit.dimension) || sameDimension(unit.dimension, PRESSURE)
  return quantityType(unit.dimension, open ? 'open' : 'ratio')
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

function fitsQuantity(type: QuantityType, wanted: QuantityType): boolean {
  if (!sameDimension(type.dimension, wanted.dimension)) return false
  if (wanted.scale === 'point') return type.scale !== 'difference'
  if (wanted.scale === 'difference') return type.scale !== 'point'
  return true
}

/** Two quantities as their error names them. */
export interface Operands {
  readonly left: string
  readonly right: string
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
      if (scalesClash(left.scale, right.scale)) {
        throw new Problem(
          'dimension',
          `${words.left} and ${words.right} cannot be compared: one is a reading, the other a difference`,
        )
      }
      return LOGICAL
  }
}

const scalesClash = (a: Scale, b: Scale) =>
  (a === 'point' && b === 'difference') || (a === 'difference' && b === 'point')

function alike(left: QuantityType, right: QuantityType, words: Operands, done: string): void {
  if (sameDimension(left.dimension, right.dimension)) return
  const [a, b] = [dimensionWords(left.dimension, left.scale), dimensionWords(right.dimension, right.scale)]
  throw new Problem('dimension', `${words.left} is ${a} and ${words.right} is ${b}: they cannot be ${done}`)
}

function sumType(operator: '+' | '-', left: QuantityType, right: QuantityType, words: Operands): Type {
  alike(left, right, words, operator === '+' ? 'added' : 'subtracted')
  const scale = operator === '+' ? sumScale(left, right, words) : differenceScale(left, right, words)
  return quantityType(left.dimension, scale)
}

function sumScale(left: QuantityType, right: QuantityType, words: Operands): Scale {
  const [a, b] = [left.scale, right.scale]
  if (a === 'point' && b === 'point') {
    const what = isTemperature(left.dimension)
      ? 'two temperatures cannot be added: a difference is written in K'
      : 'two gauge readings cannot be added'
    throw new Problem('dimension', `${words.left} + ${words.right}: ${what}`)
  }
  if (a === 'point' || b === 'point') {
    if (a === 'ratio' || b === 'ratio') throw gaugeAndAbsolute(words)
    return 'point'
  }
  if (a === 'ratio' || b === 'ratio') return 'ratio'
  return a === 'open' || b === 'open' ? 'open' : 'difference'
}

function differenceScale(left: QuantityType, right: QuantityType, words: Operands): Scale {
  const [a, b] = [left.scale, right.scale]
  if (b === 'point') {
    if (a === 'difference')
      throw new Problem('dimension', `${words.left} − ${words.right}: a reading cannot be taken from a difference`)
    return 'difference'
  }
  // 15 °C − 10 K is 5 °C, T − 300 K is −11.85 K: the same number either way, so what it is stays open
  if (a === 'point') return b === 'difference' ? 'point' : b === 'open' ? 'open' : 'difference'
  if (a === 'ratio' || b === 'ratio') return 'ratio'
  return a === 'difference' && b === 'difference' ? 'difference' : 'open'
}

const gaugeAndAbsolute = (words: Operands) =>
  new Problem('dimension', `${words.left} + ${words.right}: a gauge reading and an absolute pressure cannot be added`)

function productType(operator: '*' | '/', left: QuantityType, right: QuantityType, words: Operands): Type {
  for (const [type, name] of [
    [left, words.left],
    [right, words.right],
  ] as const) {
    if (type.scale === 'point' && !isTemperature(type.dimension)) {
      throw new Problem(
        'dimension',
        `${name} is a gauge reading: it cannot be multiplied or divided; write it as an absolute pressure`,
      )
    }
  }
  const dimension =
    operator === '*' ? multiply(left.dimension, right.dimension) : divide(left.dimension, right.dimension)
  return quantityType(dimension, productScale(operator, left, right, dimension))
}

/** A factor leaves a difference a difference; an absolute temperature times a number may be used as either. */
function productScale(operator: '*' | '/', left: QuantityType, right: QuantityType, dimension: Dimension): Scale {
  if (isDimensionless(right.dimension)) return left.scale === 'point' ? 'open' : left.scale
  if (operator === '*' && isDimensionless(left.dimension)) return right.scale === 'point' ? 'open' : right.scale
  return isTemperature(dimension) || sameDimension(dimension, PRESSURE) ? 'open' : 'ratio'
}

/** The one type that several results have together (the branches of an if); undefined where they have none. */
export function commonType(types: readonly Type[]): Type | undefined {
  return types.reduce<Type | undefined>((so, type) => so && joined(so, type), types[0])
}

function joined(a: Type, b: Type): Type | undefined {
  if (a.kind === 'any') return b
  if (b.kind === 'any') return a
  if (a.kind === 'quantity' && b.kind === 'quantity') {
    if (!sameDimension(a.dimension, b.dimension) || scalesClash(a.scale, b.scale)) return undefined
    return a.scale === 'open'
      ? b
      : b.scale === 'open'
        ? a
        : a.scale === b.scale
          ? a
          : quantityType(a.dimension, 'ratio')
  }
  return fits(a, b) && fits(b, a) ? a : undefined
}
