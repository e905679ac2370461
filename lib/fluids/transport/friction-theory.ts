import type { FrictionTheory, TransportFluid, TransportState } from './types'

/**
 * Residual viscosity by friction theory, Pa s (S. E. Quiñones-Cisneros, U. K. Deiters, J. Phys. Chem. B 110 (2006) 12820):
 * attractive and repulsive pressure rub, each with its own coefficient. Pressures in bar.
 */
export function frictionTheory(
  part: FrictionTheory,
  { gasConstant_J_kgK: R }: TransportFluid,
  state: TransportState,
): number {
  const { T_K, rho_kg_m3, p_Pa, dpdT_rho_Pa_K } = state
  const tau = part.T_reducing / T_K
  const psi1 = Math.exp(tau) - part.c1
  const psi2 = Math.exp(tau * tau) - part.c2
  const k = (A: readonly number[] | undefined, N: number | undefined) =>
    A && N !== undefined ? (A[0] + A[1] * psi1 + A[2] * psi2) * tau ** N : 0

  const repulsive = (T_K * dpdT_rho_Pa_K) / 1e5
  const attractive = p_Pa / 1e5 - repulsive
  const ideal = (rho_kg_m3 * R * T_K) / 1e5
  const excess = repulsive - ideal
  const squareRepulsive = part.Arr ? k(part.Arr, part.Nrr) * repulsive ** 2 : k(part.Adrdr, part.Nrr) * excess ** 2
  return (
    k(part.Aa, part.Na) * attractive +
    k(part.Ar, part.Nr) * excess +
    k(part.Ai, 1) * ideal +
    k(part.Aaa, part.Naa) * attractive ** 2 +
    squareRepulsive +
    k(part.Aii, part.Nii) * ideal ** 2 +
    k(part.Arrr, part.Nrrr) * repulsive ** 3 +
    k(part.Aaaa, part.Naaa) * attractive ** 3
  )
}
