import { Problem } from '@/lib/errors'
import type { Pair } from '@/lib/fluids'
import type { Arguments, Parameter } from '@/lib/formula'
import { quantityType } from '../../types'

/** What a state can be given by, two at a time, by the letters the trade uses. */
const STATE_QUANTITIES = {
  p: ['pressure', 'absolute pressure'],
  T: ['temperature', 'temperature'],
  rho: ['density', 'density'],
  u: ['specific_energy', 'specific internal energy'],
  h: ['specific_energy', 'specific enthalpy'],
  s: ['specific_entropy', 'specific entropy'],
  x: ['fraction', 'quality: the mass fraction of vapour, 0 to 1'],
} as const

type StateLetter = keyof typeof STATE_QUANTITIES

export const STATE_PARAMETERS: readonly Parameter[] = Object.entries(STATE_QUANTITIES).map(
  ([name, [quantity, help]]) => ({
    name,
    type: quantityType(quantity),
    optional: true,
    named: true,
    help,
  }),
)

/** Pairs that fix a state, by the letters in alphabetical order. */
const PAIRS: ReadonlyMap<string, readonly [Pair, StateLetter, StateLetter]> = new Map([
  ['T p', ['pT', 'p', 'T']],
  ['T rho', ['rhoT', 'rho', 'T']],
  ['rho u', ['rhou', 'rho', 'u']],
  ['h p', ['ph', 'p', 'h']],
  ['p s', ['ps', 'p', 's']],
  ['p u', ['pu', 'p', 'u']],
  ['T x', ['Tx', 'T', 'x']],
  ['p x', ['px', 'p', 'x']],
  ['T s', ['Ts', 'T', 's']],
  ['h rho', ['rhoh', 'rho', 'h']],
  ['p rho', ['rhop', 'rho', 'p']],
])

const isStateLetter = (name: string): name is StateLetter => name in STATE_QUANTITIES
const lettersOf = (given: readonly string[]) => given.filter(isStateLetter).sort((a, b) => (a < b ? -1 : 1))

/** Refuses anything but two quantities that fix a state together. */
export function needsPair(given: readonly string[]): void {
  const letters = lettersOf(given)
  if (PAIRS.has(letters.join(' '))) return
  const known =
    'p and T, rho and T, rho and u, p and h, p and s, p and u, T and x, p and x, T and s, rho and h, or rho and p'
  const had = letters.length === 0 ? 'nothing' : letters.join(' and ')
  throw new Problem('argument', `a state is given by two of these together: ${known}; here it is given ${had}`)
}

/** The pair and its two values in SI, in the order of the pair's name. */
export function pairOf(args: Arguments): readonly [Pair, number, number] {
  const letters = lettersOf(Object.keys(args).filter((name) => args[name] !== undefined))
  needsPair(letters)
  const [pair, a, b] = PAIRS.get(letters.join(' '))!
  return [pair, args[a] as number, args[b] as number]
}
