import { describe, expect, it } from 'vitest'
import { FLUIDS, type Pair } from '@/lib/fluids'

const TEMPERATURES = 24
const QUALITIES = [0, 1e-4, 0.02, 0.3, 0.7, 0.9999, 1]

describe.each(FLUIDS.filter(({ id }) => id !== 'air'))('$name, two phases', (fluid) => {
  const { triple, critical, gasConstant_J_kgK: R } = fluid.info
  const temperatures = Array.from(
    { length: TEMPERATURES },
    (_, i) => triple!.T_K + ((critical!.T_K * 0.9999 - triple!.T_K) * i) / (TEMPERATURES - 1),
  )

  it('stands in equilibrium: equal Gibbs energy, the same temperature back from the pressure', () => {
    for (const T_K of temperatures) {
      const { p_Pa, liquid, vapour } = fluid.saturationAtT(T_K)
      const off = liquid.h_J_kg - T_K * liquid.s_J_kgK - (vapour.h_J_kg - T_K * vapour.s_J_kgK)
      expect(Math.abs(off) / (R * T_K)).toBeLessThan(5e-14)
      expect(Math.abs(fluid.state('rhoT', vapour.rho_kg_m3 * (1 - 1e-9), T_K).p_Pa / p_Pa - 1)).toBeLessThan(1e-8)
      expect(Math.abs(fluid.saturationAtP(p_Pa).T_K / T_K - 1)).toBeLessThan(1e-12)
    }
  })

  it('follows the slope of Clapeyron', () => {
    for (const T_K of temperatures.slice(1, -2)) {
      const dT = 1e-4 * T_K
      const slope =
        (Math.log(fluid.saturationAtT(T_K + dT).p_Pa) - Math.log(fluid.saturationAtT(T_K - dT).p_Pa)) / (2 * dT)
      const { p_Pa, liquid, vapour } = fluid.saturationAtT(T_K)
      const latent = vapour.h_J_kg - liquid.h_J_kg
      const clapeyron = latent / (T_K * p_Pa * (1 / vapour.rho_kg_m3 - 1 / liquid.rho_kg_m3))
      // the difference quotient itself is off by (ln p)''' dT² / 6
      expect(Math.abs(slope / clapeyron - 1)).toBeLessThan(2e-5)
    }
  })

  it('finds each mixture again by every pair, in few evaluations', () => {
    for (const T_K of temperatures) {
      const isTop = T_K > 0.995 * critical!.T_K
      for (const x of QUALITIES) {
        const state = fluid.state('Tx', T_K, x)
        expect(state.phase).toBe('two-phase')
        if (!isTop) expect(state.evaluations).toBeLessThanOrEqual(3)
        const told: readonly (readonly [Pair, number, number])[] = [
          ['px', state.p_Pa, x],
          ['ph', state.p_Pa, state.h_J_kg],
          ['ps', state.p_Pa, state.s_J_kgK],
          ['pu', state.p_Pa, state.u_J_kg],
          ['rhou', state.rho_kg_m3, state.u_J_kg],
          ['rhoh', state.rho_kg_m3, state.h_J_kg],
          ['rhop', state.rho_kg_m3, state.p_Pa],
          ['rhoT', state.rho_kg_m3, T_K],
          ['Ts', T_K, state.s_J_kgK],
        ]
        for (const [pair, a, b] of told) {
          // the liquid of cold water contracts on warming: see the page of each pair
          if (fluid.id === 'water' && pair === 'rhop' && T_K < 281) continue
          const again = fluid.state(pair, a, b)
          const place = `${pair} at ${T_K} K, x ${x}`
          expect(Math.abs(again.T_K / T_K - 1), place).toBeLessThan(isTop ? 1e-7 : 1e-9)
          // of a liquid alone the equation gives the pressure to the last digits of ρRT
          const digits = 1e-9 * (x === 0 ? again.rho_kg_m3 * R * T_K : 0)
          expect(Math.abs(again.p_Pa - state.p_Pa), place).toBeLessThan((isTop ? 1e-6 : 1e-7) * state.p_Pa + digits)
          if (!isTop) expect(again.evaluations, place).toBeLessThanOrEqual(8)
        }
      }
    }
  })
})
