import type { ConductivityData, CriticalEnhancement, TransportFluid, TransportState } from './types'

const BOLTZMANN_J_K = 1.3806488e-23
const sum = (n: readonly number[], term: (i: number) => number) =>
  n.reduce((total, coefficient, i) => total + coefficient * term(i), 0)

/** Viscosities that a conductivity is made with, Pa s. */
export interface Viscosities {
  readonly dilute_Pa_s: number
  readonly full_Pa_s: number
}

/** Thermal conductivity, W/(m K), by the fluid's own correlation. */
export function correlatedConductivity(
  data: ConductivityData,
  fluid: TransportFluid,
  state: TransportState,
  viscosities: Viscosities,
): number {
  const critical = data.critical ? enhancement(data.critical, fluid, state, viscosities.full_Pa_s) : 0
  return dilute(data, fluid, state.T_K, viscosities.dilute_Pa_s) + residual(data, fluid, state) + critical
}

function dilute(
  { dilute: part }: ConductivityData,
  fluid: TransportFluid,
  T_K: number,
  viscosity_Pa_s: number,
): number {
  switch (part.type) {
    case 'ratio_of_polynomials': {
      const Tr = T_K / part.T_reducing
      return sum(part.A, (i) => Tr ** part.n[i]) / sum(part.B, (i) => Tr ** part.m[i])
    }
    case 'viscosity_and_powers': {
      const tau = fluid.T_reducing_K / T_K
      return part.A[0] * 1e6 * viscosity_Pa_s + sum(part.A.slice(1), (i) => tau ** part.t[i + 1])
    }
    case 'carbon_dioxide_2016': {
      const tau = fluid.T_reducing_K / T_K
      return 1e-3 / (Math.sqrt(tau) * sum(part.l, (i) => tau ** i))
    }
  }
}

function residual(
  { residual: part }: ConductivityData,
  fluid: TransportFluid,
  { T_K, rho_kg_m3 }: TransportState,
): number {
  if (part.type === 'powers') {
    return sum(
      part.n,
      (i) => (part.T_reducing / T_K) ** part.t[i] * (rho_kg_m3 / part.rho_reducing_kg_per_m3) ** part.d[i],
    )
  }
  const tau = fluid.T_reducing_K / T_K
  const delta = rho_kg_m3 / fluid.rho_reducing_kg_m3
  return sum(part.n, (i) => tau ** part.t[i] * delta ** part.d[i] * Math.exp(-part.gamma[i] * delta ** part.l[i]))
}

/** How much heat the great density fluctuations near the critical point carry besides. */
function enhancement(
  part: CriticalEnhancement,
  fluid: TransportFluid,
  state: TransportState,
  viscosity_Pa_s: number,
): number {
  const { T_K, rho_kg_m3: rho, cp_J_kgK: cp, cv_J_kgK: cv, dpdrho_T_Pa_m3_kg } = state
  const T_ref = part.T_ref_K ?? 1.5 * fluid.T_reducing_K
  const chi = (dpdrho: number) => (part.p_reducing_Pa / fluid.rho_reducing_kg_m3 ** 2) * (rho / dpdrho)
  const excess = chi(dpdrho_T_Pa_m3_kg) - (chi(fluid.dpdrhoAt(T_ref, rho)) * T_ref) / T_K
  if (!(excess > 0)) return 0
  const zeta = part.zeta0_m * (excess / part.Gamma) ** (part.nu / part.gamma)
  const q = part.qD_per_m * zeta
  const delta = rho / fluid.rho_reducing_kg_m3
  const Omega = (2 / Math.PI) * (((cp - cv) / cp) * Math.atan(q) + (cv / cp) * q)
  const Omega0 = (2 / Math.PI) * -Math.expm1(-1 / (1 / q + (q * q) / (3 * delta * delta)))
  return (rho * cp * part.R0 * BOLTZMANN_J_K * T_K * (Omega - Omega0)) / (6 * Math.PI * viscosity_Pa_s * zeta)
}
