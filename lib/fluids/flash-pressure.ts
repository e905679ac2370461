import { Problem } from '@/lib/errors'
import { monotoneRoot } from '@/lib/numerics/monotone'
import { densityAt } from './density'
import type { Branch, Edge } from './density'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { bar, kelvin } from './words'

type By = 'h' | 's' | 'u'

const valueOf = (state: State, by: By) => (by === 'h' ? state.h_J_kg : by === 's' ? state.s_J_kgK : state.u_J_kg)

/** How the value changes with temperature at constant density, and with density at constant temperature. */
function partials(state: State, by: By): readonly [dT: number, drho: number] {
  const { T_K: T, rho_kg_m3: rho, p_Pa: p, cv_J_kgK: cv, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho } = state
  const du = (p - T * dpdT) / (rho * rho)
  switch (by) {
    case 'u':
      return [cv, du]
    case 's':
      return [cv / T, -dpdT / (rho * rho)]
    case 'h':
      return [cv + dpdT / rho, du + dpdrho / rho - p / (rho * rho)]
  }
}

/** How the value rises with temperature at constant pressure. */
function slopeOf(state: State, by: By): number {
  const [dT, drho] = partials(state, by)
  return dT - (drho * state.dpdT_rho_Pa_K) / state.dpdrho_T_Pa_m3_kg
}

/** The stretch of temperatures in which a state is looked for, and where it starts. */
interface Stretch {
  readonly branch: Branch
  readonly low: number
  readonly high: number
  readonly T: number
  readonly rho: number
}

/** The state at a pressure and an enthalpy, an entropy or an internal energy. */
export function flashAtPressure(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: By,
  value: number,
  out: State,
  guess?: State,
): State {
  fluid.checkPressure(p_Pa)
  const edges = fluid.boundary.edgesAtP(p_Pa)
  if (edges) {
    const { liquid, vapour } = edges
    const [yl, yv] = [valueOf(liquid, by), valueOf(vapour, by)]
    if (value >= yl && value <= yv) return fluid.boundary.mixed(liquid, vapour, (value - yl) / (yv - yl), out)
  }
  const stretch = stretchFor(fluid, p_Pa, by, value, edges, guess)
  if (!newton(fluid, p_Pa, by, value, stretch, out)) nested(fluid, p_Pa, by, value, stretch, out)
  fluid.checkTemperature(out.T_K)
  out.p_Pa = p_Pa
  return out
}

function stretchFor(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: By,
  value: number,
  edges: { readonly liquid: State; readonly vapour: State } | null,
  guess: State | undefined,
): Stretch {
  const { T_min_K, T_max_K, critical } = fluid.info
  const R = fluid.scales.R_J_kgK
  const known = guess && guess.phase !== 'two-phase' ? guess : undefined
  if (!edges) {
    const T = known?.T_K ?? Math.min(Math.max(1.3 * critical!.T_K, T_min_K), T_max_K)
    const gas = p_Pa < critical!.p_Pa
    return {
      branch: gas ? 'gas' : 'beyond',
      low: T_min_K,
      high: T_max_K,
      T,
      rho: known?.rho_kg_m3 ?? Math.min(p_Pa / (R * T), 2 * critical!.rho_kg_m3),
    }
  }
  const { liquid, vapour } = edges
  if (value < valueOf(liquid, by)) {
    const T = known?.T_K ?? Math.max(T_min_K, liquid.T_K + (value - valueOf(liquid, by)) / slopeOf(liquid, by))
    return { branch: 'liquid', low: T_min_K, high: liquid.T_K, T, rho: known?.rho_kg_m3 ?? liquid.rho_kg_m3 }
  }
  const T = known?.T_K ?? Math.min(T_max_K, vapour.T_K + (value - valueOf(vapour, by)) / slopeOf(vapour, by))
  return {
    branch: 'gas',
    low: vapour.T_K,
    high: T_max_K,
    T,
    rho: known?.rho_kg_m3 ?? (vapour.rho_kg_m3 * vapour.T_K) / T,
  }
}

/** Newton's method in temperature and density at once; false where it leaves its stretch or does not settle. */
function newton(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: By,
  value: number,
  { branch, low, high, T: T0, rho: rho0 }: Stretch,
  out: State,
): boolean {
  const { rho_kg_m3: rho_critical, T_K: T_critical } = fluid.info.critical!
  let [T, rho] = [T0, rho0]
  for (let i = 0; i < 25; i++) {
    fluid.singlePhase(T, rho, out)
    const { dpdT_rho_Pa_K: pT, dpdrho_T_Pa_m3_kg: pRho } = out
    // inside the spinodal Newton's method points the wrong way
    if (!(pRho > 0)) return false
    const [yT, yRho] = partials(out, by)
    const [rp, ry] = [out.p_Pa - p_Pa, valueOf(out, by) - value]
    const determinant = pT * yRho - pRho * yT
    const stepT = (rp * yRho - ry * pRho) / -determinant
    const stepRho = (pT * ry - yT * rp) / -determinant
    if (!Number.isFinite(stepT) || !Number.isFinite(stepRho)) return false
    const shrink = Math.max(1, (3 * Math.abs(stepT)) / T, (2 * Math.abs(stepRho)) / rho)
    T += stepT / shrink
    rho += stepRho / shrink
    const strayed =
      T < low * (1 - 1e-6) ||
      T > high * (1 + 1e-6) ||
      (T < T_critical && (branch === 'gas' ? rho > rho_critical : branch === 'liquid' && rho < rho_critical))
    if (strayed) return false
    if (Math.abs(stepT) < 1e-9 * T && Math.abs(stepRho) < 1e-9 * rho) {
      fluid.singlePhase(T, rho, out)
      return true
    }
  }
  return false
}

/** The slow and sure way: temperature by a bracketed search, density anew at each. */
function nested(
  fluid: HelmholtzFluid,
  p_Pa: number,
  by: By,
  value: number,
  { branch, low, high }: Stretch,
  out: State,
): void {
  const T = monotoneRoot(
    (T, at) => {
      fluid.singlePhase(T, densityOn(fluid, T, p_Pa, branch), out)
      at.value = valueOf(out, by) - value
      at.slope = slopeOf(out, by)
    },
    { low: low * (1 - 1e-9), high: high * (1 + 1e-9), guess: (low + high) / 2, tolerance: 1e-11, most: 120 },
  )
  const found = Number.isFinite(T) && T > low * (1 - 1e-8) && T < high * (1 + 1e-8)
  if (found) fluid.singlePhase(T, densityOn(fluid, T, p_Pa, branch), out)
  if (
    !found ||
    Math.abs(valueOf(out, by) - value) > 1e-6 * (Math.abs(value) + out.cp_J_kgK * (by === 's' ? 1 : out.T_K))
  ) {
    const { T_min_K, T_max_K } = fluid.info
    const hot = value > valueOf(fluid.singlePhase(T_max_K, densityOn(fluid, T_max_K, p_Pa, 'beyond'), out), by)
    const bound = hot ? `above ${kelvin(T_max_K)}` : `below ${kelvin(T_min_K)}`
    throw new Problem('range', `at ${bar(p_Pa)} this would be ${fluid.name} ${bound}, which is not worked out here`)
  }
}

function densityOn(fluid: HelmholtzFluid, T_K: number, p_Pa: number, branch: Branch): number {
  if (T_K >= fluid.boundary.T_top_K) return densityAt(fluid, T_K, p_Pa, 'beyond')
  const { liquid, vapour } = fluid.boundary.edgesAtT(Math.max(T_K, fluid.info.triple!.T_K))
  const side = branch === 'beyond' ? (p_Pa <= vapour.p_Pa ? 'gas' : 'liquid') : branch
  const edge = side === 'gas' ? vapour : liquid
  const bound: Edge = { rho: edge.rho_kg_m3, p_Pa: edge.p_Pa }
  return densityAt(fluid, T_K, p_Pa, side, bound)
}
