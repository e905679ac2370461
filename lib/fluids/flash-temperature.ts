import { Problem } from '@/lib/errors'
import type { Objective } from '@/lib/numerics/roots'
import { monotoneRoot } from '@/lib/numerics/roots'
import type { Branch } from './chart'
import { solveDensity } from './density'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase, shift } from './properties'
import { LIQUID, VAPOUR } from './saturation-table'
import { kelvin } from './words'

/** The state at a temperature and pressure. On the saturation curve itself it is the vapour. */
export function flashPT(fluid: HelmholtzFluid, p_Pa: number, T_K: number, out: State, guess?: State): State {
  fluid.checkTemperature(T_K)
  fluid.checkPressure(p_Pa)
  const { table } = fluid.boundary
  let branch: Branch = 'beyond'
  if (T_K < table.T_top_K) {
    if (p_Pa <= table.p_Pa(VAPOUR, T_K) * (1 + 1e-10)) branch = 'gas'
    else {
      branch = 'liquid'
      if (p_Pa < table.p_Pa(LIQUID, T_K) * (1 - 1e-10)) fluid.boundary.checkEquilibrium()
    }
  }
  const near = guess && guess.phase !== 'two-phase' ? densityNear(guess, T_K, p_Pa) : NaN
  return solveDensity(fluid, T_K, p_Pa, branch, out, near)
}

/** Where a neighbouring state leads to first order; of a gas along its compressibility factor. */
function densityNear(guess: State, T_K: number, p_Pa: number): number {
  const { rho_kg_m3: rho, T_K: T, p_Pa: p, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho } = guess
  return rho + (p_Pa - p - dpdT * (T_K - T)) / dpdrho
}

/**
 * The state at a temperature and entropy. Where a liquid contracts on warming (water below 4 °C) compression raises its
 * entropy first: of several states the two-phase one is taken, else the thinner.
 */
export function flashTs(fluid: HelmholtzFluid, T_K: number, s: number, out: State, guess?: State): State {
  fluid.checkTemperature(T_K)
  const { chart } = fluid
  const { table } = fluid.boundary
  let branch: Branch = 'beyond'
  let [low, high] = [1e-14 * table.rho_top, 0]
  if (T_K < table.T_top_K) {
    const [s_liquid, s_vapour] = [table.s_J_kgK(LIQUID, T_K), table.s_J_kgK(VAPOUR, T_K)]
    const hair = 1e-10 * (s_vapour - s_liquid)
    if (
      s > s_liquid - hair &&
      s < s_vapour + hair &&
      (fluid.boundary.hasEquilibrium || (s > s_liquid + hair && s < s_vapour - hair))
    ) {
      fluid.boundary.checkEquilibrium()
      const { liquid, vapour } = fluid.boundary.solveAt(T_K)
      const x = (s - liquid.s_J_kgK) / (vapour.s_J_kgK - liquid.s_J_kgK)
      return fillTwoPhase(out, liquid, vapour, Math.min(1, Math.max(0, x)))
    }
    branch = s >= s_vapour - hair ? 'gas' : 'liquid'
    if (branch === 'gas') high = table.rho(VAPOUR, T_K) * 1.001
    else low = table.rho(LIQUID, T_K) * 0.999
  }
  if (branch !== 'gas') high = chart.densest(T_K, branch)
  const first =
    guess && guess.phase !== 'two-phase' && Math.abs(guess.T_K / T_K - 1) < 0.02
      ? guess.rho_kg_m3
      : chart.atEntropy(T_K, s, branch)
  const search = new LogDensityAtEntropy(fluid, T_K, s, out)
  const logRho = monotoneRoot(search, 'falling', Math.log(low), Math.log(high), Math.log(first), 1e-12)
  if (Number.isNaN(logRho)) throw new Problem('state', `no ${fluid.name} at ${kelvin(T_K)} has this entropy`)
  shift(out, 0, (-search.value / search.slope) * out.rho_kg_m3)
  fluid.checkPressure(out.p_Pa)
  fluid.checkFluid(out)
  return out
}

class LogDensityAtEntropy implements Objective {
  value = 0
  slope = 0

  constructor(
    private readonly fluid: HelmholtzFluid,
    private readonly T_K: number,
    private readonly s: number,
    private readonly out: State,
  ) {}

  evaluate(logRho: number): void {
    const { s_J_kgK, dpdT_rho_Pa_K, rho_kg_m3 } = this.fluid.singlePhase(this.T_K, Math.exp(logRho), this.out)
    this.value = s_J_kgK - this.s
    this.slope = -dpdT_rho_Pa_K / rho_kg_m3
  }
}

/** Below a margin outside the two-phase region the table alone tells on which side a density is. */
const HAIR = 1e-8

/** The state at a density and temperature. */
export function flashRhoT(fluid: HelmholtzFluid, rho: number, T_K: number, out: State): State {
  fluid.checkTemperature(T_K)
  fluid.checkDensity(rho)
  const { table } = fluid.boundary
  if (T_K < table.T_top_K) {
    const [rho_liquid, rho_vapour] = [table.rho(LIQUID, T_K), table.rho(VAPOUR, T_K)]
    if (rho < rho_liquid * (1 - HAIR) && rho > rho_vapour * (1 + HAIR)) {
      fluid.boundary.checkEquilibrium()
      const { liquid, vapour } = fluid.boundary.solveAt(T_K)
      const [vl, vv] = [1 / liquid.rho_kg_m3, 1 / vapour.rho_kg_m3]
      return fillTwoPhase(out, liquid, vapour, Math.min(1, Math.max(0, (1 / rho - vl) / (vv - vl))))
    }
  }
  fluid.singlePhase(T_K, rho, out)
  if (out.p_Pa > fluid.info.p_max_Pa) fluid.checkPressure(out.p_Pa)
  fluid.checkFluid(out)
  return out
}
