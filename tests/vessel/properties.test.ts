import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { charge, equalise, hold, vent, type Run } from '@/lib/vessel'
import { built, cases, gasScene, PATIENCE_ms } from './random'

/** What must hold of any run, however it came about. */
function expectSound(run: Run) {
  expect(run.balance.energy).toBeLessThanOrEqual(1e-9)
  expect(run.balance.mass).toBeLessThanOrEqual(1e-9)
  const numbers = [
    run.p_Pa,
    run.T_K,
    run.m_kg,
    run.rho_kg_m3,
    run.u_J_kg,
    run.h_J_kg,
    run.s_J_kgK,
    run.heat_J,
    run.moved_kg,
  ]
  for (const value of numbers) expect(Number.isFinite(value)).toBe(true)
  expect(run.p_Pa).toBeGreaterThan(0)
  expect(run.T_K).toBeGreaterThan(0)
  expect(run.T_peak_K).toBeGreaterThanOrEqual(run.T_K)
  expect(run.T_low_K).toBeLessThanOrEqual(run.T_K)
  expect(run.p_peak_Pa).toBeGreaterThanOrEqual(run.p_Pa)
  expect(run.p_low_Pa).toBeLessThanOrEqual(run.p_Pa)
  if (!run.trace) return
  const { t_s, ...columns } = run.trace
  for (const column of Object.values(columns)) expect(column).toHaveLength(t_s.length)
  for (let i = 1; i < t_s.length; i++) expect(t_s[i]).toBeGreaterThanOrEqual(t_s[i - 1])
  expect(t_s.at(-1)).toBe(run.time_s)
}

/** A run, or the reason why there is none, which must be one that a person can act on. */
function attempt(operation: () => Run): Run | null {
  try {
    return operation()
  } catch (error) {
    if (!(error instanceof Problem)) throw error
    expect(error.code).not.toBe('unconverged')
    expect(error.reason.length).toBeGreaterThan(10)
    return null
  }
}

describe('any charge', () => {
  it('in time conserves, and stops where it is told', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, fc.double({ min: 0.05, max: 1.2, noNaN: true }), (scene, part) => {
        const { low, high, supply } = built(scene)
        const { path } = scene
        const until_p_Pa = low.p_Pa + part * (high.p_Pa - low.p_Pa)
        const run = attempt(() => charge({ from: low, supply, through: path, stops: { until_p_Pa } }))
        if (!run) return
        expectSound(run)
        if (run.stoppedBy !== 'until_p') return
        expect(run.p_Pa).toBeLessThanOrEqual(until_p_Pa)
        expect(run.p_Pa / until_p_Pa).toBeGreaterThan(1 - 1e-9)
      }),
      { numRuns: cases(60) },
    )
  })

  it(
    'as a balance comes to the same as the slowest of flows without heat, whatever the path',
    { timeout: PATIENCE_ms },
    () => {
      fc.assert(
        fc.property(gasScene, (scene) => {
          const { low, high, supply } = built(scene)
          const { path } = scene
          const stops = { until_p_Pa: high.p_Pa }
          const balance = attempt(() => charge({ from: low, supply, stops }))
          const timed = attempt(() =>
            charge({ from: low, supply, through: path, stops, heat: 'adiabatic', rtol: 1e-8 }),
          )
          if (!balance || !timed) return
          expectSound(balance)
          expect(Math.abs(timed.T_K / balance.T_K - 1)).toBeLessThan(1e-6)
          expect(Math.abs(timed.m_kg / balance.m_kg - 1)).toBeLessThan(1e-6)
        }),
        { numRuns: cases(30) },
      )
    },
  )

  it('without heat ends the same however it is split', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, fc.double({ min: 0.1, max: 0.9, noNaN: true }), (scene, part) => {
        const { low, high, supply } = built(scene)
        const middle = low.p_Pa + part * (high.p_Pa - low.p_Pa)
        const whole = attempt(() => charge({ from: low, supply, stops: { until_p_Pa: high.p_Pa } }))
        const first = attempt(() => charge({ from: low, supply, stops: { until_p_Pa: middle } }))
        if (!whole || !first?.supply) return
        const { supply: left } = first
        const second = charge({ from: first, supply: left, stops: { until_p_Pa: high.p_Pa } })
        expect(Math.abs(second.T_K / whole.T_K - 1)).toBeLessThan(1e-8)
        expect(Math.abs(second.m_kg / whole.m_kg - 1)).toBeLessThan(1e-8)
      }),
      { numRuns: cases(30) },
    )
  })
})

describe('any vent', () => {
  it('conserves, and stops where it is told', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, fc.double({ min: 0.05, max: 0.9, noNaN: true }), (scene, part) => {
        const { high } = built(scene)
        const { path } = scene
        const until_p_Pa = part * high.p_Pa
        const run = attempt(() => vent({ from: high, through: path, back_Pa: 0, stops: { until_p_Pa } }))
        if (!run) return
        expectSound(run)
        if (run.stoppedBy !== 'until_p') return
        expect(run.p_Pa).toBeGreaterThanOrEqual(until_p_Pa)
        expect(run.p_Pa / until_p_Pa).toBeLessThan(1 + 1e-9)
      }),
      { numRuns: cases(60) },
    )
  })

  it('without heat leaves the entropy of what stays as it was', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, (scene) => {
        const { high } = built(scene)
        const { path } = scene
        const stops = { until_p_Pa: 0.3 * high.p_Pa }
        const run = attempt(() => vent({ from: high, through: path, back_Pa: 0, stops, heat: 'adiabatic', rtol: 1e-8 }))
        if (!run) return
        expect(Math.abs(run.s_J_kgK - high.s_J_kgK) / high.fluid.info.gasConstant_J_kgK).toBeLessThan(1e-5)
      }),
      { numRuns: cases(30) },
    )
  })
})

describe('any two vessels that equalise without heat', () => {
  it('conserve, come to one pressure, and lose no entropy', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, fc.boolean(), (scene, swap) => {
        const { low, high } = built(scene)
        const { path } = scene
        const [one, other] = swap ? [low, high] : [high, low]
        const pair = { a: one, b: other, heat: 'adiabatic' } as const
        const runs = [() => equalise(pair), () => equalise({ ...pair, through: path })]
        for (const make of runs) {
          let ends: { a: Run; b: Run } | null = null
          attempt(() => (ends = make()).a)
          if (!ends) continue
          const { a, b }: { a: Run; b: Run } = ends
          expectSound(a)
          expectSound(b)
          expect(Math.abs(a.p_Pa / b.p_Pa - 1)).toBeLessThan(2e-6)
          const before = one.m_kg * one.s_J_kgK + other.m_kg * other.s_J_kgK
          const after = a.m_kg * a.s_J_kgK + b.m_kg * b.s_J_kgK
          const scale = (one.m_kg + other.m_kg) * one.fluid.info.gasConstant_J_kgK
          expect((after - before) / scale).toBeGreaterThan(-1e-7)
        }
      }),
      { numRuns: cases(25) },
    )
  })
})

describe('any hold', () => {
  it('keeps the mass, and comes to rest with its surroundings where it touches them', { timeout: PATIENCE_ms }, () => {
    fc.assert(
      fc.property(gasScene, (scene) => {
        const { high } = built(scene)
        const { vessel } = scene
        const run = attempt(() => hold({ from: high, stops: { settled: true } }))
        if (!run) return
        expectSound(run)
        expect(Math.abs(run.m_kg / high.m_kg - 1)).toBeLessThan(1e-12)
        if (vessel.shell.kind === 'none' || vessel.outside?.kind !== 'fixed') return
        expect(Math.abs(run.T_K - vessel.ambient_T_K)).toBeLessThan(0.05)
      }),
      { numRuns: cases(30) },
    )
  })
})
