import type { FluidData } from './equation-data'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { setPressure, shift } from './properties'
import { LIQUID, SaturationTable, VAPOUR } from './saturation-table'

/*
 * The saturation curve of an equation of state: equal pressure and equal Gibbs energy of liquid and vapour at one
 * temperature. It is followed once, from well below the critical point up to it and down to the triple point, into a table;
 * no figure of it is anybody's fit.
 */

/** Where the following begins: far from both ends rough guesses suffice. */
const START_T = 0.75
const MOST_ITERATIONS = 60

export function followSaturation(
  fluid: HelmholtzFluid,
  data: FluidData,
  liquid: State,
  vapour: State,
): SaturationTable | null {
  const critical = data.criticalOfEquation
  if (!critical) return null
  const rho_critical = critical.rho_mol_m3 * data.molarMass_kg_mol
  // a non-analytic equation flattens its dome at the top: by about the cube root, not the square root
  const exponent = data.residual.some((term) => term.type === 'nonanalytic') ? 1 / 3 : 1 / 2
  const table = new SaturationTable(critical.T_K, rho_critical, data.triple.T_K, exponent)
  let start = 0
  while (table.T_at(start) > START_T * critical.T_K) start++
  const store = (i: number) => {
    const p_Pa = vapour.p_Pa
    table.set(LIQUID, i, { rho: liquid.rho_kg_m3, p_Pa, u: liquid.u_J_kg, s: liquid.s_J_kgK })
    table.set(VAPOUR, i, { rho: vapour.rho_kg_m3, p_Pa, u: vapour.u_J_kg, s: vapour.s_J_kgK })
  }
  const first = roughGuess(table.T_at(start), critical.T_K, rho_critical, data.acentricFactor ?? 0)
  if (!equilibrate(fluid, table.T_at(start), first.liquid, first.vapour, liquid, vapour))
    throw new Error(`the saturation curve of ${fluid.name} has no beginning`)
  store(start)
  for (const direction of [-1, 1] as const) {
    for (let i = start + direction; i >= 0 && i < table.size; i += direction) {
      const rho_liquid = table.ahead(LIQUID, i, direction, start)
      const rho_vapour = table.ahead(VAPOUR, i, direction, start)
      equilibrate(fluid, table.T_at(i), rho_liquid, rho_vapour, liquid, vapour)
      store(i)
    }
  }
  return table
}

/** Vapour pressure after Wilson, liquid density after Yen and Woods: from memory, and only to begin with. */
function roughGuess(T_K: number, T_critical_K: number, rho_critical: number, acentricFactor: number) {
  const Tr = T_K / T_critical_K
  const p_reduced = Math.exp(5.373 * (1 + acentricFactor) * (1 - 1 / Tr))
  return {
    liquid: rho_critical * (1 + 0.85 * (1 - Tr) + (1.692 + 0.986 * acentricFactor) * Math.cbrt(1 - Tr)),
    // the critical compressibility is near 0.28 for all
    vapour: (rho_critical * 0.28 * p_reduced) / Tr,
  }
}

/**
 * Liquid and vapour in equilibrium at a temperature, by Newton's method in both densities at once (R. Akasaka, J. Therm. Sci.
 * Technol. 3 (2008) 442). A last step too small to matter to anything but p, u, h and s is taken to first order, so that
 * from good guesses each phase is evaluated once.
 * @returns false where it does not settle, as within a millionth of the critical temperature: the states are then those of the guesses
 */
export function equilibrate(
  fluid: HelmholtzFluid,
  T_K: number,
  rho_liquid: number,
  rho_vapour: number,
  liquid: State,
  vapour: State,
): boolean {
  let [l, v] = [rho_liquid, rho_vapour]
  for (let i = 0; i < MOST_ITERATIONS; i++) {
    fluid.singlePhase(T_K, l, liquid)
    const K_liquid = fluid.alpha.A00 + fluid.alpha.A01 + Math.log(l)
    const p_liquid = liquid.p_Pa
    fluid.singlePhase(T_K, v, vapour)
    const K_vapour = fluid.alpha.A00 + fluid.alpha.A01 + Math.log(v)
    const dp_l = liquid.dpdrho_T_Pa_m3_kg
    const dp_v = vapour.dpdrho_T_Pa_m3_kg
    const off_p = vapour.p_Pa - p_liquid
    const off_g = (K_vapour - K_liquid) * fluid.scales.R_J_kgK * T_K
    const determinant = dp_l * dp_v * (1 / l - 1 / v)
    let step_l = (dp_v * (off_g - off_p / v)) / determinant
    let step_v = (dp_l * (off_g - off_p / l)) / determinant
    if (!Number.isFinite(step_l) || !Number.isFinite(step_v)) break
    if (Math.abs(step_l) < 1e-9 * l && Math.abs(step_v) < 1e-9 * v) {
      shift(liquid, 0, step_l)
      shift(vapour, 0, step_v)
      // of a cold liquid the pressure is the small difference of large terms: the vapour's is the good one
      setPressure(liquid, vapour.p_Pa)
      return true
    }
    const shrink = Math.max(1, (4 * Math.abs(step_l)) / l, (1.25 * Math.abs(step_v)) / v)
    step_l /= shrink
    step_v /= shrink
    l += step_l
    v += step_v
    if (!(l > v)) break
  }
  fluid.singlePhase(T_K, rho_liquid, liquid)
  fluid.singlePhase(T_K, rho_vapour, vapour)
  setPressure(liquid, vapour.p_Pa)
  return false
}
