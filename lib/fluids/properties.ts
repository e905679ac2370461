import type { State } from './fluid'
import type { HelmholtzEnergy } from './helmholtz'

/** The figures that turn a reduced Helmholtz energy into properties per kilogram. */
export interface Scales {
  readonly T_reducing_K: number
  readonly rho_reducing_kg_m3: number
  readonly R_J_kgK: number
}

/** Evaluates the equation at a temperature and density. */
export function evaluateAt(alpha: HelmholtzEnergy, scales: Scales, T_K: number, rho_kg_m3: number): void {
  alpha.evaluate(scales.T_reducing_K / T_K, rho_kg_m3 / scales.rho_reducing_kg_m3)
}

export const pressureOf = ({ A01 }: HelmholtzEnergy, { R_J_kgK }: Scales, T_K: number, rho: number) =>
  rho * R_J_kgK * T_K * (1 + A01)
export const dpdrhoOf = ({ A01, A02 }: HelmholtzEnergy, { R_J_kgK }: Scales, T_K: number) =>
  R_J_kgK * T_K * (1 + 2 * A01 + A02)
export const dpdTOf = ({ A01, A11 }: HelmholtzEnergy, { R_J_kgK }: Scales, rho: number) =>
  rho * R_J_kgK * (1 + A01 - A11)

/** All properties of one phase, from the evaluation at hand. Phase and evaluations are for the caller to set. */
export function fillSinglePhase(out: State, alpha: HelmholtzEnergy, scales: Scales, T_K: number, rho: number): State {
  const { R_J_kgK: R } = scales
  const { A00, A10, A01, A20, A11, A02, B0, B1, B2 } = alpha
  const dpdT = 1 + A01 - A11
  const dpdrho = 1 + 2 * A01 + A02
  const cv = -(B2 + A20)
  out.T_K = T_K
  out.rho_kg_m3 = rho
  out.p_Pa = rho * R * T_K * (1 + A01)
  out.u_J_kg = R * T_K * (B1 + A10)
  out.h_J_kg = R * T_K * (1 + B1 + A10 + A01)
  out.s_J_kgK = R * (B1 + A10 - B0 - A00)
  out.cv_J_kgK = R * cv
  out.cp_J_kgK = R * (cv + (dpdT * dpdT) / dpdrho)
  out.w_m_s = Math.sqrt(R * T_K * (dpdrho + (dpdT * dpdT) / cv))
  out.x = NaN
  out.dpdT_rho_Pa_K = rho * R * dpdT
  out.dpdrho_T_Pa_m3_kg = R * T_K * dpdrho
  return out
}

/** Moves a state of one phase to first order in temperature and density: for steps of 1e-9 and less. */
export function shift(state: State, dT: number, drho: number): void {
  const { T_K: T, rho_kg_m3: rho, p_Pa: p, cv_J_kgK: cv, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho } = state
  state.T_K = T + dT
  state.rho_kg_m3 = rho + drho
  state.p_Pa = p + dpdT * dT + dpdrho * drho
  state.u_J_kg += cv * dT + ((p - T * dpdT) / (rho * rho)) * drho
  state.s_J_kgK += (cv / T) * dT - (dpdT / (rho * rho)) * drho
  state.h_J_kg = state.u_J_kg + state.p_Pa / state.rho_kg_m3
}

/** Gives a state the pressure that is known better than the equation gives it. */
export function setPressure(state: State, p_Pa: number): void {
  state.p_Pa = p_Pa
  state.h_J_kg = state.u_J_kg + p_Pa / state.rho_kg_m3
}

/** Vapour and liquid side by side, mixed and in equilibrium, at a quality between 0 and 1. */
export function fillTwoPhase(out: State, liquid: State, vapour: State, x: number): State {
  const [vl, vv] = [1 / liquid.rho_kg_m3, 1 / vapour.rho_kg_m3]
  const T = liquid.T_K
  const v = vl + x * (vv - vl)
  out.T_K = T
  out.p_Pa = vapour.p_Pa
  out.rho_kg_m3 = 1 / v
  out.u_J_kg = liquid.u_J_kg + x * (vapour.u_J_kg - liquid.u_J_kg)
  out.h_J_kg = liquid.h_J_kg + x * (vapour.h_J_kg - liquid.h_J_kg)
  out.s_J_kgK = liquid.s_J_kgK + x * (vapour.s_J_kgK - liquid.s_J_kgK)
  // Clapeyron: the slope of the saturation curve
  const slope = (vapour.s_J_kgK - liquid.s_J_kgK) / (vv - vl)
  const [l, g] = [alongSaturation(liquid, slope), alongSaturation(vapour, slope)]
  const dxdT = -(l.dv + x * (g.dv - l.dv)) / (vv - vl)
  const cv = l.du + x * (g.du - l.du) + dxdT * (vapour.u_J_kg - liquid.u_J_kg)
  out.cv_J_kgK = cv
  out.cp_J_kgK = Infinity
  out.w_m_s = v * slope * Math.sqrt(T / cv)
  out.x = x
  out.dpdT_rho_Pa_K = slope
  out.dpdrho_T_Pa_m3_kg = 0
  out.phase = 'two-phase'
  return out
}

/** How specific volume and internal energy of one phase change with temperature along the saturation curve. */
function alongSaturation(phase: State, slope: number): { readonly dv: number; readonly du: number } {
  const { rho_kg_m3: rho, T_K: T, p_Pa: p, dpdT_rho_Pa_K: dpdT, dpdrho_T_Pa_m3_kg: dpdrho, cv_J_kgK: cv } = phase
  const dv = -(slope - dpdT) / (dpdrho * rho * rho)
  return { dv, du: cv + (T * dpdT - p) * dv }
}
