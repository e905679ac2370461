import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { FLUIDS, idealGas, findFluid, type Fluid, type State } from '@/lib/fluids'

const RUNS = { numRuns: 40, seed: 1_905, verbose: 1 }

/** Places in one phase, well away from the critical point and from the edges of the range. */
const place = (fluid: Fluid) => {
  const { T_min_K, T_max_K, critical } = fluid.info
  return fc
    .record({
      share: fc.double({ min: 0.02, max: 0.98, noNaN: true }),
      lnP: fc.double({ min: -6, max: 1.5, noNaN: true }),
    })
    .map(({ share, lnP }) => ({
      T_K: T_min_K + share * (T_max_K - T_min_K),
      p_Pa: Math.min(0.9 * fluid.info.p_max_Pa, critical!.p_Pa * Math.exp(lnP)),
    }))
    .filter(({ T_K }) => Math.abs(T_K / critical!.T_K - 1) > 0.1)
}

/** A central difference quotient of a property by one of the pair, at a step where both kinds of error are small. */
function slope(of: (x: number) => number, x: number, relative = 1e-4): number {
  const h = relative * x
  return (8 * (of(x + h / 2) - of(x - h / 2)) - (of(x + h) - of(x - h))) / (6 * h)
}

const close = (a: number, b: number, scale: number) => expect(Math.abs(a - b) / scale).toBeLessThan(1e-5)

/** Whether a state and those a step away from it are all in one phase. */
const isAlone = (fluid: Fluid, { rho_kg_m3: rho, T_K }: State) =>
  [0.9998, 1, 1.0002].every((by) =>
    [rho * by, rho / by].every((r) => {
      try {
        return fluid.state('rhoT', r, T_K * by).phase !== 'two-phase'
      } catch {
        return false
      }
    }),
  )

describe.each(FLUIDS)('$name', (fluid) => {
  it('keeps the relations between properties, by difference quotients', () => {
    fc.assert(
      fc.property(place(fluid), ({ T_K, p_Pa }) => {
        const state = fluid.state('pT', p_Pa, T_K)
        fc.pre(isAlone(fluid, state))
        const {
          rho_kg_m3: rho,
          cv_J_kgK: cv,
          cp_J_kgK: cp,
          w_m_s: w,
          dpdT_rho_Pa_K: dpdT,
          dpdrho_T_Pa_m3_kg: dpdrho,
        } = state
        const R = fluid.info.gasConstant_J_kgK
        const byT = (pick: (state: State) => number) => slope((T) => pick(fluid.state('rhoT', rho, T)), T_K)
        const byRho = (pick: (state: State) => number) => slope((r) => pick(fluid.state('rhoT', r, T_K)), rho)
        close(
          byT(({ u_J_kg }) => u_J_kg),
          cv,
          cv,
        )
        close(T_K * byT(({ s_J_kgK }) => s_J_kgK), cv, cv)
        close(
          byT(({ p_Pa }) => p_Pa),
          dpdT,
          rho * R + Math.abs(dpdT),
        )
        close(
          byRho(({ p_Pa }) => p_Pa),
          dpdrho,
          dpdrho,
        )
        // Maxwell: ∂s/∂v at constant T is ∂p/∂T at constant v
        close(-rho * rho * byRho(({ s_J_kgK }) => s_J_kgK), dpdT, rho * R + Math.abs(dpdT))
        close(cp - cv, (T_K * dpdT * dpdT) / (rho * rho * dpdrho), cp)
        close(w * w, (cp / cv) * dpdrho, w * w)
        close(state.h_J_kg, state.u_J_kg + p_Pa / rho, R * T_K)
        // the speed of sound along an isentrope
        close(
          slope((p) => fluid.state('ps', p, state.s_J_kgK).rho_kg_m3, p_Pa),
          1 / (w * w),
          1 / (w * w),
        )
      }),
      RUNS,
    )
  })
})

describe('an ideal gas', () => {
  it.each([idealGas({ of: findFluid('air')!, at_T_K: 300 }), idealGas({ k: 1.4, molarMass_kg_mol: 0.029 })])(
    'is found again by every pair: $name',
    (gas) => {
      const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true })
      fc.assert(
        fc.property(finite(50, 3000), finite(1, 1e9), (T_K, p_Pa) => {
          const { rho_kg_m3: rho, u_J_kg: u, h_J_kg: h, s_J_kgK: s } = gas.state('pT', p_Pa, T_K)
          const told = [
            ['rhoT', rho, T_K],
            ['rhou', rho, u],
            ['rhoh', rho, h],
            ['rhop', rho, p_Pa],
            ['ph', p_Pa, h],
            ['ps', p_Pa, s],
            ['pu', p_Pa, u],
            ['Ts', T_K, s],
          ] as const
          for (const [pair, a, b] of told) {
            const again = gas.state(pair, a, b)
            expect(Math.abs(again.T_K / T_K - 1)).toBeLessThan(1e-12)
            expect(Math.abs(again.rho_kg_m3 / rho - 1)).toBeLessThan(1e-11)
          }
          expect(Math.abs((h - u) / (p_Pa / rho) - 1)).toBeLessThan(1e-12)
        }),
        RUNS,
      )
      expect(() => gas.state('Tx', 300, 0.5)).toThrow('has no liquid')
    },
  )
})
