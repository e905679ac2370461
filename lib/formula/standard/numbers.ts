import { Problem } from '@/lib/errors'
import { NUMBER, quantityType } from '../typing'
import type { FunctionSpec, Parameter, Type, Value } from '../types'
import { many, one, quantityOnly, sameQuantity } from './types'
import { power } from '@/lib/units'

const ANY: Type = { kind: 'any' }
const VALUES: Parameter = { name: 'values', type: ANY, repeats: true, help: 'numbers, or whole columns' }
const X: Parameter = { name: 'x', type: ANY, help: 'a number' }
const SOURCE = 'named as in OASIS OpenFormula 1.2'
const GROUP = 'Standard'

const list = (value: Value | undefined): readonly number[] =>
  ((value as readonly Value[] | undefined) ?? []).filter((item): item is number => typeof item === 'number')

function notEmpty(values: readonly number[], name: string): readonly number[] {
  if (values.length === 0) throw new Problem('argument', `${name} has nothing to work on: every cell is empty`)
  return values
}

const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0)

interface OverValues {
  readonly name: string
  readonly help: string
  readonly of: (values: readonly number[]) => number
  readonly example: { readonly formula: string; readonly shown: string }
}

const overValues = ({ name, help, of, example }: OverValues): FunctionSpec => ({
  name,
  group: GROUP,
  parameters: [VALUES],
  result: (types) => sameQuantity(many(types, 'values'), name),
  help,
  example,
  source: SOURCE,
  evaluate: (args) => of(notEmpty(list(args.values), name)),
})

/** Functions of one plain number. */
const plain = (
  name: string,
  help: string,
  of: (x: number) => number,
  example: { formula: string; shown: string },
  refuses?: (x: number) => string | null,
): FunctionSpec => ({
  name,
  group: GROUP,
  parameters: [{ name: 'x', type: NUMBER, help: 'a plain number' }],
  result: NUMBER,
  help,
  example,
  source: SOURCE,
  evaluate: (args) => {
    const x = args.x as number
    const reason = refuses?.(x) ?? null
    if (reason) throw new Problem('range', reason)
    return of(x)
  },
})

const above0 = (name: string) => (x: number) => (x > 0 ? null : `${name} takes a number above zero`)

const DIGITS: Parameter = {
  name: 'digits',
  type: NUMBER,
  optional: true,
  default: '0',
  help: 'digits behind the point',
}

const rounding = (
  name: string,
  help: string,
  of: (x: number) => number,
  example: { formula: string; shown: string },
): FunctionSpec => ({
  name,
  group: GROUP,
  parameters: [{ name: 'x', type: NUMBER, help: 'a plain number: divide by a unit first, T / 1 K' }, DIGITS],
  result: NUMBER,
  help,
  example,
  source: SOURCE,
  evaluate: (args) => {
    const digits = args.digits as number
    if (!Number.isInteger(digits) || Math.abs(digits) > 15)
      throw new Problem('range', `${name} takes a whole number of digits, −15 to 15`)
    const [x, scale] = [args.x as number, 10 ** digits]
    // through decimal text, so that 1.005 rounds as it is written and not as it is stored
    return Number(`${of(Number(`${x}e${digits}`))}e${-digits}`) || of(x * scale) / scale
  },
})

const awayFromZero = (x: number) => Math.sign(x) * Math.round(Math.abs(x))

export const numberFunctions: readonly FunctionSpec[] = [
  {
    ...overValues({
      name: 'sum',
      help: 'the sum',
      of: total,
      example: { formula: 'sum(1 kg, 500 g)', shown: '1.5 kg' },
    }),
    result: (types) => {
      const type = sameQuantity(many(types, 'values'), 'sum')
      if (type.scale === 'point')
        throw new Problem('dimension', 'readings on a scale have no sum: two temperatures cannot be added')
      return type
    },
    evaluate: (args) => total(list(args.values)),
  },
  overValues({
    name: 'average',
    help: 'the mean',
    of: (v) => total(v) / v.length,
    example: { formula: 'average(10 °C, 20 °C)', shown: '15 °C' },
  }),
  overValues({
    name: 'min',
    help: 'the least',
    of: (v) => v.reduce((a, b) => Math.min(a, b)),
    example: { formula: 'min(3 bar, 250 kPa)', shown: '2.5 bar' },
  }),
  overValues({
    name: 'max',
    help: 'the greatest',
    of: (v) => v.reduce((a, b) => Math.max(a, b)),
    example: { formula: 'max(3 bar, 250 kPa)', shown: '3 bar' },
  }),
  {
    name: 'count',
    group: GROUP,
    parameters: [VALUES],
    result: NUMBER,
    help: 'how many numbers there are; errors and empty cells are not counted',
    example: { formula: 'count(1, 2 bar)', shown: '2' },
    source: SOURCE,
    takesFaults: true,
    evaluate: (args) => list(args.values).length,
  },
  {
    name: 'abs',
    group: GROUP,
    parameters: [X],
    result: (types) => {
      const type = quantityOnly(one(types, 'x'), 'abs')
      if (type.scale === 'point')
        throw new Problem('dimension', 'a reading on a scale has no size of its own: take abs of a difference')
      return type
    },
    help: 'the size without its sign',
    example: { formula: 'abs(15 °C - 20 °C)', shown: '5 K' },
    source: SOURCE,
    evaluate: (args) => Math.abs(args.x as number),
  },
  {
    name: 'sqrt',
    group: GROUP,
    parameters: [X],
    result: (types) => quantityType(power(quantityOnly(one(types, 'x'), 'sqrt').dimension, 0.5), 'ratio'),
    help: 'the square root',
    example: { formula: 'sqrt(9 [m^2])', shown: '3000 mm' },
    source: SOURCE,
    evaluate: (args) => {
      const x = args.x as number
      if (x < 0) throw new Problem('range', 'a negative number has no square root')
      return Math.sqrt(x)
    },
  },
  plain('exp', 'e to the power of x', Math.exp, { formula: 'exp(1)', shown: '2.7183' }),
  plain('ln', 'the natural logarithm', Math.log, { formula: 'ln(10)', shown: '2.3026' }, above0('ln')),
  plain('log10', 'the logarithm to base 10', Math.log10, { formula: 'log10(1000)', shown: '3' }, above0('log10')),
  {
    name: 'power',
    group: GROUP,
    parameters: [
      { ...X, type: NUMBER },
      { name: 'exponent', type: NUMBER, help: 'a plain number' },
    ],
    result: NUMBER,
    help: 'x to a power; with a unit write x^2',
    example: { formula: 'power(2, 10)', shown: '1024' },
    source: SOURCE,
    evaluate: (args) => (args.x as number) ** (args.exponent as number),
  },
  rounding('round', 'to the nearest, halves away from zero', awayFromZero, {
    formula: 'round(2.345, 2)',
    shown: '2.35',
  }),
  rounding('roundup', 'away from zero', (x) => Math.sign(x) * Math.ceil(Math.abs(x)), {
    formula: 'roundup(3.2)',
    shown: '4',
  }),
  rounding('rounddown', 'towards zero', Math.trunc, { formula: 'rounddown(3.8)', shown: '3' }),
  {
    name: 'mod',
    group: GROUP,
    parameters: [X, { ...X, name: 'divisor', help: 'of the same quantity' }],
    result: (types) => sameQuantity([one(types, 'x'), one(types, 'divisor')], 'mod'),
    help: 'what is left after division; it has the sign of the divisor',
    example: { formula: 'mod(7, 3)', shown: '1' },
    source: SOURCE,
    evaluate: (args) => {
      const [x, divisor] = [args.x as number, args.divisor as number]
      if (divisor === 0) throw new Problem('range', 'division by zero')
      return x - divisor * Math.floor(x / divisor)
    },
  },
  {
    name: 'pi',
    group: GROUP,
    parameters: [],
    result: NUMBER,
    help: 'the ratio of a circle’s circumference to its diameter',
    example: { formula: 'pi()', shown: '3.1416' },
    source: SOURCE,
    evaluate: () => Math.PI,
  },
]
