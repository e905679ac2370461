import { Problem } from '@/lib/errors'
import { monotoneRoot } from '@/lib/numerics/monotone'
import { createState } from './fluid'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase } from './properties'
import { kelvin, perCubicMetre } from './words'

type By = 'u' | 'h' | 'p'

const valueOf = (state: State, by: By) => (by === 'u' ? state.u_J_kg : by === 'h' ? state.h_J_kg : state.p_Pa)

/** How the value rises with temperature at constant density; the same relation holds in one phase and in two. */
function slopeOf(state: State, by: By): number {
  const { cv_J_kgK: cv, dpdT_rho_Pa_K: dpdT, rho_kg_m3: rho } = state
  return by === 'u' ? cv : by === 'h' ? cv + dpdT / rho : dpdT
}

/**
 * The state at a density and an energy or a pressure. At constant density all three rise with temperature, through the
 * two-phase region and out of it. Where water contracts on warming, a pressure has two answers: the warmer is taken.
 */
export function flashAtDensity(
  fluid: HelmholtzFluid,
  rho: number,
  by: By,
  value: number,
  out: State,
  guess?: State,
): State {
  if (!(rho > 0)) throw new Problem('range', `the density of ${fluid.name} has to be above zero`)
  const { T_min_K, T_max_K } = fluid.info
  const T_edge = edgeTemperature(fluid, rho)
  if (T_edge !== null) {
    const edge = fluid.singlePhase(T_edge, rho, out)
    if (value < valueOf(edge, by)) return twoPhase(fluid, rho, by, value, T_edge, out)
  }
  const T = monotoneRoot(
    (T, at) => {
      fluid.singlePhase(T, rho, out)
      at.value = valueOf(out, by) - value
      at.slope = slopeOf(out, by)
    },
    {
      low: (T_edge ?? T_min_K) * (1 - 1e-9),
      high: T_max_K * 1.01,
      guess: guess && guess.phase !== 'two-phase' ? guess.T_K : firstGuess(fluid, by, value, out, T_edge),
      tolerance: 1e-10,
      most: 100,
    },
  )
  if (!Number.isFinite(T)) throw outside(fluid, rho, by, value, out)
  fluid.checkTemperature(T)
  fluid.singlePhase(T, rho, out)
  if (out.p_Pa > fluid.info.p_max_Pa) fluid.checkPressure(out.p_Pa)
  return out
}

function firstGuess(fluid: HelmholtzFluid, by: By, value: number, at: State, T_edge: number | null): number {
  if (T_edge === null)
    fluid.singlePhase(Math.max(fluid.info.T_min_K, Math.min(300, fluid.info.T_max_K)), at.rho_kg_m3 || 1, at)
  return at.T_K + (value - valueOf(at, by)) / slopeOf(at, by)
}

function outside(fluid: HelmholtzFluid, rho: number, by: By, value: number, at: State): Problem {
  const { T_min_K, T_max_K } = fluid.info
  const hot = value > valueOf(fluid.singlePhase(T_max_K, rho, at), by)
  const bound = hot ? `above ${kelvin(T_max_K)}` : `below ${kelvin(T_min_K)}`
  return new Problem(
    'range',
    `at ${perCubicMetre(rho)} this would be ${fluid.name} ${bound}, which is not worked out here`,
  )
}

/** Where a density lies on the edge of the two-phase region; null where it never does. */
function edgeTemperature(fluid: HelmholtzFluid, rho: number): number | null {
  const { boundary, info } = fluid
  const T_low = info.triple!.T_K
  const T_top = boundary.T_top_K
  const gas = rho < info.critical!.rho_kg_m3
  const edges = (T: number) => {
    if (boundary.curve) return boundary.guessDensities(T)
    const { liquid, vapour } = boundary.edgesAtT(T)
    return { liquid: liquid.rho_kg_m3, vapour: vapour.rho_kg_m3 }
  }
  const inside = (T: number) => {
    const { liquid, vapour } = edges(T)
    return rho > vapour && rho < liquid
  }
  if (!inside(T_low)) return null
  let [low, high] = [T_low, T_top]
  for (let i = 0; i < 60 && high - low > 1e-13 * high; i++) {
    const middle = (low + high) / 2
    if (inside(middle)) low = middle
    else high = middle
  }
  return boundary.curve ? polishEdge(fluid, (low + high) / 2, rho, gas) : (low + high) / 2
}

/** From the table's edge to the equation's own, by the slope of the saturated density. */
function polishEdge(fluid: HelmholtzFluid, T_table: number, rho: number, gas: boolean): number {
  const T_critical = fluid.info.critical!.T_K
  let T = T_table
  for (let i = 0; i < 3; i++) {
    if (T_critical - T < 1e-6 * T_critical) return T
    const { liquid, vapour } = fluid.boundary.solveAt(T)
    const phase = gas ? vapour : liquid
    const slope = (vapour.s_J_kgK - liquid.s_J_kgK) / (1 / vapour.rho_kg_m3 - 1 / liquid.rho_kg_m3)
    const step = ((rho - phase.rho_kg_m3) * phase.dpdrho_T_Pa_m3_kg) / (slope - phase.dpdT_rho_Pa_K)
    // where a liquid is densest its saturated density has no slope: the table's answer stands
    if (!(Math.abs(step) < 0.01 * T)) return T
    T = Math.min(T + step, T_critical)
    if (Math.abs(step) < 1e-11 * T) return T
  }
  return T
}

const mixture = createState()

function twoPhase(fluid: HelmholtzFluid, rho: number, by: By, value: number, T_edge: number, out: State): State {
  const T_low = fluid.info.triple!.T_K
  const at = (T: number) => {
    const { liquid, vapour } = fluid.boundary.edgesAtT(T)
    const [vl, vv] = [1 / liquid.rho_kg_m3, 1 / vapour.rho_kg_m3]
    const x = Math.min(1, Math.max(0, (1 / rho - vl) / (vv - vl)))
    if (!fluid.boundary.curve) fluid.boundary.mixed(liquid, vapour, x, out)
    return fillTwoPhase(mixture, liquid, vapour, x)
  }
  if (value < valueOf(at(T_low), by)) {
    throw new Problem(
      'range',
      `at ${perCubicMetre(rho)} this would be ${fluid.name} below its triple point, ${kelvin(T_low)}, which is not worked out here`,
    )
  }
  const T = monotoneRoot(
    (T, f) => {
      const state = at(T)
      f.value = valueOf(state, by) - value
      f.slope = slopeOf(state, by)
    },
    {
      low: T_low * (1 - 1e-12),
      high: T_edge * (1 + 1e-9),
      guess: T_low + 0.7 * (T_edge - T_low),
      tolerance: 1e-11,
      most: 100,
    },
  )
  if (!Number.isFinite(T))
    throw new Problem('unconverged', `no state of ${fluid.name} was found at ${perCubicMetre(rho)}`)
  return Object.assign(out, at(Math.min(T, T_edge)))
}
