import { Problem } from '@/lib/errors'
import { NUMBER } from '../typing'
import type { FunctionSpec, Parameter } from '../types'
import { GROUP, SOURCE } from './common'
import type { Example } from './common'

const DIGITS: Parameter = {
  name: 'digits',
  type: NUMBER,
  optional: true,
  default: '0',
  help: 'digits behind the point',
}

const MOST_DIGITS = 15

const rounding = (name: string, help: string, of: (x: number) => number, example: Example): FunctionSpec => ({
  name,
  group: GROUP,
  parameters: [{ name: 'x', type: NUMBER, help: 'a plain number: divide by a unit first, T / 1 K' }, DIGITS],
  result: NUMBER,
  help,
  example,
  source: SOURCE,
  evaluate: (args) => {
    const [x, digits] = [args.x as number, args.digits as number]
    if (!Number.isInteger(digits) || Math.abs(digits) > MOST_DIGITS)
      throw new Problem('range', `${name} takes a whole number of digits, −${MOST_DIGITS} to ${MOST_DIGITS}`)
    return timesPowerOfTen(of(timesPowerOfTen(x, digits)), -digits)
  },
})

/** By its decimal text, so that 1.005 is rounded as it is written and not as it is stored. */
function timesPowerOfTen(x: number, exponent: number): number {
  const [mantissa, power = '0'] = String(x).split('e')
  return Number(`${mantissa}e${Number(power) + exponent}`)
}

const awayFromZero = (x: number) => Math.sign(x) * Math.round(Math.abs(x))

export const roundingFunctions: readonly FunctionSpec[] = [
  rounding('round', 'to the nearest, halves away from zero', awayFromZero, {
    formula: 'round(2.345, 2)',
    shown: '2.35',
  }),
  rounding('roundup', 'away from zero', (x) => Math.sign(x) * Math.ceil(Math.abs(x)), {
    formula: 'roundup(3.2)',
    shown: '4',
  }),
  rounding('rounddown', 'towards zero', Math.trunc, { formula: 'rounddown(3.8)', shown: '3' }),
]
