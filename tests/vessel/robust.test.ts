import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { charge, equalise, evacuate, hold, start, vent, type Draw, type Heat, type Run, type Stops } from '@/lib/vessel'
import { anyVessel, built, cases, gasScene, PATIENCE_ms, wetPath } from './random'
import { fluid } from './vessels'

/*
 * Whatever is asked: a result or a stated reason, within a bounded number of steps. SOAK=40 makes it ten thousand runs.
 */

const part = fc.double({ min: 0.02, max: 1.3, noNaN: true })
const stops: fc.Arbitrary<(from: Run, to_Pa: number) => Stops> = fc.oneof(
  part.map((p) => (_: Run, to_Pa: number) => ({ until_p_Pa: p * to_Pa })),
  fc.double({ min: 1, max: 1e5, noNaN: true }).map((for_s) => () => ({ for_s })),
  fc.double({ min: 200, max: 420, noNaN: true }).map((until_T_K) => () => ({ until_T_K, for_s: 3600 })),
  part.map((p) => (from: Run) => ({ until_m_kg: p * 5 * from.m_kg })),
  fc.constant(() => ({})),
  fc.constant(() => ({ settled: true })),
)
const heat = fc.constantFrom<Heat | undefined>(
  undefined,
  undefined,
  'adiabatic',
  'shell_at_gas_temperature',
  'isothermal',
)

/** Runs the operation; gives the kind of its end. */
function outcome(operation: () => Run): string {
  try {
    const run = operation()
    expect(run.counts.steps + run.counts.rejected).toBeLessThanOrEqual(5000)
    for (const value of [run.p_Pa, run.T_K, run.m_kg, run.T_peak_K, run.T_low_K])
      expect(Number.isFinite(value)).toBe(true)
    expect(run.balance.energy).toBeLessThan(1e-9)
    expect(run.balance.mass).toBeLessThan(1e-9)
    return run.stoppedBy
  } catch (error) {
    if (!(error instanceof Problem)) throw error
    expect(error.code, error.reason).not.toBe('unconverged')
    expect(error.reason).not.toMatch(/NaN|undefined|Infinity/)
    return error.code
  }
}

describe('any operation on a gas', () => {
  it('ends with a result or a reason', { timeout: PATIENCE_ms }, () => {
    const ends = new Map<string, number>()
    const kind = fc.constantFrom(
      'charge',
      'balance',
      'from nothing',
      'vent',
      'blow down',
      'equalise',
      'evacuate',
      'hold',
    )
    fc.assert(
      fc.property(gasScene, kind, stops, heat, (scene, operation, stop, how) => {
        const { low, high, supply, medium } = built(scene)
        const { path: through, vessel } = scene
        const given = { heat: how, stops: stop(low, scene.supplyPart * scene.gas.most_Pa) }
        const end = outcome(() => {
          switch (operation) {
            case 'charge':
              return charge({ from: low, supply, through, ...given })
            case 'balance':
              return charge({ from: low, supply, ...given })
            case 'from nothing':
              return charge({ from: start(vessel, medium, 'evacuated'), supply, through, ...given })
            case 'vent':
              return vent({ from: high, through, ...given })
            case 'blow down':
              return vent({ from: high, ...given })
            case 'equalise':
              return equalise({ a: low, b: high, through, ...given }).a
            case 'evacuate':
              return evacuate({ from: low, through: { kind: 'pump', speed_m3_s: 0.01, p_low_Pa: 50 }, ...given })
            case 'hold':
              return hold({ from: high, stops: stop(high, high.p_Pa) })
          }
        })
        ends.set(end, (ends.get(end) ?? 0) + 1)
      }),
      { numRuns: cases(170) },
    )
    // Most of what is asked here can be done.
    expect((ends.get('until_p') ?? 0) + (ends.get('settled') ?? 0) + (ends.get('for') ?? 0)).toBeGreaterThan(cases(50))
  })
})

describe('any vent of a liquefied gas', () => {
  it('ends with a result or a reason', { timeout: PATIENCE_ms }, () => {
    const ends = new Map<string, number>()
    const wet = fc.constantFrom(
      { name: 'carbon_dioxide', low: 230, high: 300 },
      { name: 'propane', low: 250, high: 340 },
      { name: 'ammonia', low: 245, high: 340 },
      { name: 'nitrous_oxide', low: 230, high: 300 },
      { name: 'water', low: 380, high: 500 },
    )
    const scene = fc.record({
      gas: wet,
      vessel: anyVessel,
      part: fc.double({ min: 0, max: 1, noNaN: true }),
      x: fc.double({ min: 0, max: 1, noNaN: true }),
      path: wetPath,
      draw: fc.constantFrom<Draw>('mixed', 'vapour', 'liquid'),
    })
    fc.assert(
      fc.property(scene, stops, heat, (data, stop, how) => {
        const end = outcome(() => {
          const T_K = data.gas.low + data.part * (data.gas.high - data.gas.low)
          const from = start(data.vessel, fluid(data.gas.name), { pair: 'Tx', a: T_K, b: data.x })
          return vent({ from, through: data.path, draw: data.draw, heat: how, stops: stop(from, from.p_Pa) })
        })
        ends.set(end, (ends.get(end) ?? 0) + 1)
      }),
      { numRuns: cases(80) },
    )
    expect(ends.size).toBeGreaterThan(2)
  })
})
