import { Problem } from '@/lib/errors'
import type { Objective } from '@/lib/numerics/roots'
import { monotoneRoot } from '@/lib/numerics/roots'
import type { Start } from './chart'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase, shift } from './properties'
import { LIQUID, VAPOUR } from './saturation-table'
import type { Side } from './saturation-table'
import { kelvin, perCubicMetre } from './words'

const start: Start = { T_K: 0, rho: 0, T_low_K: 0 }

type By = 'u' | 'h' | 'p'

const valueOf = (state: State, by: By) => (by === 'u' ? state.u_J_kg : by === 'h' ? state.h_J_kg : state.p_Pa)

/** How the value rises with temperature at constant density; the same relation holds in one phase and in two. */
function slopeOf(state: State, by: By): number {
  const { cv_J_kgK: cv, dpdT_rho_Pa_K: dpdT, rho_kg_m3: rho } = state
  return by === 'u' ? cv : by === 'h' ? cv + dpdT / rho : dpdT
}

/**
 * The state at a density and an energy or a pressure. At constant density all three rise with temperature, through the
 * two-phase region and out of it. Where a liquid contracts on warming (water below 4 °C) a pressure has two answers: the
 * warmer is taken.
 */
export function flashAtDensity(
  fluid: HelmholtzFluid,
  rho: number,
  by: By,
  value: number,
  out: State,
  guess?: State,
): State {
  fluid.checkDensity(rho)
  if (by === 'p') fluid.checkPressure(value)
  const { boundary, info } = fluid
  const { table } = boundary
  const side: Side = rho < table.rho_top ? VAPOUR : LIQUID
  const T_edge = table.T_atDensity(side, rho)
  let low = info.T_min_K
  if (!Number.isNaN(T_edge)) {
    low = T_edge
    const hair = 1e-10 * fluid.scales.R_J_kgK * T_edge * (by === 'p' ? rho : 1)
    // next to the critical point the table is less sharp than the equation
    let edge = edgeValue(fluid, side, T_edge, rho, by)
    const isClose = Math.abs(value - edge) < 1e8 * hair
    if (isClose && isNearTop(fluid, T_edge)) edge = valueOf(fluid.singlePhase(T_edge, rho, out), by)
    if (value < edge - hair) return belowEdge(fluid, rho, by, value, T_edge, out)
  }
  const near = guess && guess.phase !== 'two-phase' ? temperatureNear(guess, rho, by, value) : NaN
  let first = near
  if (!(near >= low && near <= info.T_max_K)) {
    fluid.chart.atDensity(rho, by, value, T_edge, start)
    first = start.T_K
    low = Math.max(low, start.T_low_K)
  }
  const search = new TemperatureAtDensity(fluid, rho, by, value, out)
  if (by === 'p' && side === LIQUID && Number.isNaN(T_edge)) low = warmBranch(search, low, first)
  const slack = isNearTop(fluid, low) ? 1e-5 : 1e-8
  const T = monotoneRoot(search, 'rising', low * (1 - slack), info.T_max_K * (1 + 1e-8), first, 5e-10)
  if (Number.isNaN(T)) throw outside(fluid, rho, by, value, out)
  shift(out, -search.value / search.slope, 0)
  fluid.checkTemperature(out.T_K)
  if (out.p_Pa > info.p_max_Pa) fluid.checkPressure(out.p_Pa)
  fluid.checkFluid(out)
  return out
}

/** Where a neighbour's own derivatives lead to first order. */
function temperatureNear(guess: State, rho: number, by: By, value: number): number {
  const { T_K: T, rho_kg_m3: rho0, p_Pa: p, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho } = guess
  const du = (p - T * dpdT) / (rho0 * rho0)
  const drho = by === 'p' ? dpdrho : by === 'u' ? du : dpdrho / rho0 - (T * dpdT) / (rho0 * rho0)
  const next = T + (value - valueOf(guess, by) - drho * (rho - rho0)) / slopeOf(guess, by)
  return Math.abs(next - T) < 0.2 * T ? next : NaN
}

class TemperatureAtDensity implements Objective {
  value = 0
  slope = 0

  constructor(
    private readonly fluid: HelmholtzFluid,
    private readonly rho: number,
    private readonly by: By,
    private readonly wanted: number,
    private readonly out: State,
  ) {}

  evaluate(T_K: number): void {
    this.fluid.singlePhase(T_K, this.rho, this.out)
    this.value = valueOf(this.out, this.by) - this.wanted
    this.slope = slopeOf(this.out, this.by)
  }
}

/** From where up the pressure rises with temperature: the lower end, unless the liquid contracts on warming there. */
function warmBranch(search: TemperatureAtDensity, T_low: number, T_first: number): number {
  if (T_first > 1.1 * T_low) return T_low
  search.evaluate(T_low)
  if (search.slope >= 0) return T_low
  let [low, high] = [T_low, 1.1 * T_low]
  while (high - low > 1e-9 * high) {
    const middle = (low + high) / 2
    search.evaluate(middle)
    if (search.slope < 0) low = middle
    else high = middle
  }
  return high
}

const isNearTop = (fluid: HelmholtzFluid, T_K: number) => Math.abs(T_K / fluid.boundary.table.T_top_K - 1) < 1e-3

function edgeValue(fluid: HelmholtzFluid, side: Side, T_K: number, rho: number, by: By): number {
  const { table } = fluid.boundary
  const p = table.p_Pa(side, T_K)
  return by === 'p' ? p : table.u_J_kg(side, T_K) + (by === 'h' ? p / rho : 0)
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

/** Colder than where the density leaves the two-phase region: two phases, or cold water that is denser than its edge. */
function belowEdge(fluid: HelmholtzFluid, rho: number, by: By, value: number, T_edge: number, out: State): State {
  const { boundary } = fluid
  const { table, T_low_K } = boundary
  boundary.checkEquilibrium()
  const onTable = new TableAtDensity(fluid, rho, by, value)
  onTable.evaluate(T_low_K)
  const lowest = onTable.value - 1e-9 * fluid.scales.R_J_kgK * T_low_K * (by === 'p' ? rho : 1)
  const T_guess = monotoneRoot(
    onTable,
    'rising',
    T_low_K * (1 - 1e-9),
    T_edge,
    T_low_K + 0.7 * (T_edge - T_low_K),
    1e-11,
  )
  if (Number.isNaN(T_guess) && lowest > 0) {
    throw new Problem(
      'range',
      `at ${perCubicMetre(rho)} this would be ${fluid.name} below its triple point, ${kelvin(T_low_K)}, which is not worked out here`,
    )
  }
  let T = Number.isNaN(T_guess)
    ? onTable.value < 0
      ? T_edge
      : T_low_K
    : Math.min(T_guess - onTable.value / onTable.slope, T_edge)
  if (rho >= table.rho(LIQUID, T)) {
    const search = new TemperatureAtDensity(fluid, rho, by, value, out)
    const found = monotoneRoot(search, 'rising', T_low_K * (1 - 1e-9), T_edge, T, 1e-10)
    if (!Number.isNaN(found)) {
      shift(out, -search.value / search.slope, 0)
      return out
    }
  }
  for (let i = 0; i < 10; i++) {
    const { liquid, vapour } = boundary.solveAt(T)
    mix(liquid, vapour, rho, out)
    const step = (value - valueOf(out, by)) / slopeOf(out, by)
    if (!(Math.abs(step) < 0.01 * T)) break
    if (Math.abs(step) < 1e-9 * T) {
      boundary.moveAlong(liquid, vapour, step)
      mix(liquid, vapour, rho, out)
      break
    }
    T = Math.min(T + step, table.T_top_K)
  }
  return out
}

function mix(liquid: State, vapour: State, rho: number, out: State): void {
  const [vl, vv] = [1 / liquid.rho_kg_m3, 1 / vapour.rho_kg_m3]
  fillTwoPhase(out, liquid, vapour, Math.min(1, Math.max(0, (1 / rho - vl) / (vv - vl))))
}

/** The same search on the table alone, which costs no evaluation of the equation. */
class TableAtDensity implements Objective {
  value = 0
  slope = 0

  constructor(
    private readonly fluid: HelmholtzFluid,
    private readonly rho: number,
    private readonly by: By,
    private readonly wanted: number,
  ) {}

  evaluate(T_K: number): void {
    // backward, since there is no edge above the top
    const h = 1e-6 * T_K
    const here = this.at(T_K)
    this.value = here - this.wanted
    this.slope = (here - this.at(T_K - h)) / h
  }

  private at(T_K: number): number {
    const { rho, by } = this
    const { table } = this.fluid.boundary
    const p = table.p_Pa(VAPOUR, T_K)
    if (by === 'p') return p
    const [vl, vv] = [1 / table.rho(LIQUID, T_K), 1 / table.rho(VAPOUR, T_K)]
    const x = (1 / rho - vl) / (vv - vl)
    const [ul, uv] = [table.u_J_kg(LIQUID, T_K), table.u_J_kg(VAPOUR, T_K)]
    return ul + x * (uv - ul) + (by === 'h' ? p / rho : 0)
  }
}
