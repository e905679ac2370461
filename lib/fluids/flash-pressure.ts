import { Problem } from '@/lib/errors'
import type { Objective } from '@/lib/numerics/roots'
import { monotoneRoot } from '@/lib/numerics/roots'
import type { Branch, Energy, Start } from './chart'
import { solveDensity } from './density'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase, setPressure, shift } from './properties'
import { LIQUID, VAPOUR } from './saturation-table'
import type { Side } from './saturation-table'
import { bar, kelvin } from './words'

const valueOf = (state: State, by: Energy) => (by === 'h' ? state.h_J_kg : by === 's' ? state.s_J_kgK : state.u_J_kg)

/** How the value changes with temperature at constant density. */
function slopeT(state: State, by: Energy): number {
  const { cv_J_kgK: cv, dpdT_rho_Pa_K: dpdT, rho_kg_m3: rho, T_K: T } = state
  return by === 'u' ? cv : by === 's' ? cv / T : cv + dpdT / rho
}

/** How it changes with density at constant temperature. */
function slopeRho(state: State, by: Energy): number {
  const { rho_kg_m3: rho, T_K: T, p_Pa: p, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho } = state
  if (by === 's') return -dpdT / (rho * rho)
  return by === 'u' ? (p - T * dpdT) / (rho * rho) : dpdrho / rho - (T * dpdT) / (rho * rho)
}

const start: Start = { T_K: 0, rho: 0, T_low_K: 0 }

/** The state at a pressure and an enthalpy, an entropy or an internal energy, all of which rise with temperature there. */
export function flashAtPressure(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: Energy,
  value: number,
  out: State,
  guess?: State,
): State {
  fluid.checkPressure(p_Pa)
  const { boundary, info } = fluid
  const { table } = boundary
  let branch: Branch = 'beyond'
  let T_edge = NaN
  let [low, high] = [info.T_min_K, info.T_max_K]
  if (p_Pa < boundary.p_top_Pa) {
    branch = 'gas'
    // below its triple-point pressure a fluid here is a gas at every temperature
    if (p_Pa >= table.p_Pa(LIQUID, boundary.T_low_K) * (1 - 1e-9)) {
      const T_bubble = table.T_atPressure(LIQUID, p_Pa)
      const T_dew = boundary.hasEquilibrium ? T_bubble : table.T_atPressure(VAPOUR, p_Pa)
      const atBubble = edgeValue(fluid, LIQUID, T_bubble, p_Pa, by)
      const atDew = edgeValue(fluid, VAPOUR, T_dew, p_Pa, by)
      const hair = 1e-10 * Math.abs(atDew - atBubble)
      if (value > atBubble - hair && value < atDew + hair && boundary.hasEquilibrium)
        return twoPhase(fluid, p_Pa, by, value, out)
      if (value > atBubble + hair && value < atDew - hair) return twoPhase(fluid, p_Pa, by, value, out)
      branch = value <= atBubble + hair ? 'liquid' : 'gas'
      T_edge = branch === 'liquid' ? T_bubble : T_dew
      if (branch === 'liquid') high = T_bubble
      else low = T_dew
    } else if (p_Pa >= table.p_Pa(VAPOUR, boundary.T_low_K)) low = T_edge = table.T_atPressure(VAPOUR, p_Pa)
  }
  if (!fromNeighbour(guess, p_Pa, by, value, low, high, start))
    fluid.chart.atPressure(p_Pa, by, value, branch, T_edge, start)
  low = Math.max(low, start.T_low_K)
  const settled = newton(fluid, p_Pa, by, value, branch, low, high, out)
  if (!settled) nested(fluid, p_Pa, by, value, branch, low, high, out)
  fluid.checkTemperature(out.T_K)
  setPressure(out, p_Pa)
  fluid.checkFluid(out)
  return out
}

function edgeValue(fluid: HelmholtzFluid, side: Side, T_K: number, p_Pa: number, by: Energy): number {
  const { table } = fluid.boundary
  if (by === 's') return table.s_J_kgK(side, T_K)
  return table.u_J_kg(side, T_K) + (by === 'h' ? p_Pa / table.rho(side, T_K) : 0)
}

function twoPhase(fluid: HelmholtzFluid, p_Pa: number, by: Energy, value: number, out: State): State {
  fluid.boundary.checkEquilibrium()
  const { liquid, vapour } = fluid.boundary.solveAtPressure(p_Pa)
  const [yl, yv] = [valueOf(liquid, by), valueOf(vapour, by)]
  const x = (value - yl) / (yv - yl)
  // less than the digits of the value can tell is no vapour at all; at a millipascal it would fill most of the volume
  return fillTwoPhase(out, liquid, vapour, x < 1e-15 ? 0 : Math.min(1, x))
}

/** One step of Newton's method from the neighbour's own derivatives, which costs no evaluation. */
function fromNeighbour(
  guess: State | undefined,
  p_Pa: number,
  by: Energy,
  value: number,
  low: number,
  high: number,
  to: Start,
): boolean {
  if (!guess || guess.phase === 'two-phase' || !(guess.dpdrho_T_Pa_m3_kg > 0)) return false
  step(guess, p_Pa, by, value)
  if (!(Math.abs(stepT) < 0.1 * guess.T_K && Math.abs(stepDensity) < 0.1 * guess.rho_kg_m3)) return false
  to.T_K = guess.T_K + stepT
  to.rho = guess.rho_kg_m3 + stepDensity
  to.T_low_K = low
  return to.T_K >= low * (1 - 1e-6) && to.T_K <= high * (1 + 1e-6)
}

let stepT = 0
let stepDensity = 0

function step(state: State, p_Pa: number, by: Energy, value: number): void {
  const { dpdT_rho_Pa_K: pT, dpdrho_T_Pa_m3_kg: pRho } = state
  const [yT, yRho] = [slopeT(state, by), slopeRho(state, by)]
  const offP = p_Pa - state.p_Pa
  const offY = value - valueOf(state, by)
  const determinant = pT * yRho - pRho * yT
  stepT = (offP * yRho - offY * pRho) / determinant
  stepDensity = (pT * offY - yT * offP) / determinant
}

/** Newton's method in temperature and density at once, from `start`; false where it leaves its branch or does not settle. */
function newton(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: Energy,
  value: number,
  branch: Branch,
  low: number,
  high: number,
  out: State,
): boolean {
  const { table } = fluid.boundary
  let T = Math.min(Math.max(start.T_K, low), high)
  let rho = start.rho
  for (let i = 0; i < 12; i++) {
    fluid.singlePhase(T, rho, out)
    if (!(out.dpdrho_T_Pa_m3_kg > 0 && out.cv_J_kgK > 0)) return false
    step(out, p_Pa, by, value)
    if (!Number.isFinite(stepT) || !Number.isFinite(stepDensity)) return false
    if (Math.abs(stepT) < 1e-10 * T && Math.abs(stepDensity) < 1e-10 * rho) {
      shift(out, stepT, stepDensity)
      return true
    }
    const shrink = Math.max(1, (5 * Math.abs(stepT)) / T, (3 * Math.abs(stepDensity)) / rho)
    T += stepT / shrink
    rho += stepDensity / shrink
    if (T < low * (1 - 1e-7) || T > high * (1 + 1e-7)) return false
    if (branch === 'beyond' || T >= table.T_top_K) continue
    if (branch === 'gas' ? rho > table.rho_top : rho < table.rho_top) return false
  }
  return false
}

class TemperatureAtPressure implements Objective {
  value = 0
  slope = 0

  constructor(
    private readonly fluid: HelmholtzFluid,
    private readonly p_Pa: number,
    private readonly by: Energy,
    private readonly wanted: number,
    private readonly branch: Branch,
    private readonly out: State,
  ) {}

  evaluate(T_K: number): void {
    const { fluid, p_Pa, by, out } = this
    const { table } = fluid.boundary
    const onSide = this.branch === 'beyond' ? 'liquid' : this.branch
    solveDensity(fluid, T_K, p_Pa, T_K >= table.T_top_K ? 'beyond' : onSide, out)
    this.value = valueOf(out, by) - this.wanted
    this.slope = slopeT(out, by) - (slopeRho(out, by) * out.dpdT_rho_Pa_K) / out.dpdrho_T_Pa_m3_kg
  }
}

/** The slow and sure way: temperature by a bracketed search, density anew at each. */
function nested(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: Energy,
  value: number,
  branch: Branch,
  low: number,
  high: number,
  out: State,
): void {
  const { T_min_K, T_max_K } = fluid.info
  const search = new TemperatureAtPressure(fluid, p_Pa, by, value, branch, out)
  const guess = Math.min(Math.max(start.T_K, low), high)
  const T = monotoneRoot(search, 'rising', low * (1 - 1e-9), high * (1 + 1e-9), guess, 1e-11)
  if (!Number.isNaN(T)) return
  search.evaluate(high)
  const bound = search.value < 0 ? `above ${kelvin(T_max_K)}` : `below ${kelvin(T_min_K)}`
  throw new Problem('range', `at ${bar(p_Pa)} this would be ${fluid.name} ${bound}, which is not worked out here`)
}
