import { describe, expect, it } from 'vitest'
import { cascade, charge, serve, sizePath, vent, type Path } from '@/lib/vessel'
import { bank, filled, fluid, header, LUMPED, ORIFICE, vessel } from '../vessels'

const nitrogen = fluid('nitrogen')
const from = () => filled(nitrogen, 5e5, vessel(LUMPED))
const supply = header(nitrogen)
const stops = { until_p_Pa: 200e5 }

describe('sizing', () => {
  it.each([
    ['an orifice', { kind: 'orifice', dischargeCoefficient: 0.8 }],
    ['a valve', { kind: 'valve', xT: 0.7 }],
  ] as const)('finds %s that takes a given time', (_, path) => {
    const sized = sizePath(path, (through) => charge({ from: from(), supply, through, stops }), { time_s: 90 })
    expect(sized.run.time_s! / 90).toBeCloseTo(1, 6)
    expect(sized.residual).toBeLessThan(1e-6)
    expect(sized.runs).toBeLessThan(25)
    const again = charge({ from: from(), supply, through: sized.path, stops })
    expect(again.time_s).toBeCloseTo(sized.run.time_s!, 9)
  })

  it('finds the orifice that keeps the gas below a temperature', () => {
    const operation = (through: Path) => charge({ from: from(), supply, through, stops })
    const sized = sizePath({ kind: 'orifice', dischargeCoefficient: 0.8 }, operation, { T_peak_K: 330 })
    expect(sized.run.T_peak_K).toBeCloseTo(330, 3)
  })

  it('finds the orifice that keeps a shell above a temperature while it is let down', () => {
    const full = filled(nitrogen, 200e5, vessel(LUMPED))
    const operation = (through: Path) => vent({ from: full, through, stops: { until_p_Pa: 5e5 } })
    const sized = sizePath({ kind: 'orifice', dischargeCoefficient: 0.8 }, operation, { shell_low_K: 270 })
    expect(sized.run.shell_low_K).toBeCloseTo(270, 3)
  })

  it('says how near it comes where no size does it', () => {
    const adiabatic = filled(nitrogen, 5e5)
    const operation = (through: Path) => charge({ from: adiabatic, supply, through, stops })
    expect(() => sizePath({ kind: 'orifice', dischargeCoefficient: 0.8 }, operation, { T_peak_K: 330 })).toThrow(
      /no size does it: the nearest comes within/,
    )
  })
})

describe('a bank', () => {
  it('fills so many vessels and not one more', () => {
    const store = bank(nitrogen, 12, 300e5)
    const served = serve({ bank: store, from: filled(nitrogen, 5e5), until_p_Pa: 200e5 })
    expect(served.count).toBe(served.runs.length)
    expect(served.count).toBeGreaterThan(1)
    expect(served.next_p_Pa).toBeLessThan(200e5)
    const given = served.runs.reduce((sum, run) => sum + run.moved_kg, 0)
    const left = served.bank.kind === 'bank' ? 12 * served.bank.contents.m_kg : NaN
    expect(left + given).toBeCloseTo(12 * store.contents.m_kg, 8)
  })

  it('that has not the pressure fills none', () => {
    const served = serve({ bank: bank(nitrogen, 3, 150e5), from: filled(nitrogen, 5e5), until_p_Pa: 200e5 })
    expect(served.count).toBe(0)
    expect(served.next_p_Pa).toBeLessThan(150e5)
  })
})

describe('a cascade', () => {
  const banks = () => [bank(nitrogen, 4, 120e5), bank(nitrogen, 4, 220e5), bank(nitrogen, 4, 300e5)]

  it('goes from bank to bank and leaves more in the last than it alone would', () => {
    const { run, supplies, stages } = cascade({
      from: filled(nitrogen, 5e5),
      supplies: banks(),
      through: ORIFICE,
      stops,
    })
    expect(stages.map((stage) => stage.supply)).toEqual([0, 1, 2])
    expect(run.p_Pa / 200e5).toBeCloseTo(1, 9)
    expect(run.operation).toBe('cascade')
    const last = supplies[2].kind === 'bank' ? supplies[2].contents : null
    const alone = charge({ from: filled(nitrogen, 5e5), supply: banks()[2], stops })
    const leftAlone = alone.supply?.kind === 'bank' ? alone.supply.contents : null
    expect(last!.p_Pa).toBeGreaterThan(leftAlone!.p_Pa)
    const moved = supplies.reduce(
      (sum, left, i) => sum + (left.kind === 'bank' ? 4 * (banks()[i].contents.m_kg - left.contents.m_kg) : NaN),
      0,
    )
    expect(moved).toBeCloseTo(run.moved_kg, 8)
    expect(run.trace!.t_s.at(-1)).toBeCloseTo(run.time_s!, 9)
  })

  it('goes on sooner at a given flow', () => {
    const slow = cascade({ from: filled(nitrogen, 5e5), supplies: banks(), through: ORIFICE, stops })
    const quick = cascade({
      from: filled(nitrogen, 5e5),
      supplies: banks(),
      through: ORIFICE,
      stops,
      switchFlow_kg_s: 0.05,
    })
    expect(quick.run.time_s).toBeLessThan(slow.run.time_s!)
    expect(quick.stages[0].run.stoppedBy).toBe('until_flow')
  })

  it('passes over a bank that is below the vessel, and refuses what no bank reaches', () => {
    const { stages } = cascade({
      from: filled(nitrogen, 150e5),
      supplies: banks(),
      stops: { until_p_Pa: 225e5 },
    })
    expect(stages.map((stage) => stage.supply)).toEqual([1, 2])
    expect(() => cascade({ from: filled(nitrogen, 5e5), supplies: banks().slice(0, 2), stops })).toThrow(
      /short of what was asked/,
    )
    expect(() => cascade({ from: filled(nitrogen, 250e5), supplies: banks().slice(0, 2) })).toThrow(
      /no supply is above/,
    )
  })
})
