import type { Source } from './equation-data'

export type Phase = 'gas' | 'liquid' | 'supercritical' | 'two-phase'

/** What fixes a state: two quantities in the order of the name. */
export const PAIRS = ['pT', 'rhoT', 'rhou', 'ph', 'ps', 'pu', 'Tx', 'px', 'Ts', 'rhoh', 'rhop'] as const
export type Pair = (typeof PAIRS)[number]

/** All properties of a fluid in one state, per kilogram, SI. Its fields are overwritten where it is handed in to be reused. */
export interface State {
  T_K: number
  rho_kg_m3: number
  p_Pa: number
  u_J_kg: number
  h_J_kg: number
  s_J_kgK: number
  /** In two phases cv is that of the homogeneous mixture in equilibrium; cp is Infinity. */
  cv_J_kgK: number
  cp_J_kgK: number
  /** In two phases that of the homogeneous mixture in equilibrium. */
  w_m_s: number
  /** Mass fraction of vapour in two phases; NaN in one. */
  x: number
  /** ∂p/∂T at constant density, Pa/K. */
  dpdT_rho_Pa_K: number
  /** ∂p/∂ρ at constant temperature, Pa m³/kg. */
  dpdrho_T_Pa_m3_kg: number
  phase: Phase
  /** How many evaluations of the equation of state it took. */
  evaluations: number
}

export function createState(): State {
  return {
    T_K: NaN,
    rho_kg_m3: NaN,
    p_Pa: NaN,
    u_J_kg: NaN,
    h_J_kg: NaN,
    s_J_kgK: NaN,
    cv_J_kgK: NaN,
    cp_J_kgK: NaN,
    w_m_s: NaN,
    x: NaN,
    dpdT_rho_Pa_K: NaN,
    dpdrho_T_Pa_m3_kg: NaN,
    phase: 'gas',
    evaluations: 0,
  }
}

/** Liquid and vapour in equilibrium. */
export interface Saturation {
  readonly T_K: number
  readonly p_Pa: number
  readonly liquid: State
  readonly vapour: State
}

export interface FluidInfo {
  readonly formula: string
  readonly cas?: string
  readonly molarMass_kg_mol: number
  readonly gasConstant_J_kgK: number
  readonly critical?: { readonly T_K: number; readonly p_Pa: number; readonly rho_kg_m3: number }
  readonly triple?: { readonly T_K: number; readonly p_Pa: number }
  readonly T_min_K: number
  readonly T_max_K: number
  readonly p_max_Pa: number
  /** The papers, or how an ideal gas was made. */
  readonly sources: readonly Source[]
  readonly otherNames: readonly string[]
}

export interface Fluid {
  /** Identifier in formulas: nitrogen, carbon_dioxide. */
  readonly id: string
  readonly name: string
  readonly info: FluidInfo
  /**
   * The state that a pair of quantities fixes, in SI, per kilogram.
   * @param out overwritten and returned where it is given
   * @param guess a neighbouring state, from which it is found sooner
   * @throws Problem 'range' outside the fluid's range, 'state' where there is no such state, 'unsupported' where it is not worked out
   */
  state(pair: Pair, a: number, b: number, out?: State, guess?: State): State
  saturationAtT(T_K: number): Saturation
  saturationAtP(p_Pa: number): Saturation
  viscosity_Pa_s(state: State): number
  conductivity_W_mK(state: State): number
  /** Of the ideal gas at this temperature. */
  idealCp_J_kgK(T_K: number): number
}
