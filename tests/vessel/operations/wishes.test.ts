import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { charge, evacuate, flowThrough, hold, start, vent, type Path } from '@/lib/vessel'
import { filled, fluid, header, IDEAL, LUMPED, ORIFICE, vessel } from '../vessels'

const low = () => filled(IDEAL, 5e5)
const high = () => filled(IDEAL, 200e5)

describe('an impossible wish is refused with its reason', () => {
  it.each<[string, () => unknown, RegExp]>([
    [
      'more pressure than the supply has',
      () => charge({ from: low(), supply: header(IDEAL), stops: { until_p_Pa: 400e5 } }),
      /supply has 300 bar.*400 bar/,
    ],
    [
      'a supply below the vessel',
      () => charge({ from: high(), supply: header(IDEAL, 100e5) }),
      /supply has 100 bar.*200 bar/,
    ],
    [
      'a charge to less than there is',
      () => charge({ from: high(), supply: header(IDEAL), stops: { until_p_Pa: 100e5 } }),
      /at 200 bar already/,
    ],
    [
      'a charge to less mass than there is',
      () => charge({ from: high(), supply: header(IDEAL), stops: { until_m_kg: 1 } }),
      /kg already/,
    ],
    ['a vent to more than there is', () => vent({ from: low(), stops: { until_p_Pa: 6e5 } }), /at 5 bar/],
    ['a vent below what it goes to', () => vent({ from: low(), stops: { until_p_Pa: 0.5e5 } }), /goes to 1.013 bar/],
    ['a vent of what is below its surroundings', () => vent({ from: filled(IDEAL, 0.5e5) }), /nothing flows out/],
    ['a vent of nothing', () => vent({ from: start(vessel(), IDEAL, 'evacuated') }), /empty/],
    ['another gas', () => charge({ from: low(), supply: header(fluid('helium')) }), /not mixed/],
    [
      'heat by coefficients without time',
      () => charge({ from: low(), supply: header(IDEAL), heat: 'by_coefficients' }),
      /takes time/,
    ],
    [
      'a flow against the gradient',
      () => flowThrough(ORIFICE, IDEAL, IDEAL.state('pT', 1e5, 300), 2e5),
      /does not flow/,
    ],
    ['a hold of no length', () => hold({ from: low() }), /for how long/],
    [
      'a pump below its lowest pressure',
      () =>
        evacuate({
          from: low(),
          through: { kind: 'pump', speed_m3_s: 0.01, p_low_Pa: 100 },
          stops: { until_p_Pa: 50 },
        }),
      /cannot be reached/,
    ],
    [
      'an orifice of no size',
      () => charge({ from: low(), supply: header(IDEAL), through: { ...ORIFICE, diameter_m: 0 } as Path }),
      /diameter/,
    ],
    [
      'a ramp in a series',
      () =>
        charge({
          from: low(),
          supply: header(IDEAL),
          through: { kind: 'series', paths: [ORIFICE, { kind: 'ramp', rate_Pa_s: 1 }] },
        }),
      /stands alone/,
    ],
    [
      'a vessel of no volume',
      () => start(vessel(LUMPED, { volume_m3: 0 }), IDEAL, { pair: 'pT', a: 1e5, b: 300 }),
      /volume/,
    ],
    [
      'a shell without a coefficient',
      () =>
        charge({
          from: filled(IDEAL, 5e5, vessel(LUMPED, { inside: undefined })),
          supply: header(IDEAL),
          through: ORIFICE,
        }),
      /no inside coefficient/,
    ],
  ])('%s', (_, wish, reason) => {
    expect(wish).toThrow(Problem)
    expect(wish).toThrow(reason)
  })
})

describe('a stop that is never reached', () => {
  it('is found when everything has settled', () => {
    const wish = () => charge({ from: low(), supply: header(IDEAL), through: ORIFICE, stops: { until_T_K: 500 } })
    expect(wish).toThrow(/settles at 300 bar.*without reaching 226.9 °C/)
  })

  it('is given up at the horizon, which is said', () => {
    const slow: Path = { kind: 'fixed_flow', rate_kg_s: 1e-9 }
    const wish = () => charge({ from: low(), supply: header(IDEAL), through: slow, stops: { until_p_Pa: 200e5 } })
    expect(wish).toThrow(/after 30 days/)
  })
})

describe('the first stop reached counts', () => {
  const from = low()
  const supply = header(IDEAL)
  it.each([
    [{ until_p_Pa: 200e5, for_s: 5 }, 'for'],
    [{ until_p_Pa: 20e5, for_s: 500 }, 'until_p'],
    [{ until_p_Pa: 200e5, until_T_K: 330 }, 'until_T'],
    [{ until_p_Pa: 200e5, until_m_kg: 3 }, 'until_m'],
    [{ until_m_kg: 3, until_T_K: 399, until_p_Pa: 100e5 }, 'until_m'],
  ])('%o: %s', (stops, which) => {
    expect(charge({ from, supply, through: ORIFICE, stops }).stoppedBy).toBe(which)
  })

  it('and in a balance as in time', () => {
    const stops = { until_m_kg: 3, until_p_Pa: 200e5 }
    const timed = charge({ from, supply, through: ORIFICE, stops })
    const balance = charge({ from, supply, stops })
    expect(balance.stoppedBy).toBe('until_m')
    expect(balance.T_K).toBeCloseTo(timed.T_K, 6)
  })
})
