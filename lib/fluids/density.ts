import { Problem } from '@/lib/errors'
import { monotoneRoot } from '@/lib/numerics/monotone'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { dpdrhoOf, evaluateAt, pressureOf } from './properties'
import { bar, kelvin } from './words'

/** Liquids at the highest pressures of any fluid here are within this many critical densities. */
export const DENSEST = 8

/** On which side of the two-phase region, or past it. */
export type Branch = 'gas' | 'liquid' | 'beyond'

/** Where a branch meets the two-phase region. */
export interface Edge {
  readonly rho: number
  readonly p_Pa: number
}

/**
 * The density at a temperature and pressure on one branch, where the pressure rises with it. Edges of the branch, kg/m³,
 * bound the search where they are known.
 */
export function densityAt(
  fluid: HelmholtzFluid,
  T_K: number,
  p_Pa: number,
  branch: Branch,
  edge?: Edge,
  guess?: number,
): number {
  const { alpha, scales, info } = fluid
  const rho_critical = info.critical!.rho_kg_m3
  const ideal = p_Pa / (scales.R_J_kgK * T_K)
  // past an edge by a hair: the edge itself has to be found too
  const low = branch === 'liquid' ? (edge ? edge.rho * (1 - 1e-7) : rho_critical) : 0
  const high = branch === 'gas' ? (edge ? edge.rho * (1 + 1e-7) : rho_critical) : DENSEST * rho_critical
  const first =
    guess ??
    (branch === 'gas'
      ? gasGuess(ideal, edge, p_Pa, scales.R_J_kgK * T_K)
      : branch === 'liquid'
        ? (edge?.rho ?? 2.7 * rho_critical)
        : Math.min(ideal, 2 * rho_critical))
  const rho = monotoneRoot(
    (rho, at) => {
      evaluateAt(alpha, scales, T_K, rho)
      at.value = pressureOf(alpha, scales, T_K, rho) - p_Pa
      at.slope = dpdrhoOf(alpha, scales, T_K)
    },
    { low, high, guess: first, tolerance: 1e-9, most: 100 },
  )
  if (Number.isFinite(rho)) return rho
  throw new Problem('unconverged', `no density of ${fluid.name} was found at ${bar(p_Pa)} and ${kelvin(T_K)}`)
}

/** From a compressibility factor that falls straight from 1 at no pressure to that of the saturated vapour. */
function gasGuess(ideal: number, edge: Edge | undefined, p_Pa: number, RT: number): number {
  if (!edge) return ideal
  const Z_edge = edge.p_Pa / (edge.rho * RT)
  return ideal / (1 + (Z_edge - 1) * (p_Pa / edge.p_Pa))
}
