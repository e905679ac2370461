import type { Fluid, State } from '@/lib/fluids'
import type { Path } from './paths/kinds'
import type { Supply } from './supply'
import type { Vessel } from './vessel'

export type Operation = 'start' | 'charge' | 'vent' | 'hold' | 'equalise' | 'evacuate' | 'cascade'

/** What is drawn from a vessel of two phases: both as they are mixed, or one of them. */
export type Draw = 'mixed' | 'vapour' | 'liquid'

/** Where to stop; the first reached counts. */
export interface Stops {
  readonly until_p_Pa?: number
  readonly until_T_K?: number
  readonly until_m_kg?: number
  /** Vapour quality of a vessel of two phases; 1: no liquid left. */
  readonly until_x?: number
  readonly for_s?: number
  /** Until the flow has fallen to this, either way. */
  readonly until_flow_kg_s?: number
  /** Until pressures are equal within 1e-6, so that only heat can make more gas pass. */
  readonly level?: boolean
  /** Until nothing changes any more: pressures equal within 1e-6, temperatures within 0.01 K of where they rest. */
  readonly settled?: boolean
}

export type StoppedBy =
  | 'start'
  | 'until_p'
  | 'until_T'
  | 'until_m'
  | 'until_x'
  | 'until_flow'
  | 'level'
  | 'for'
  | 'settled'
  /** The fluid has come to its triple point, below which its solid is not modelled. */
  | 'triple_point'

/** How heat passes between gas and shell: by the vessel's coefficients (needs time), or one of three limits. */
export type Heat = 'by_coefficients' | 'adiabatic' | 'shell_at_gas_temperature' | 'isothermal'

/** All NaN for a vessel without a shell. */
export interface ShellState {
  /** Weighted by heat capacity: the temperature the shell would come to if it were left alone. */
  readonly mean_K: number
  readonly inner_K: number
  readonly outer_K: number
  /** Of each cell of the wall, innermost first; one for a lumped shell, none without a shell. */
  readonly cells_K: readonly number[]
}

/** Columns of equal length, one entry for each point. */
export interface Trace {
  readonly t_s: readonly number[]
  readonly p_Pa: readonly number[]
  readonly T_K: readonly number[]
  readonly m_kg: readonly number[]
  /** Into the vessel positive. */
  readonly flow_kg_s: readonly number[]
  readonly shellMean_K: readonly number[]
  readonly shellInner_K: readonly number[]
  readonly shellOuter_K: readonly number[]
  /** Of a supply that runs down, or the other vessel. */
  readonly otherP_Pa: readonly number[]
  readonly otherT_K: readonly number[]
}

/**
 * What became of a vessel: its state at the end of an operation and what happened in between. Plain data, never changed.
 * An evacuated vessel has p = 0, m = 0, and NaN for what only a fluid has (u, h, s, x).
 */
export interface Run {
  readonly operation: Operation
  readonly vessel: Vessel
  readonly fluid: Fluid
  readonly p_Pa: number
  readonly T_K: number
  readonly m_kg: number
  readonly rho_kg_m3: number
  readonly u_J_kg: number
  readonly h_J_kg: number
  readonly s_J_kgK: number
  /** Vapour quality between 0 and 1 in two phases; NaN in one. */
  readonly x: number
  readonly phase: State['phase'] | 'vacuum'
  readonly shell: ShellState
  readonly T_peak_K: number
  readonly T_low_K: number
  readonly p_peak_Pa: number
  readonly p_low_Pa: number
  readonly shell_peak_K: number
  readonly shell_low_K: number
  readonly flow_peak_kg_s: number
  /** Net mass that came in (negative: went out). */
  readonly moved_kg: number
  /** Net heat into the gas from its shell, or from outside where it is held at a temperature. */
  readonly heat_J: number
  /** Null where the operation is a balance alone, with no time in it. */
  readonly time_s: number | null
  readonly stoppedBy: StoppedBy
  /** Relative residuals of energy and mass, worked out from the states reported. */
  readonly balance: { readonly energy: number; readonly mass: number }
  /** Null where there is no time. */
  readonly trace: Trace | null
  readonly counts: {
    readonly steps: number
    readonly rejected: number
    readonly rates: number
    readonly evaluations: number
  }
  /** What is left in what ran down. */
  readonly supply?: Supply
  readonly path?: Path
}
