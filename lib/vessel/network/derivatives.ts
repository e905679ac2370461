import type { State } from '@/lib/fluids'

/**
 * Thermodynamic derivatives that a control volume needs, from the set that every state carries. They hold in two phases
 * as well, where pressure depends on temperature alone and cv is that of the mixture.
 */

/** (∂u/∂ρ) at constant T, J m³/kg². */
export const energyByDensity = (s: State) => (s.p_Pa - s.T_K * s.dpdT_rho_Pa_K) / (s.rho_kg_m3 * s.rho_kg_m3)

/** (∂p/∂u) at constant ρ, Pa kg/J. */
export const pressureByEnergy = (s: State) => s.dpdT_rho_Pa_K / s.cv_J_kgK

/** (∂p/∂ρ) at constant u, Pa m³/kg. */
export const pressureByDensity = (s: State) => s.dpdrho_T_Pa_m3_kg - pressureByEnergy(s) * energyByDensity(s)
