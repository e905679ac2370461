import { Problem } from '@/lib/errors'
import { power } from '@/lib/units'
import { NUMBER, derived } from '../typing'
import type { FunctionSpec } from '../types'
import { GROUP, SOURCE, X } from './common'
import type { Example } from './common'
import { noReading, one, quantityOnly, sameQuantity } from './types'

/** Functions of one plain number. */
const plain = (
  name: string,
  help: string,
  of: (x: number) => number,
  example: Example,
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

export const numberFunctions: readonly FunctionSpec[] = [
  {
    name: 'abs',
    group: GROUP,
    parameters: [X],
    result: (types) => {
      const why = 'a reading on a scale has no size of its own: take abs of a difference'
      return noReading(quantityOnly(one(types, 'x'), 'abs'), why)
    },
    help: 'the size without its sign',
    example: { formula: 'abs(15 °C - 20 °C)', shown: '5 K' },
    source: SOURCE,
    evaluate: (args) => Math.abs(args.x as number),
  },
  {
    name: 'sign',
    group: GROUP,
    parameters: [X],
    result: (types) => {
      noReading(quantityOnly(one(types, 'x'), 'sign'), 'a reading on a scale has no sign of its own')
      return NUMBER
    },
    help: '1 above zero, −1 below, 0 at zero',
    example: { formula: 'sign(15 °C - 20 °C)', shown: '−1' },
    source: SOURCE,
    evaluate: (args) => Math.sign(args.x as number),
  },
  {
    name: 'sqrt',
    group: GROUP,
    parameters: [X],
    result: (types) => derived(power(quantityOnly(one(types, 'x'), 'sqrt').dimension, 0.5)),
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
  {
    name: 'mod',
    group: GROUP,
    parameters: [X, { ...X, name: 'divisor', help: 'of the same quantity' }],
    result: (types) => {
      const type = sameQuantity([one(types, 'x'), one(types, 'divisor')], 'mod')
      return noReading(type, 'a reading on a scale cannot be divided')
    },
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
