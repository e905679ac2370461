import { Problem } from '@/lib/errors'
import { monotoneRoot } from '@/lib/numerics/monotone'
import { DENSEST, densityAt } from './density'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { dpdTOf, evaluateAt } from './properties'
import { kelvin, perCubicMetre } from './words'

/** The state at a temperature and a pressure, an entropy or a density. */
export function flashAtTemperature(
  fluid: HelmholtzFluid,
  T_K: number,
  by: 'p' | 's' | 'rho',
  value: number,
  out: State,
  guess?: State,
): State {
  fluid.checkTemperature(T_K)
  switch (by) {
    case 'p':
      return atPressure(fluid, T_K, value, out, guess)
    case 's':
      return atEntropy(fluid, T_K, value, out)
    case 'rho':
      return atDensity(fluid, T_K, value, out)
  }
}

function atPressure(fluid: HelmholtzFluid, T_K: number, p_Pa: number, out: State, guess: State | undefined): State {
  fluid.checkPressure(p_Pa)
  const known = guess && guess.phase !== 'two-phase' ? guess.rho_kg_m3 : undefined
  let rho: number
  if (T_K >= fluid.boundary.T_top_K) rho = densityAt(fluid, T_K, p_Pa, 'beyond', undefined, known)
  else {
    const { liquid, vapour } = fluid.boundary.edgesAtT(T_K)
    const branch = p_Pa <= vapour.p_Pa ? 'gas' : 'liquid'
    if (p_Pa > vapour.p_Pa && p_Pa < liquid.p_Pa) fluid.boundary.mixed(liquid, vapour, 0, out)
    const edge = branch === 'gas' ? vapour : liquid
    rho = densityAt(fluid, T_K, p_Pa, branch, { rho: edge.rho_kg_m3, p_Pa: edge.p_Pa }, known)
  }
  fluid.singlePhase(T_K, rho, out)
  // of a cold liquid the equation gives a pressure with few digits: the one that was asked for is the better
  out.p_Pa = p_Pa
  return out
}

function atEntropy(fluid: HelmholtzFluid, T_K: number, s: number, out: State): State {
  const { alpha, scales, info } = fluid
  const rho_critical = info.critical!.rho_kg_m3
  let low = Math.log(1e-14 * rho_critical)
  let high = Math.log(DENSEST * rho_critical)
  if (T_K < fluid.boundary.T_top_K) {
    const { liquid, vapour } = fluid.boundary.edgesAtT(T_K)
    if (s >= vapour.s_J_kgK) high = Math.log(vapour.rho_kg_m3 * (1 + 1e-7))
    else if (s <= liquid.s_J_kgK) low = Math.log(liquid.rho_kg_m3 * (1 - 1e-7))
    else return fluid.boundary.mixed(liquid, vapour, (s - liquid.s_J_kgK) / (vapour.s_J_kgK - liquid.s_J_kgK), out)
  }
  const logRho = monotoneRoot(
    (logRho, at) => {
      const rho = Math.exp(logRho)
      evaluateAt(alpha, scales, T_K, rho)
      at.value = scales.R_J_kgK * (alpha.B1 + alpha.A10 - alpha.B0 - alpha.A00) - s
      at.slope = -dpdTOf(alpha, scales, rho) / rho
    },
    { low, high, guess: (low + high) / 2, tolerance: 1e-12, most: 100 },
  )
  if (!Number.isFinite(logRho)) throw new Problem('state', `no ${fluid.name} at ${kelvin(T_K)} has this entropy`)
  fluid.singlePhase(T_K, Math.exp(logRho), out)
  fluid.checkPressure(out.p_Pa)
  return out
}

function atDensity(fluid: HelmholtzFluid, T_K: number, rho: number, out: State): State {
  if (!(rho > 0)) throw new Problem('range', `the density of ${fluid.name} has to be above zero`)
  if (rho > DENSEST * fluid.info.critical!.rho_kg_m3)
    throw new Problem('range', `no ${fluid.name} is as dense as ${perCubicMetre(rho)} here`)
  if (T_K < fluid.boundary.T_top_K && nearDome(fluid, T_K, rho)) {
    const { liquid, vapour } = fluid.boundary.edgesAtT(T_K)
    if (rho > vapour.rho_kg_m3 && rho < liquid.rho_kg_m3) {
      const [vl, vv] = [1 / liquid.rho_kg_m3, 1 / vapour.rho_kg_m3]
      return fluid.boundary.mixed(liquid, vapour, (1 / rho - vl) / (vv - vl), out)
    }
  }
  fluid.singlePhase(T_K, rho, out)
  // a cold liquid near its saturation may come out a hair below zero: see checkPressure's callers for p/T
  if (out.p_Pa > fluid.info.p_max_Pa) fluid.checkPressure(out.p_Pa)
  return out
}

/** By the table of the curve, with room for its error: costs no evaluation where the state is well outside. */
function nearDome(fluid: HelmholtzFluid, T_K: number, rho: number): boolean {
  if (!fluid.boundary.curve) return true
  const { liquid, vapour } = fluid.boundary.guessDensities(T_K)
  return rho > vapour * 0.999 && rho < liquid * 1.001
}
