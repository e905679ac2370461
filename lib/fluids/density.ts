import type { Objective } from '@/lib/numerics/roots'
import { monotoneRoot } from '@/lib/numerics/roots'
import { Problem } from '@/lib/errors'
import type { Branch } from './chart'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { setPressure, shift } from './properties'
import { LIQUID, VAPOUR } from './saturation-table'
import { bar, kelvin } from './words'

/** How far a pressure is off at a density: what a search for the density evaluates. */
export class DensityAtPressure implements Objective {
  value = 0
  slope = 0
  p_Pa = 0
  private T_K = 0
  private out!: State

  constructor(private readonly fluid: HelmholtzFluid) {}

  at(T_K: number, p_Pa: number, out: State): void {
    this.T_K = T_K
    this.p_Pa = p_Pa
    this.out = out
  }

  evaluate(rho: number): void {
    const { p_Pa, dpdrho_T_Pa_m3_kg } = this.fluid.singlePhase(this.T_K, rho, this.out)
    this.value = p_Pa - this.p_Pa
    this.slope = dpdrho_T_Pa_m3_kg
  }
}

/** A table's edge may be off by this much, and states on the edge itself have to be found. */
const SLACK = 1e-6

/** Fills the state of one phase at a temperature and pressure. */
export function solveDensity(
  fluid: HelmholtzFluid,
  T_K: number,
  p_Pa: number,
  branch: Branch,
  out: State,
  guess = NaN,
): State {
  const { chart } = fluid
  const { table } = fluid.boundary
  const densest = chart.densest(T_K, branch)
  const low = branch === 'liquid' ? table.rho(LIQUID, T_K) * (1 - SLACK) : 0
  const high = branch === 'gas' ? table.rho(VAPOUR, T_K) * (1 + SLACK) : densest
  const first = guess > low && guess < high ? guess : chart.densityAt(T_K, p_Pa, branch)
  const inside = Math.min(Math.max(first, low * (1 + 2 * SLACK)), high * (1 - 2 * SLACK))
  const search = fluid.densitySearch
  search.at(T_K, p_Pa, out)
  const rho = monotoneRoot(search, 'rising', low, high, inside, 1e-11)
  if (Number.isNaN(rho)) {
    throw branch === 'gas'
      ? new Problem('unconverged', `no density of ${fluid.name} was found at ${bar(p_Pa)} and ${kelvin(T_K)}`)
      : new Problem(
          'state',
          `${fluid.name} is solid at ${kelvin(T_K)} and ${bar(p_Pa)}: its equation does not reach there`,
        )
  }
  shift(out, 0, -search.value / search.slope)
  // of a cold liquid the equation gives a pressure with few digits: the one that was asked for is the better
  setPressure(out, p_Pa)
  fluid.checkFluid(out)
  return out
}
