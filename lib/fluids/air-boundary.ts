import { monotoneRoot } from '@/lib/numerics/roots'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { DensityAtPressure } from './density'
import { shift } from './properties'
import { LIQUID, SaturationTable, VAPOUR } from './saturation-table'
import type { Side } from './saturation-table'

/**
 * Bubble and dew pressure of air, from the paper of its equation of state (E. W. Lemmon, R. T Jacobsen, S. G. Penoncello,
 * D. G. Friend, J. Phys. Chem. Ref. Data 29 (2000) 331). Between the two air is in two phases of different composition, which
 * the equation does not describe.
 */
const BUBBLE = { n: [0.2260724, -7.080499, 5.700283, -12.44017, 17.81926, -10.81364], t: [0.5, 1, 1.5, 2, 2.5, 3] }
const DEW = { n: [-0.1567266, -5.539635, 0.7567212, -3.514322], t: [0.5, 1, 2.5, 4] }

/** Highest temperature and pressure of the two-phase region. */
const TOP = { T_K: 132.6312, p_Pa: 3_785_020 }

/** The coldest liquid's density in units of that at the top, roughly: to begin with. */
const FIRST_LIQUID = 3.2

function pressure_Pa({ n, t }: typeof BUBBLE, T_K: number): number {
  const off = Math.max(0, 1 - T_K / TOP.T_K)
  const sum = n.reduce((so, coefficient, i) => so + coefficient * off ** t[i], 0)
  return TOP.p_Pa * Math.exp((TOP.T_K / T_K) * sum)
}

/** The edges of air's two-phase region: the paper's pressures, with the densities of the equation at them. */
export function airBoundary(fluid: HelmholtzFluid, T_low_K: number, at: State): SaturationTable {
  const rho_top = fluid.scales.rho_reducing_kg_m3
  const table = new SaturationTable(TOP.T_K, rho_top, T_low_K, 1 / 2)
  const follow = (side: Side, curve: typeof BUBBLE, first: number) => {
    const start = table.size - 1
    for (let i = start; i >= 0; i--) {
      const T_K = table.T_at(i)
      const guess = i === start ? first : table.ahead(side, i, -1, start)
      const search = new DensityAtPressure(fluid)
      search.at(T_K, pressure_Pa(curve, T_K), at)
      const rho = monotoneRoot(search, 'rising', guess * 0.7, guess * 1.4, guess, 1e-12)
      if (Number.isNaN(rho)) throw new Error(`air has no density on its boundary at ${T_K} K`)
      shift(at, 0, -search.value / search.slope)
      table.set(side, i, { rho: at.rho_kg_m3, p_Pa: search.p_Pa, u: at.u_J_kg, s: at.s_J_kgK })
    }
  }
  follow(LIQUID, BUBBLE, FIRST_LIQUID * rho_top)
  const T_cold_K = table.T_at(table.size - 1)
  follow(VAPOUR, DEW, pressure_Pa(DEW, T_cold_K) / (fluid.scales.R_J_kgK * T_cold_K))
  return table
}
