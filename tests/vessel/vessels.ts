import { findFluid, idealGas, type Fluid } from '@/lib/fluids'
import { start, type Path, type Run, type Shell, type Supply, type Vessel } from '@/lib/vessel'

export const AMBIENT_K = 291.15

export function fluid(name: string): Fluid {
  const found = findFluid(name)
  if (!found) throw new Error(`no fluid ${name}`)
  return found
}

/** An ideal gas with constant heat capacities: cp/cv = 1.4, molar mass of nitrogen. */
export const IDEAL = idealGas({ k: 1.4, molarMass_kg_mol: 0.0280134 })

/** 50 L, as a steel cylinder. */
export function vessel(shell: Shell = { kind: 'none' }, more: Partial<Vessel> = {}): Vessel {
  return {
    volume_m3: 0.05,
    shell,
    inside: { kind: 'fixed', coefficient_W_m2K: 250 },
    outside: { kind: 'fixed', coefficient_W_m2K: 6 },
    ambient_T_K: AMBIENT_K,
    ...more,
  }
}

export const LUMPED: Shell = { kind: 'lumped', mass_kg: 52, heatCapacity: 470, area_m2: 0.75 }

/** A steel wall of 9 mm. */
export const LAYERS: Shell = {
  kind: 'layers',
  layers: [{ thickness_m: 0.009, conductivity_W_mK: 45, density_kg_m3: 7850, heatCapacity: 470 }],
  area_m2: 0.75,
}

export const ORIFICE: Extract<Path, { kind: 'orifice' }> = {
  kind: 'orifice',
  diameter_m: 2.5e-3,
  dischargeCoefficient: 0.84,
}

export const header = (gas: Fluid, p_Pa = 300e5, T_K = 288.15): Supply => ({ kind: 'header', fluid: gas, p_Pa, T_K })

export const filled = (gas: Fluid, p_Pa: number, v: Vessel = vessel(), T_K = AMBIENT_K): Run =>
  start(v, gas, { pair: 'pT', a: p_Pa, b: T_K })

export const bank = (gas: Fluid, count: number, p_Pa: number, v: Vessel = vessel(), T_K = 288.15) =>
  ({ kind: 'bank', count, contents: filled(gas, p_Pa, v, T_K) }) as const
