import { frictionTheory } from './friction-theory'
import type {
  CarbonDioxide2017,
  FreeVolume,
  Hydrogen2013,
  TransportFluid,
  TransportState,
  ViscosityData,
} from './types'

const AVOGADRO_1_MOL = 6.02214129e23
const sum = (n: readonly number[], term: (i: number) => number) =>
  n.reduce((total, coefficient, i) => total + coefficient * term(i), 0)

/** Viscosity of the dilute gas, Pa s. */
export function diluteViscosity(data: ViscosityData, T_K: number): number {
  const { dilute, sigma_m = NaN, epsilonOverK_K = NaN } = data
  switch (dilute.type) {
    case 'collision_integral': {
      const lnT = Math.log(T_K / epsilonOverK_K)
      const S = Math.exp(sum(dilute.a, (i) => lnT ** dilute.t[i]))
      const sigma_nm = 1e9 * sigma_m
      return (dilute.C * Math.sqrt(1000 * dilute.molar_mass_kg_per_mol * T_K)) / (sigma_nm * sigma_nm * S)
    }
    case 'powers':
      return sum(dilute.a, (i) => (T_K / dilute.T_reducing) ** dilute.t[i])
    case 'root_over_powers':
      return (dilute.C * Math.sqrt(T_K)) / sum(dilute.a, (i) => (T_K / dilute.T_reducing) ** dilute.t[i])
    case 'carbon_dioxide_2017': {
      const [a0, a1, a2, a3, a4, a5, a6] = dilute.a
      const third = Math.cbrt(T_K)
      const below =
        a0 +
        a1 * Math.sqrt(third) +
        a2 * Math.exp(a3 * third) +
        (a4 + a5 * third) * Math.exp(-third) +
        a6 * Math.sqrt(T_K)
      return (dilute.factor * Math.sqrt(T_K)) / below
    }
  }
}

/** Viscosity, Pa s, by the fluid's own correlation. */
export function correlatedViscosity(data: ViscosityData, fluid: TransportFluid, state: TransportState): number {
  const { T_K, rho_kg_m3 } = state
  const dilute = diluteViscosity(data, T_K)
  return (
    dilute + dilute * initialDensity(data, T_K) * (rho_kg_m3 / fluid.molarMass_kg_mol) + residual(data, fluid, state)
  )
}

/** The second viscosity virial coefficient after Rainwater and Friend, m³/mol. */
function initialDensity({ initial_density, sigma_m = NaN, epsilonOverK_K = NaN }: ViscosityData, T_K: number): number {
  if (!initial_density) return 0
  return AVOGADRO_1_MOL * sigma_m ** 3 * sum(initial_density.b, (i) => (T_K / epsilonOverK_K) ** initial_density.t[i])
}

function residual({ residual: part }: ViscosityData, fluid: TransportFluid, state: TransportState): number {
  switch (part.type) {
    case 'free_volume':
      return freeVolume(part, state.T_K, state.rho_kg_m3 / fluid.molarMass_kg_mol)
    case 'friction_theory':
      return frictionTheory(part, fluid, state)
    case 'hydrogen_2013':
      return hydrogen(part, state)
    case 'carbon_dioxide_2017':
      return carbonDioxide(part, fluid, state)
  }
}

function freeVolume(part: FreeVolume, T_K: number, rho_mol_m3: number): number {
  const tau = part.T_reducing / T_K
  const D = rho_mol_m3 / part.rho_reducing_mol_per_m3
  const D0 = sum(part.g, (i) => tau ** part.h[i]) / sum(part.p, (i) => tau ** part.q[i])
  const powers = sum(part.n, (i) => D ** part.d[i] * tau ** part.t[i] * Math.exp(part.gamma[i] * D ** part.l[i]))
  return powers + sum(part.f, (i) => D ** part.fd[i] * tau ** part.ft[i]) * (1 / (D0 - D) - 1 / D0)
}

function hydrogen(part: Hydrogen2013, { T_K, rho_kg_m3 }: TransportState): number {
  const Tr = T_K / part.T_reducing
  const r = rho_kg_m3 * part.inverse_rho_reducing_m3_per_kg
  const [c0, c1, c2, c3, c4, c5] = part.c
  return c0 * r * r * Math.exp(c1 * Tr + c2 / Tr + (c3 * r * r) / (c4 + Tr) + c5 * r ** 6)
}

function carbonDioxide(part: CarbonDioxide2017, fluid: TransportFluid, { T_K, rho_kg_m3 }: TransportState): number {
  const Tr = T_K / fluid.T_triple_K
  const r = rho_kg_m3 / part.rho_triple_liquid_kg_per_m3
  const M = fluid.molarMass_kg_mol
  const scale =
    (part.rho_triple_liquid_kg_per_m3 ** (2 / 3) * Math.sqrt(fluid.gasConstant_J_kgK * M * fluid.T_triple_K)) /
    (M ** (1 / 6) * part.divisor)
  return scale * (part.c1 * Tr * r ** 3 + (r * r + r ** part.gamma) / (Tr - part.c2))
}
