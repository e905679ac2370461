import { Problem } from '@/lib/errors'
import { PAIRS } from '@/lib/fluids'
import type { Fluid, State } from '@/lib/fluids'
import { isQuantity, quantity, readQuantity } from '@/lib/units'

/** What a state can be given by, with the quantity that each is. */
export const LETTERS = {
  p: 'pressure',
  T: 'temperature',
  rho: 'density',
  u: 'specific_energy',
  h: 'specific_energy',
  s: 'specific_entropy',
  x: 'fraction',
} as const
export type Letter = keyof typeof LETTERS

export interface TypedPair {
  readonly first: Letter
  readonly second: Letter
  readonly firstText: string
  readonly secondText: string
}

export type Found = { readonly state: State } | { readonly mistake: string }

/** The state that a typed pair fixes, or why it fixes none. */
export function stateOf(fluid: Fluid, { first, second, firstText, secondText }: TypedPair): Found {
  const a = read(first, firstText)
  const b = read(second, secondText)
  if (typeof a === 'string') return { mistake: a }
  if (typeof b === 'string') return { mistake: b }
  const pair = PAIRS.find((candidate) => candidate === `${first}${second}` || candidate === `${second}${first}`)
  if (!pair) return { mistake: `${first} and ${second} together do not fix a state here` }
  try {
    return { state: pair === `${first}${second}` ? fluid.state(pair, a, b) : fluid.state(pair, b, a) }
  } catch (mistake) {
    if (mistake instanceof Problem) return { mistake: mistake.reason }
    throw mistake
  }
}

function read(letter: Letter, text: string): number | string {
  const id = LETTERS[letter]
  if (!isQuantity(id)) throw new Error(`${id} is no quantity`)
  const reading = readQuantity(text, { quantity: id, unit: quantity(id).units[0], ambient_Pa: 101_325 })
  return reading.ok ? reading.si : `${letter}: ${reading.reason}`
}

export interface Row {
  readonly name: string
  readonly quantity: string
  readonly value: number
}

/** All that is known of a state, in the words of the trade. */
export function rowsOf(fluid: Fluid, state: State): readonly Row[] {
  const transport = (of: (state: State) => number) => (state.phase === 'two-phase' ? NaN : of(state))
  return [
    { name: 'temperature', quantity: 'temperature', value: state.T_K },
    { name: 'pressure', quantity: 'pressure', value: state.p_Pa },
    { name: 'density', quantity: 'density', value: state.rho_kg_m3 },
    { name: 'quality', quantity: 'fraction', value: state.x },
    { name: 'specific internal energy', quantity: 'specific_energy', value: state.u_J_kg },
    { name: 'specific enthalpy', quantity: 'specific_energy', value: state.h_J_kg },
    { name: 'specific entropy', quantity: 'specific_entropy', value: state.s_J_kgK },
    { name: 'cv', quantity: 'specific_entropy', value: state.cv_J_kgK },
    { name: 'cp', quantity: 'specific_entropy', value: state.cp_J_kgK },
    { name: 'speed of sound', quantity: 'velocity', value: state.w_m_s },
    {
      name: 'compressibility factor',
      quantity: 'dimensionless',
      value: state.p_Pa / (state.rho_kg_m3 * fluid.info.gasConstant_J_kgK * state.T_K),
    },
    { name: 'viscosity', quantity: 'dynamic_viscosity', value: transport((at) => fluid.viscosity_Pa_s(at)) },
    {
      name: 'thermal conductivity',
      quantity: 'thermal_conductivity',
      value: transport((at) => fluid.conductivity_W_mK(at)),
    },
  ]
}
