import type { State } from '@/lib/fluids'

/**
 * What stands in a flow's way: the mass flow from a state at rest upstream to a lower pressure downstream. Keeps scratch
 * states and the last answer as a guess for the next, so each place in a network has its own.
 */
export interface Resistance {
  /** kg/s; `p_down_Pa` is at most the upstream pressure. */
  flow_kg_s(up: State, p_down_Pa: number): number
  /** Evaluations of the equation of state since it was made. */
  readonly evaluations: number
}
