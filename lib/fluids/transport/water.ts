import type { Source } from '../equation-data'
import type { TransportFluid, TransportState } from './types'

export const WATER_VISCOSITY: Source = {
  title: 'IAPWS R12-08, Release on the IAPWS Formulation 2008 for the Viscosity of Ordinary Water Substance',
  year: 2008,
}
export const WATER_CONDUCTIVITY: Source = {
  title: 'IAPWS R15-11, Release on the IAPWS Formulation 2011 for the Thermal Conductivity of Ordinary Water Substance',
  year: 2011,
}

const REFERENCE = { T_K: 647.096, rho_kg_m3: 322, p_Pa: 22.064e6, R_J_kgK: 461.51805 }

const H0 = [1.67752, 2.20462, 0.6366564, -0.241605]
/** By the power of (1/T − 1), then of (ρ − 1). */
const H1 = [
  [0.520094, 0.222531, -0.281378, 0.161913, -0.0325372, 0, 0],
  [0.0850895, 0.999115, -0.906851, 0.257399, 0, 0, 0],
  [-1.08374, 1.88797, -0.772479, 0, 0, 0, 0],
  [-0.289555, 1.26613, -0.489837, 0, 0.0698452, 0, -0.00435673],
  [0, 0, -0.25704, 0, 0, 0.00872102, 0],
  [0, 0.120573, 0, 0, 0, 0, -0.000593264],
]
const L0 = [2.443221e-3, 1.323095e-2, 6.770357e-3, -3.454586e-3, 4.096266e-4]
const L1 = [
  [1.60397357, -0.646013523, 0.111443906, 0.102997357, -0.0504123634, 0.00609859258],
  [2.33771842, -2.78843778, 1.53616167, -0.463045512, 0.0832827019, -0.00719201245],
  [2.19650529, -4.54580785, 3.55777244, -1.40944978, 0.275418278, -0.0205938816],
  [-1.21051378, 1.60812989, -0.621178141, 0.0716373224, 0, 0],
  [-2.720337, 4.57586331, -3.18369245, 1.1168348, -0.19268305, 0.012913842],
]

function background(table: readonly (readonly number[])[], Tr: number, rho: number): number {
  const [a, b] = [1 / Tr - 1, rho - 1]
  return Math.exp(
    rho * table.reduce((sum, row, i) => sum + a ** i * row.reduce((inner, h, j) => inner + h * b ** j, 0), 0),
  )
}

/** Viscosity without its critical enhancement, in µPa s. */
export function waterViscosityBackground(T_K: number, rho_kg_m3: number): number {
  const Tr = T_K / REFERENCE.T_K
  const dilute = (100 * Math.sqrt(Tr)) / H0.reduce((sum, h, i) => sum + h / Tr ** i, 0)
  return dilute * background(H1, Tr, rho_kg_m3 / REFERENCE.rho_kg_m3)
}

/** Viscosity, Pa s. */
export function waterViscosity(fluid: TransportFluid, state: TransportState): number {
  return (
    1e-6 *
    waterViscosityBackground(state.T_K, state.rho_kg_m3) *
    viscosityEnhancement(correlationLength_nm(fluid, state))
  )
}

/** How far density fluctuations reach, nm; zero away from the critical point. */
function correlationLength_nm(fluid: TransportFluid, { T_K, rho_kg_m3, dpdrho_T_Pa_m3_kg }: TransportState): number {
  const Tr = T_K / REFERENCE.T_K
  const rho = rho_kg_m3 / REFERENCE.rho_kg_m3
  const susceptibility = (dpdrho: number) => REFERENCE.p_Pa / (REFERENCE.rho_kg_m3 * dpdrho)
  const excess =
    rho *
    (susceptibility(dpdrho_T_Pa_m3_kg) - (susceptibility(fluid.dpdrhoAt(1.5 * REFERENCE.T_K, rho_kg_m3)) * 1.5) / Tr)
  return excess > 0 ? 0.13 * (excess / 0.06) ** (0.63 / 1.239) : 0
}

function viscosityEnhancement(xi_nm: number): number {
  const qC = xi_nm / 1.9
  const qD = xi_nm / 1.1
  if (xi_nm === 0) return 1
  return Math.exp(
    0.068 *
      (xi_nm <= 0.3817016416 ? (qC / 5) * qD ** 5 * (1 - qC + qC * qC - (765 / 504) * qD * qD) : crossover(qC, qD)),
  )
}

function crossover(qC: number, qD: number): number {
  const psi = Math.acos(1 / Math.sqrt(1 + qD * qD))
  const w = Math.sqrt(Math.abs((qC - 1) / (qC + 1))) * Math.tan(psi / 2)
  const L = qC > 1 ? Math.log((1 + w) / (1 - w)) : 2 * Math.atan(Math.abs(w))
  const q2 = qC * qC
  return (
    Math.sin(3 * psi) / 12 -
    Math.sin(2 * psi) / (4 * qC) +
    ((1 - 1.25 * q2) * Math.sin(psi)) / q2 -
    ((1 - 1.5 * q2) * psi - Math.abs(q2 - 1) ** 1.5 * L) / (q2 * qC)
  )
}

/** Thermal conductivity without its critical enhancement, W/(m K). */
export function waterConductivityBackground(T_K: number, rho_kg_m3: number): number {
  const Tr = T_K / REFERENCE.T_K
  const dilute = Math.sqrt(Tr) / L0.reduce((sum, l, i) => sum + l / Tr ** i, 0)
  return 1e-3 * dilute * background(L1, Tr, rho_kg_m3 / REFERENCE.rho_kg_m3)
}

/** Thermal conductivity, W/(m K). */
export function waterConductivity(fluid: TransportFluid, state: TransportState): number {
  const { T_K, rho_kg_m3, cp_J_kgK, cv_J_kgK } = state
  const rho = rho_kg_m3 / REFERENCE.rho_kg_m3
  const y = correlationLength_nm(fluid, state) / 0.4
  const base = waterConductivityBackground(T_K, rho_kg_m3)
  if (y < 1.2e-7) return base
  const k = cv_J_kgK / cp_J_kgK
  const Z =
    (2 / (Math.PI * y)) * ((1 - k) * Math.atan(y) + k * y + Math.expm1(-1 / (1 / y + (y * y) / (3 * rho * rho))))
  const viscosity = 1e6 * waterViscosity(fluid, state)
  return base + (1e-3 * 177.8514 * rho * (cp_J_kgK / REFERENCE.R_J_kgK) * (T_K / REFERENCE.T_K) * Z) / viscosity
}
