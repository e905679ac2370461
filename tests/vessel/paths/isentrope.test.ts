import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Fluid, State } from '@/lib/fluids'
import { IsentropicFlux } from '@/lib/vessel/paths/isentrope'
import { cases, GASES } from '../random'
import { fluid, IDEAL } from '../vessels'

/** The flux at a pressure on the isentrope, by the definition alone; none where the equation does not reach. */
const fluxAt = (gas: Fluid, up: State, p_Pa: number) => {
  try {
    const end = gas.state('ps', p_Pa, up.s_J_kgK)
    return end.rho_kg_m3 * Math.sqrt(2 * Math.max(0, up.h_J_kg - end.h_J_kg))
  } catch {
    return 0
  }
}

/** The greatest flux by searching over pressure, narrower and narrower. */
function greatest(gas: Fluid, up: State, lowest: number): number {
  let [low, high] = [Math.max(lowest, 0.2 * up.p_Pa), up.p_Pa]
  let best = 0
  for (let round = 0; round < 6; round++) {
    const step = (high - low) / 40
    let bestAt = low
    for (let p = low; p <= high; p += step) {
      const G = fluxAt(gas, up, p)
      if (G > best) [best, bestAt] = [G, p]
    }
    ;[low, high] = [Math.max(low, bestAt - step), Math.min(high, bestAt + step)]
  }
  return best
}

describe('choked flux', () => {
  it('is the greatest along the isentrope, for gases as they are stored', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...GASES),
        fc.double({ min: 0.02, max: 1, noNaN: true }),
        fc.double({ min: 270, max: 340, noNaN: true }),
        ({ name, most_Pa }, part, T_K) => {
          const gas = fluid(name)
          const up = gas.state('pT', part * most_Pa, T_K)
          fc.pre(up.phase !== 'liquid')
          const { G_kg_m2s, p_Pa } = new IsentropicFlux(gas).choked(up)
          const best = greatest(gas, up, 0.2 * up.p_Pa)
          expect(Math.abs(G_kg_m2s / best - 1)).toBeLessThan(1e-6)
          expect(Math.abs(fluxAt(gas, up, p_Pa) / best - 1)).toBeLessThan(1e-6)
        },
      ),
      { numRuns: cases(40) },
    )
  })

  it.each([
    ['carbon_dioxide', 280, 1],
    ['carbon_dioxide', 280, 0.6],
    ['carbon_dioxide', 280, 0.1],
    ['carbon_dioxide', 280, 0],
    ['propane', 300, 1],
    ['propane', 300, 0.3],
    ['propane', 300, 0],
    ['ammonia', 295, 0.5],
    ['water', 450, 0.9],
    ['water', 450, 0.05],
  ])('is the greatest where two phases flow: %s at %s K, quality %s', (name, T_K, x) => {
    const gas = fluid(name)
    const up = gas.state('Tx', T_K, x)
    const { G_kg_m2s } = new IsentropicFlux(gas).choked(up)
    expect(Math.abs(G_kg_m2s / greatest(gas, up, 0.2 * up.p_Pa) - 1)).toBeLessThan(1e-6)
  })

  it('of a liquid under pressure is that at its saturation, where it begins to boil', () => {
    const propane = fluid('propane')
    const up = propane.state('pT', 30e5, 300)
    const { G_kg_m2s, p_Pa } = new IsentropicFlux(propane).choked(up)
    const boiling = propane.saturationAtT(300).p_Pa
    // It cools a little on the way, so that it begins to boil a little below the vapour pressure upstream.
    expect(p_Pa / boiling).toBeLessThan(1)
    expect(p_Pa / boiling).toBeGreaterThan(0.95)
    expect(Math.abs(G_kg_m2s / Math.sqrt(2 * up.rho_kg_m3 * (up.p_Pa - p_Pa)) - 1)).toBeLessThan(0.02)
  })

  it('of an ideal gas is that of the closed formula', () => {
    const up = IDEAL.state('pT', 5e5, 310)
    const R = IDEAL.info.gasConstant_J_kgK
    const { G_kg_m2s, p_Pa } = new IsentropicFlux(IDEAL).choked(up)
    expect(G_kg_m2s / (5e5 * Math.sqrt(1.4 / (R * 310)) * (2 / 2.4) ** 3)).toBeCloseTo(1, 10)
    expect(p_Pa / (5e5 * (2 / 2.4) ** 3.5)).toBeCloseTo(1, 5)
  })

  it('is followed from one state to the next in three evaluations', () => {
    const nitrogen = fluid('nitrogen')
    const isentrope = new IsentropicFlux(nitrogen)
    isentrope.flux(nitrogen.state('pT', 200e5, 290), 1e5)
    const before = isentrope.evaluations
    for (let i = 1; i <= 50; i++) isentrope.flux(nitrogen.state('pT', (200 - 2 * i) * 1e5, 290 - 0.5 * i), 1e5)
    expect((isentrope.evaluations - before) / 50).toBeLessThanOrEqual(3)
  })
})

describe('flux to a pressure', () => {
  it('falls without a jump from choking to nothing at equal pressures', () => {
    const nitrogen = fluid('nitrogen')
    const up = nitrogen.state('pT', 100e5, 290)
    const isentrope = new IsentropicFlux(nitrogen)
    const { G_kg_m2s, p_Pa } = isentrope.choked(up)
    let last = G_kg_m2s
    for (let p = p_Pa; p < 0.999 * up.p_Pa; p += (up.p_Pa - p_Pa) / 200) {
      const G = isentrope.flux(up, p)
      expect(G).toBeLessThanOrEqual(last * (1 + 1e-9))
      expect(Math.abs(G / fluxAt(nitrogen, up, p) - 1)).toBeLessThan(1e-8)
      last = G
    }
    expect(isentrope.flux(up, up.p_Pa)).toBe(0)
  })

  it('agrees on both sides of where differences of enthalpy give way to the power law', () => {
    const nitrogen = fluid('nitrogen')
    const up = nitrogen.state('pT', 300e5, 290)
    const isentrope = new IsentropicFlux(nitrogen)
    const [inside, outside] = [0.99e-4, 1.01e-4].map(
      (drop) => isentrope.flux(up, up.p_Pa * (1 - drop)) / Math.sqrt(drop),
    )
    expect(Math.abs(inside / outside - 1)).toBeLessThan(1e-6)
  })
})
