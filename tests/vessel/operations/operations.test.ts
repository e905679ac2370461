import { describe, expect, it } from 'vitest'
import { charge, equalise, evacuate, hold, start, vent, type Path, type Run, type Vessel } from '@/lib/vessel'
import { AMBIENT_K, bank, filled, fluid, header, IDEAL, LAYERS, LUMPED, ORIFICE, vessel } from '../vessels'

const nitrogen = fluid('nitrogen')

describe('tolerance', () => {
  const errorAt = (v: Vessel, rtol: number, exact: Run) => {
    const run = charge({
      from: filled(nitrogen, 5e5, v),
      supply: header(nitrogen),
      through: ORIFICE,
      stops: { for_s: 20 },
      rtol,
    })
    return Math.abs(run.T_K / exact.T_K - 1) + Math.abs(run.p_Pa / exact.p_Pa - 1)
  }

  it.each([
    ['without a shell', vessel()],
    ['with a lumped shell', vessel(LUMPED)],
    ['with layers', vessel(LAYERS)],
  ])('bounds the error, which falls with it: %s', (_, v) => {
    const exact = charge({
      from: filled(nitrogen, 5e5, v),
      supply: header(nitrogen),
      through: ORIFICE,
      stops: { for_s: 20 },
      rtol: 1e-11,
    })
    for (const rtol of [1e-4, 1e-6, 1e-8]) expect(errorAt(v, rtol, exact)).toBeLessThan(50 * rtol)
  })
})

/** Three points of Gauss and Legendre on [0, 1]. */
const NODES = [0.5 - Math.sqrt(0.15), 0.5, 0.5 + Math.sqrt(0.15)]
const WEIGHTS = [5 / 18, 8 / 18, 5 / 18]

describe('energy, counted along the trace instead of by the integrator', () => {
  it('has left with what flowed out, enthalpy by enthalpy', () => {
    const from = filled(nitrogen, 200e5)
    const run = vent({ from, through: ORIFICE, stops: { until_p_Pa: 60e5 }, rtol: 1e-8 })
    const { t_s, T_K, m_kg } = run.trace!
    // From point to point of the trace, mass and temperature as cubics over time through both ends and their rates.
    let left = 0
    const rate = (column: readonly number[], i: number) => {
      const [a, b] = [Math.max(0, i - 1), Math.min(t_s.length - 1, i + 1)]
      return (column[b] - column[a]) / (t_s[b] - t_s[a])
    }
    for (let i = 1; i < t_s.length; i++) {
      NODES.forEach((node, k) => {
        const m = m_kg[i - 1] + node * (m_kg[i] - m_kg[i - 1])
        const T = T_K[i - 1] + node * (T_K[i] - T_K[i - 1])
        left += WEIGHTS[k] * (m_kg[i - 1] - m_kg[i]) * nitrogen.state('rhoT', m / 0.05, T).h_J_kg
      })
    }
    expect(rate(m_kg, 1)).toBeLessThan(0)
    const lost = from.m_kg * from.u_J_kg - run.m_kg * run.u_J_kg
    expect(Math.abs(left / lost - 1)).toBeLessThan(2e-3)
  })

  it('has come in with what a header gave, to rounding', () => {
    const from = filled(nitrogen, 5e5)
    const run = charge({ from, supply: header(nitrogen), through: ORIFICE, stops: { until_p_Pa: 200e5 } })
    const h = nitrogen.state('pT', 300e5, 288.15).h_J_kg
    const gained = run.m_kg * run.u_J_kg - from.m_kg * from.u_J_kg
    expect(Math.abs(gained / (h * run.moved_kg) - 1)).toBeLessThan(1e-12)
  })

  it('of a charge with a shell is what came in and what the shell gave', () => {
    const v = vessel(LUMPED, { outside: undefined })
    const from = filled(nitrogen, 5e5, v)
    const run = charge({ from, supply: header(nitrogen), through: ORIFICE, stops: { until_p_Pa: 200e5 } })
    const h = nitrogen.state('pT', 300e5, 288.15).h_J_kg
    const gained = run.m_kg * run.u_J_kg - from.m_kg * from.u_J_kg
    const shellGave = 52 * 470 * (AMBIENT_K - run.shell.mean_K)
    expect(run.heat_J).toBeCloseTo(shellGave, 3)
    expect(Math.abs((gained - h * run.moved_kg) / shellGave - 1)).toBeLessThan(1e-9)
  })
})

describe('a bank', () => {
  it('runs down by what the vessel gets, on its isentrope', () => {
    const supply = bank(nitrogen, 4, 300e5)
    const from = filled(nitrogen, 5e5)
    const run = charge({ from, supply, through: ORIFICE, stops: { until_p_Pa: 150e5 } })
    const left = run.supply?.kind === 'bank' ? run.supply.contents : null
    expect(left!.vessel).toBe(supply.contents.vessel)
    expect(4 * (supply.contents.m_kg - left!.m_kg)).toBeCloseTo(run.moved_kg, 9)
    expect(left!.s_J_kgK).toBeCloseTo(supply.contents.s_J_kgK, 2)
    const before = 4 * supply.contents.m_kg * supply.contents.u_J_kg + from.m_kg * from.u_J_kg
    const after = 4 * left!.m_kg * left!.u_J_kg + run.m_kg * run.u_J_kg
    expect(Math.abs(after / before - 1)).toBeLessThan(1e-11)
  })

  it('with shells takes heat from them as it cools', () => {
    const warm = charge({
      from: filled(nitrogen, 5e5),
      supply: bank(nitrogen, 2, 300e5, vessel(LUMPED)),
      through: ORIFICE,
      stops: { level: true },
    })
    const cold = charge({
      from: filled(nitrogen, 5e5),
      supply: bank(nitrogen, 2, 300e5),
      through: ORIFICE,
      stops: { level: true },
    })
    const left = (run: Run) => (run.supply?.kind === 'bank' ? run.supply.contents : run)
    expect(left(warm).heat_J).toBeGreaterThan(0)
    expect(left(warm).T_K).toBeGreaterThan(left(cold).T_K + 10)
    expect(warm.p_Pa).toBeGreaterThan(cold.p_Pa)
  })
})

describe('an evacuated vessel', () => {
  it('that fills from a header of an ideal gas comes to cp/cv times its temperature', () => {
    const from = start(vessel(), IDEAL, 'evacuated')
    expect(from).toMatchObject({ p_Pa: 0, m_kg: 0, phase: 'vacuum' })
    const supply = header(IDEAL, 50e5, 300)
    for (const through of [undefined, ORIFICE]) {
      const run = charge({ from, supply, through, stops: { until_p_Pa: 20e5 } })
      expect(run.T_K).toBeCloseTo(1.4 * 300, 6)
      expect(run.moved_kg).toBe(run.m_kg)
      expect(run.T_peak_K).toBeCloseTo(420, 6)
    }
  })

  it('with a shell begins between the shell and what flows in, without a spike', () => {
    const from = start(vessel(LUMPED), nitrogen, 'evacuated')
    const run = charge({ from, supply: header(nitrogen), through: ORIFICE, stops: { until_p_Pa: 100e5 } })
    expect(run.trace!.T_K[0]).toBeGreaterThan(AMBIENT_K)
    expect(run.trace!.T_K[0]).toBeLessThan(346)
    expect(run.balance.energy).toBeLessThan(1e-9)
  })
})

describe('paths', () => {
  it('in series pass less than either, and what the narrower passes when the other is wide', () => {
    const time = (through: Path) =>
      charge({ from: filled(nitrogen, 5e5), supply: header(nitrogen), through, stops: { until_p_Pa: 200e5 } }).time_s!
    const wide: Path = { kind: 'orifice', diameter_m: 0.05, dischargeCoefficient: 1 }
    const alone = time(ORIFICE)
    expect(time({ kind: 'series', paths: [ORIFICE, ORIFICE] })).toBeGreaterThan(1.2 * alone)
    expect(time({ kind: 'series', paths: [wide, ORIFICE] }) / alone).toBeCloseTo(1, 4)
    expect(time({ kind: 'series', paths: [ORIFICE, wide] }) / alone).toBeCloseTo(1, 3)
    expect(time({ kind: 'series', paths: [ORIFICE] })).toBeCloseTo(alone, 9)
  })

  it('that let flow back do so when the vessel is the higher one', () => {
    const hot = filled(
      nitrogen,
      99e5,
      vessel(LUMPED, { ambient_T_K: 340, outside: { kind: 'fixed', coefficient_W_m2K: 200 } }),
      280,
    )
    const supply = header(nitrogen, 100e5)
    const shut = charge({ from: hot, supply, through: ORIFICE, stops: { for_s: 3000 } })
    const open = charge({ from: hot, supply, through: { ...ORIFICE, check: false }, stops: { for_s: 3000 } })
    expect(shut.p_Pa).toBeGreaterThan(105e5)
    expect(open.p_Pa / 100e5).toBeCloseTo(1, 4)
    expect(open.m_kg).toBeLessThan(shut.m_kg - 0.1)
  })

  it('that ramp raise the pressure by so much a second, whatever the heat', () => {
    const ramp: Path = { kind: 'ramp', rate_Pa_s: 2e5 }
    for (const shell of [LUMPED, LAYERS]) {
      const run = charge({
        from: filled(nitrogen, 5e5, vessel(shell)),
        supply: header(nitrogen),
        through: ramp,
        stops: { until_p_Pa: 205e5 },
      })
      expect(run.time_s).toBeCloseTo(100, 3)
    }
    const down = vent({ from: filled(nitrogen, 200e5, vessel(LUMPED)), through: ramp, stops: { until_p_Pa: 100e5 } })
    expect(down.time_s).toBeCloseTo(50, 3)
  })

  it('of a machine pass its flow until its highest pressure, at its delivery temperature', () => {
    const machine = { kind: 'machine', fluid: nitrogen, rate_kg_s: 0.01, T_K: 320, p_high_Pa: 210e5 } as const
    const from = filled(nitrogen, 5e5)
    const run = charge({ from, supply: machine, stops: { until_p_Pa: 200e5 } })
    expect(run.moved_kg).toBeCloseTo(0.01 * run.time_s!, 9)
    expect(() => charge({ from, supply: machine, stops: { until_p_Pa: 220e5 } })).toThrow(/210 bar/)
    const slowed = charge({
      from,
      supply: machine,
      through: { ...ORIFICE, diameter_m: 0.5e-3 },
      stops: { until_p_Pa: 200e5 },
    })
    expect(slowed.time_s).toBeGreaterThan(run.time_s! * 1.01)
  })

  it('of a pump draw down exponentially, slower towards its lowest pressure', () => {
    const pump: Path = { kind: 'pump', speed_m3_s: 0.005, p_low_Pa: 100 }
    const from = filled(IDEAL, 1e5)
    // Isothermal: V dp/dt = -S (p - p_low).
    const run = evacuate({ from, through: pump, stops: { until_p_Pa: 1000 }, heat: 'isothermal' })
    expect(run.time_s! / ((0.05 / 0.005) * Math.log((1e5 - 100) / (1000 - 100)))).toBeCloseTo(1, 5)
  })
})

describe('two vessels', () => {
  it('come to the same either way round', () => {
    const [a, b] = [filled(nitrogen, 200e5, vessel(LUMPED)), filled(nitrogen, 5e5, vessel(LAYERS))]
    const one = equalise({ a, b, through: ORIFICE, stops: { settled: true } })
    const other = equalise({ a: b, b: a, through: ORIFICE, stops: { settled: true } })
    expect(one.a.p_Pa / other.b.p_Pa).toBeCloseTo(1, 6)
    expect(one.a.m_kg / other.b.m_kg).toBeCloseTo(1, 5)
    expect(one.a.T_K).toBeCloseTo(AMBIENT_K, 1)
  })
})

describe('a hold', () => {
  it('settles at the pressure of its mass at the temperature around', () => {
    const hot = charge({
      from: filled(nitrogen, 5e5, vessel(LUMPED)),
      supply: header(nitrogen),
      through: ORIFICE,
      stops: { until_p_Pa: 200e5 },
    })
    const long = hold({ from: hot, stops: { settled: true } })
    const asked = hold({ from: hot, to_T_K: AMBIENT_K })
    expect(asked.time_s).toBeNull()
    expect(long.p_Pa / asked.p_Pa).toBeCloseTo(1, 4)
    expect(asked.p_Pa).toBeCloseTo(nitrogen.state('rhoT', hot.rho_kg_m3, AMBIENT_K).p_Pa, 3)
  })

  it('under fire warms by what is absorbed', () => {
    const v = vessel(LUMPED, { outside: { kind: 'absorbed', flux_W_m2: 20e3 } })
    const from = filled(nitrogen, 100e5, v)
    const run = hold({ from, stops: { for_s: 600 } })
    const taken = from.m_kg * (run.u_J_kg - from.u_J_kg) + 52 * 470 * (run.shell.mean_K - AMBIENT_K)
    expect(taken).toBeCloseTo(20e3 * 0.75 * 600, 0)
    expect(run.shell_peak_K).toBeGreaterThan(run.T_K)
  })

  it('with radiation cools a shell faster, down to the same temperature', () => {
    const settle = (emissivity: number) =>
      hold({
        from: filled(
          nitrogen,
          100e5,
          vessel(LUMPED, { outside: { kind: 'fixed', coefficient_W_m2K: 6, emissivity } }),
          340,
        ),
        stops: { settled: true },
      })
    expect(settle(0.9).time_s).toBeLessThan(0.6 * settle(0).time_s!)
    expect(settle(0.9).T_K).toBeCloseTo(AMBIENT_K, 1)
  })
})

describe('a liquefied gas', () => {
  const carbonDioxide = fluid('carbon_dioxide')
  const from = start(vessel(), carbonDioxide, { pair: 'Tx', a: 285, b: 0.1 })

  it.each(['vapour', 'liquid', 'mixed'] as const)('drawn as %s keeps its balance', (draw) => {
    const run = vent({ from, through: ORIFICE, draw, stops: { until_p_Pa: 20e5 } })
    expect(run.phase).toBe('two-phase')
    expect(run.balance.energy).toBeLessThan(1e-9)
    expect(run.T_K).toBeCloseTo(carbonDioxide.saturationAtP(20e5).T_K, 6)
  })

  it('keeps more when vapour is drawn than when liquid is', () => {
    const kept = (draw: 'vapour' | 'liquid' | 'mixed') =>
      vent({ from, through: ORIFICE, draw, stops: { until_p_Pa: 20e5 } }).m_kg
    expect(kept('vapour')).toBeGreaterThan(kept('mixed'))
    expect(kept('mixed')).toBeGreaterThan(kept('liquid'))
  })

  it('stops at its triple point and says so: dry ice is not modelled', () => {
    const run = vent({ from, through: ORIFICE, stops: { until_p_Pa: 2e5 } })
    expect(run.stoppedBy).toBe('triple_point')
    expect(run.T_K).toBeCloseTo(216.592, 1)
  })

  it('gives off a phase without a path as with one', () => {
    const timed = vent({ from, through: ORIFICE, draw: 'vapour', stops: { until_p_Pa: 20e5 }, rtol: 1e-8 })
    const balance = vent({ from, draw: 'vapour', stops: { until_p_Pa: 20e5 } })
    expect(timed.m_kg / balance.m_kg).toBeCloseTo(1, 6)
    expect(balance.time_s).toBeNull()
    expect(balance.trace).toBeNull()
  })
})

describe('what a run says of its course', () => {
  it('includes a peak between steps', () => {
    const from = filled(nitrogen, 5e5, vessel(LUMPED))
    const run = charge({ from, supply: header(nitrogen), through: ORIFICE, stops: { for_s: 400 } })
    const fine = charge({ from, supply: header(nitrogen), through: ORIFICE, stops: { for_s: 400 }, rtol: 1e-10 })
    expect(run.T_peak_K).toBeGreaterThan(run.T_K + 5)
    expect(run.T_peak_K).toBeCloseTo(fine.T_peak_K, 2)
    expect(run.flow_peak_kg_s).toBeCloseTo(fine.flow_peak_kg_s, 6)
  })

  it('is fine enough to be drawn with straight lines', () => {
    const from = filled(nitrogen, 200e5)
    const run = vent({ from, through: ORIFICE, stops: { until_p_Pa: 5e5 } })
    const { t_s, T_K } = run.trace!
    const fine = vent({ from, through: ORIFICE, stops: { until_p_Pa: 5e5 }, rtol: 1e-10 }).trace!
    fine.t_s.forEach((t, i) => {
      const after = t_s.findIndex((at) => at >= t)
      const next = after < 0 ? t_s.length - 1 : Math.max(1, after)
      const share = (t - t_s[next - 1]) / (t_s[next] - t_s[next - 1])
      const drawn = T_K[next - 1] + share * (T_K[next] - T_K[next - 1])
      expect(Math.abs(drawn - fine.T_K[i])).toBeLessThan(1.5)
    })
  })
})
