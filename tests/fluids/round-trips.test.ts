import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { createState, FLUIDS, type Fluid, type Pair, type State } from '@/lib/fluids'
import { statesOf, toldBy } from './states'

/** SOAK=1 tries ten thousand states of each fluid. */
const PER_SIDE = process.env.SOAK ? 100 : 12

/** Where an answer is not the only one, by what the pages of the pairs say; and where the equation's own digits end. */
function isAmbiguous(pair: Pair, state: State, fluid: Fluid): boolean {
  const contracting = state.dpdT_rho_Pa_K < 0 || (fluid.id === 'water' && state.T_K < 285)
  return contracting && (pair === 'rhop' || pair === 'Ts')
}

const isNearCritical = ({ T_K, rho_kg_m3 }: State, { info: { critical } }: Fluid, by: number) =>
  Math.abs(T_K / critical!.T_K - 1) < by && Math.abs(rho_kg_m3 / critical!.rho_kg_m3 - 1) < 0.4

const MOST_COLD: Readonly<Record<string, number>> = { rhoT: 1, rhou: 4, ph: 8, ps: 8, pu: 8, rhoh: 8, rhop: 8, Ts: 8 }
const MOST_WARM: Readonly<Record<string, number>> = { rhoT: 1, rhou: 2, ph: 4, ps: 4, pu: 4, rhoh: 4, rhop: 4, Ts: 8 }

describe.each(FLUIDS)('$name, one phase', (fluid) => {
  const states: State[] = []
  let refused = 0
  const wrong: string[] = []
  const costly: Record<string, number> = {}
  const again = createState()
  const neighbour = createState()

  for (const { T_K, p_Pa } of statesOf(fluid, PER_SIDE)) {
    try {
      states.push(fluid.state('pT', p_Pa, T_K))
    } catch (error) {
      if (!(error instanceof Problem)) throw error
      refused++
    }
  }
  for (const state of states) {
    const critical = isNearCritical(state, fluid, 0.02)
    if (!critical && state.evaluations > 4) costly.pT = (costly.pT ?? 0) + 1
    for (const [pair, a, b] of toldBy(state)) {
      if (isAmbiguous(pair, state, fluid)) continue
      const place = `${pair} ${a} ${b}, T ${state.T_K} p ${state.p_Pa}`
      for (const warm of [false, true]) {
        try {
          if (warm && !nextTo(fluid, state, neighbour)) continue
          fluid.state(pair, a, b, again, warm ? neighbour : undefined)
        } catch (error) {
          wrong.push(`${place}: ${(error as Error).message}`)
          continue
        }
        const off = Math.max(Math.abs(again.T_K / state.T_K - 1), Math.abs(again.rho_kg_m3 / state.rho_kg_m3 - 1))
        if (!(off < (critical ? 1e-6 : 2e-9))) wrong.push(`${place}: off by ${off}`)
        const most = warm ? MOST_WARM[pair] : MOST_COLD[pair]
        const key = warm ? `${pair} from a neighbour` : pair
        if (!critical && again.evaluations > most) costly[key] = (costly[key] ?? 0) + 1
      }
    }
  }

  it('finds each state again by every pair', () => {
    expect(wrong).toEqual([])
    // past its melting curve an equation may not reach: little of the plane
    expect(refused).toBeLessThan(0.08 * PER_SIDE ** 2)
    expect(states.length).toBeGreaterThan(0.9 * PER_SIDE ** 2)
  })

  it('in few evaluations of the equation', () => {
    // one in a hundred may take more, where an edge or a minimum is near
    for (const [pair, count] of Object.entries(costly))
      expect(count, pair).toBeLessThanOrEqual(Math.max(3, states.length / 100))
  })

  it('has heat capacities, a speed of sound and a phase everywhere', () => {
    for (const state of states) {
      const { T_K, rho_kg_m3, p_Pa, u_J_kg, h_J_kg, s_J_kgK, cv_J_kgK, cp_J_kgK, w_m_s } = state
      const { x, phase } = state
      const numbers = [T_K, rho_kg_m3, p_Pa, u_J_kg, h_J_kg, s_J_kgK, cv_J_kgK, cp_J_kgK, w_m_s]
      expect(numbers.every(Number.isFinite)).toBe(true)
      expect(x).toBeNaN()
      expect(cp_J_kgK).toBeGreaterThan(cv_J_kgK)
      expect(['gas', 'liquid', 'supercritical']).toContain(phase)
    }
  })
})

/** A state a thousandth away, where there is one phase too. */
function nextTo(fluid: Fluid, state: State, out: State): boolean {
  try {
    const T_K = state.T_K * (state.T_K > 0.9 * fluid.info.T_max_K ? 0.999 : 1.001)
    return fluid.state('rhoT', state.rho_kg_m3 * 0.9995, T_K, out).phase !== 'two-phase'
  } catch {
    return false
  }
}
