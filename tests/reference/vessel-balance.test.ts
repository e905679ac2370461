import { describe, expect, it } from 'vitest'
import { charge, equalise, start, vent, type Vessel } from '@/lib/vessel'
import { filled, fluid, IDEAL, vessel } from '../vessel/vessels'

const water = () => fluid('water')
const adiabatic: Vessel = { volume_m3: 0.1, shell: { kind: 'none' }, ambient_T_K: 293.15 }

describe('an evacuated rigid adiabatic tank that fills from a steam line until pressures are equal', () => {
  const fillFrom = (p_Pa: number, T_C: number) =>
    charge({
      from: start(adiabatic, water(), 'evacuated'),
      supply: { kind: 'header', fluid: water(), p_Pa, T_K: T_C + 273.15 },
      stops: { level: true },
    })

  it('1 MPa, 300 °C: ends at 456 °C (Çengel, Boles, Thermodynamics, charging of a rigid tank by steam; from memory)', () => {
    expect(Math.abs(fillFrom(1e6, 300).T_K - 273.15 - 456)).toBeLessThan(0.6)
  })

  it('1.4 MPa, 300 °C: ends at 452 °C (Sonntag, Borgnakke, Van Wylen, Fundamentals of Thermodynamics; from memory)', () => {
    expect(Math.abs(fillFrom(1.4e6, 300).T_K - 273.15 - 452)).toBeLessThan(0.6)
  })
})

describe('a 0.85 m³ tank of water at 260 °C, quality 0.7, from which vapour is let at constant temperature', () => {
  it('takes up 14,162 kJ until saturated vapour is left (Moran, Shapiro, Fundamentals of Engineering Thermodynamics; from memory)', () => {
    const tank: Vessel = { volume_m3: 0.85, shell: { kind: 'none' }, ambient_T_K: 293.15 }
    const from = start(tank, water(), { pair: 'Tx', a: 260 + 273.15, b: 0.7 })
    const run = vent({ from, draw: 'vapour', heat: 'isothermal', stops: { until_x: 1 } })
    expect(run.stoppedBy).toBe('until_x')
    expect(from.m_kg).toBeCloseTo(28.4, 1)
    expect(run.m_kg).toBeCloseTo(20.14, 1)
    expect(Math.abs(run.heat_J / 1e3 - 14_162)).toBeLessThan(40)
  })
})

describe('two vessels of an ideal gas that equalise adiabatically', () => {
  /*
   * Closed solution: pressure from the energy of both; what stays behind has expanded isentropically; mass balance gives
   * the rest.
   */
  it('end at the pressure of their joint energy, the giver on its isentrope', () => {
    const [a, b] = [
      filled(IDEAL, 200e5, vessel(), 300),
      filled(IDEAL, 5e5, vessel({ kind: 'none' }, { volume_m3: 0.12 }), 280),
    ]
    const { a: giver, b: taker } = equalise({ a, b })
    const p = (a.p_Pa * 0.05 + b.p_Pa * 0.12) / 0.17
    const T = a.T_K * (p / a.p_Pa) ** (0.4 / 1.4)
    const R = IDEAL.info.gasConstant_J_kgK
    const given = (0.05 / R) * (a.p_Pa / a.T_K - p / T)
    expect(Math.abs(giver.p_Pa / p - 1)).toBeLessThan(3e-6)
    expect(Math.abs(taker.p_Pa / p - 1)).toBeLessThan(3e-6)
    expect(Math.abs(giver.T_K / T - 1)).toBeLessThan(1e-6)
    expect(Math.abs(taker.moved_kg / given - 1)).toBeLessThan(3e-6)
    expect(Math.abs(taker.T_K / ((p * 0.12) / R / (b.m_kg + given)) - 1)).toBeLessThan(3e-6)
  })
})
