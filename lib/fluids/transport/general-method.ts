import type { TransportFluid, TransportState } from './types'

/*
 * The general method of T.-H. Chung, M. Ajlan, L. L. Lee, K. E. Starling, Ind. Eng. Chem. Res. 27 (1988) 671, for fluids
 * without a correlation of their own; non-polar form. Its authors state 5 to 8 % for dense fluids of moderate size;
 * quantum gases and strongly polar fluids fare worse.
 */
const VISCOSITY = [
  [6.324, 50.412],
  [1.21e-3, -1.154e-3],
  [5.283, 254.209],
  [6.623, 38.096],
  [19.745, 7.63],
  [-1.9, -12.537],
  [24.275, 3.45],
  [0.7972, 1.117],
  [-0.2382, 0.0677],
  [0.06863, 0.3479],
] as const

const CONDUCTIVITY = [
  [2.4166, 0.74824],
  [-0.50924, -1.5094],
  [6.6107, 5.6207],
  [14.543, -8.9139],
  [0.79274, 0.82019],
  [-5.8634, 12.801],
  [91.089, 128.11],
] as const

const R_J_molK = 8.314462618

const coefficients = (table: readonly (readonly [number, number])[], omega: number) =>
  table.map(([a, b]) => a + b * omega)

/** Figures that both properties are made of. */
function scales(fluid: TransportFluid, T_K: number) {
  const V_cm3_mol = (fluid.molarMass_kg_mol / fluid.rho_critical_kg_m3) * 1e6
  const M_g_mol = fluid.molarMass_kg_mol * 1e3
  return { V_cm3_mol, M_g_mol, Tr: T_K / fluid.T_critical_K }
}

/** Viscosity of the dilute gas, Pa s. */
export function generalDiluteViscosity(fluid: TransportFluid, T_K: number): number {
  const { V_cm3_mol, M_g_mol, Tr } = scales(fluid, T_K)
  const Ts = 1.2593 * Tr
  const Omega = 1.16145 * Ts ** -0.14874 + 0.52487 * Math.exp(-0.7732 * Ts) + 2.16178 * Math.exp(-2.43787 * Ts)
  return (4.0785e-6 * (1 - 0.2756 * fluid.acentricFactor) * Math.sqrt(M_g_mol * T_K)) / (V_cm3_mol ** (2 / 3) * Omega)
}

/** Viscosity, Pa s. */
export function generalViscosity(fluid: TransportFluid, { T_K, rho_kg_m3 }: TransportState): number {
  const { V_cm3_mol, M_g_mol, Tr } = scales(fluid, T_K)
  const E = coefficients(VISCOSITY, fluid.acentricFactor)
  const y = rho_kg_m3 / fluid.rho_critical_kg_m3 / 6
  const G2 = denseFactor(E, y)
  const Ts = 1.2593 * Tr
  const dense = E[6] * y * y * G2 * Math.exp(E[7] + E[8] / Ts + E[9] / (Ts * Ts))
  const densePart = (3.6344e-6 * Math.sqrt(M_g_mol * fluid.T_critical_K) * dense) / V_cm3_mol ** (2 / 3)
  return generalDiluteViscosity(fluid, T_K) * (1 / G2 + E[5] * y) + densePart
}

/** Thermal conductivity, W/(m K). */
export function generalConductivity(fluid: TransportFluid, { T_K, rho_kg_m3 }: TransportState): number {
  const { V_cm3_mol, Tr } = scales(fluid, T_K)
  const omega = fluid.acentricFactor
  const B = coefficients(CONDUCTIVITY, omega)
  const y = rho_kg_m3 / fluid.rho_critical_kg_m3 / 6
  const alpha = fluid.idealCp_J_kgK(T_K) / fluid.gasConstant_J_kgK - 1 - 1.5
  const beta = 0.7862 - 0.7109 * omega + 1.3168 * omega * omega
  const Z = 2 + 10.5 * Tr * Tr
  const psi =
    1 + (alpha * (0.215 + 0.28288 * alpha - 1.061 * beta + 0.26665 * Z)) / (0.6366 + beta * Z + 1.061 * alpha * beta)
  const G2 = denseFactor(B, y)
  // 31.2 / M and 3.586e-3 √(Tc/M), with M in kg/mol
  const dilute = ((3.75 * R_J_molK) / fluid.molarMass_kg_mol) * generalDiluteViscosity(fluid, T_K) * psi
  const q = (3.586e-3 * Math.sqrt(fluid.T_critical_K / fluid.molarMass_kg_mol)) / V_cm3_mol ** (2 / 3)
  return dilute * (1 / G2 + B[5] * y) + q * B[6] * y * y * Math.sqrt(Tr) * G2
}

function denseFactor(E: readonly number[], y: number): number {
  if (y < 1e-12) return 1
  const G1 = (1 - 0.5 * y) / (1 - y) ** 3
  const top = (E[0] * -Math.expm1(-E[3] * y)) / y + E[1] * G1 * Math.exp(E[4] * y) + E[2] * G1
  return top / (E[0] * E[3] + E[1] + E[2])
}
