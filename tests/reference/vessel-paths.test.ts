import { describe, expect, it } from 'vitest'
import { idealGas } from '@/lib/fluids'
import { flowThrough, KV_PER_CV, vent, type Path } from '@/lib/vessel'
import { filled, fluid, IDEAL, ORIFICE, vessel } from '../vessel/vessels'

describe('an orifice', () => {
  it('passes air, choked, at 0.0404 p A/√T in SI (Fliegner’s formula)', () => {
    const air = fluid('air')
    const orifice: Path = { kind: 'orifice', diameter_m: 0.01, dischargeCoefficient: 1 }
    const area = (Math.PI * 0.01 ** 2) / 4
    for (const T_K of [280, 300, 340]) {
      const flow = flowThrough(orifice, air, air.state('pT', 2e5, T_K), 0)
      expect(Math.abs((flow * Math.sqrt(T_K)) / (2e5 * area) / 0.0404 - 1)).toBeLessThan(3e-3)
    }
  })

  it('passes an ideal gas as de Saint-Venant and Wantzel’s closed formula says, choked and not', () => {
    const orifice: Path = { kind: 'orifice', diameter_m: 0.01, dischargeCoefficient: 0.8 }
    const area = (0.8 * Math.PI * 0.01 ** 2) / 4
    const [k, R] = [1.4, IDEAL.info.gasConstant_J_kgK]
    const [p0, T0] = [10e5, 300]
    for (const ratio of [0.1, 0.5, 0.53, 0.6, 0.8, 0.95, 0.999, 0.99995]) {
      const r = Math.max(ratio, (2 / (k + 1)) ** (k / (k - 1)))
      const exact = area * p0 * Math.sqrt(((2 * k) / ((k - 1) * R * T0)) * (r ** (2 / k) - r ** ((k + 1) / k)))
      expect(Math.abs(flowThrough(orifice, IDEAL, IDEAL.state('pT', p0, T0), ratio * p0) / exact - 1)).toBeLessThan(
        1e-9,
      )
    }
  })

  it('lets an ideal gas down, choked and adiabatic, as the closed solution of the isentropic let-down says', () => {
    const from = filled(IDEAL, 200e5, vessel(), 300)
    const run = vent({ from, through: ORIFICE, stops: { until_p_Pa: 20e5 }, rtol: 1e-9 })
    const [k, R, V] = [1.4, IDEAL.info.gasConstant_J_kgK, 0.05]
    const area = (0.84 * Math.PI * 2.5e-3 ** 2) / 4
    const tau = (V / (area * Math.sqrt(k * R * 300))) * ((k + 1) / 2) ** ((k + 1) / (2 * (k - 1)))
    const time = ((2 * tau) / (k - 1)) * ((20 / 200) ** (-(k - 1) / (2 * k)) - 1)
    expect(Math.abs(run.time_s! / time - 1)).toBeLessThan(1e-8)
    expect(Math.abs(run.T_K / (300 * 0.1 ** (0.4 / 1.4)) - 1)).toBeLessThan(1e-8)
  })
})

describe('a valve', () => {
  it('needs Kv 62.7 for 3,800 m³/h of carbon dioxide (IEC 60534-2-1, worked example of non-choked gas flow; from memory)', () => {
    // The example takes a heat capacity ratio of 1.30 and a real density of 8.389 kg/m³, 0.9 % above this ideal gas.
    const gas = idealGas({ k: 1.3, molarMass_kg_mol: 0.04401 })
    const normalDensity = (0.04401 * 101325) / (8.314462618 * 273.15)
    const wanted = (3800 * normalDensity) / 3600
    const each = flowThrough({ kind: 'valve', Kv_m3_h: 1, xT: 0.6 }, gas, gas.state('pT', 680e3, 433), 310e3)
    expect(Math.abs(wanted / each / 62.7 - 1)).toBeLessThan(0.01)
  })

  it('chokes at x = Fγ xT with Y = 2/3 (IEC 60534-2-1)', () => {
    const gas = idealGas({ k: 1.4, molarMass_kg_mol: 0.0289647 })
    const up = gas.state('pT', 10e5, 300)
    const valve: Path = { kind: 'valve', Kv_m3_h: 5, xT: 0.7 }
    const choked = 3.16 * 5 * (2 / 3) * Math.sqrt(0.7 * 1000 * up.rho_kg_m3)
    for (const back of [0, 1e5, 2.99e5]) {
      expect(Math.abs((flowThrough(valve, gas, up, back) * 3600) / choked - 1)).toBeLessThan(1e-9)
    }
    expect(flowThrough(valve, gas, up, 3.5e5) * 3600).toBeLessThan(choked * 0.9999)
  })

  it('with a Cv has a Kv 1.156 times smaller (IEC 60534-1)', () => {
    expect(1 / KV_PER_CV).toBeCloseTo(1.156, 12)
  })
})

describe('a pneumatic component', () => {
  const air = () => fluid('air')
  const part: Path = { kind: 'sonic', C_m3_sPa: 2e-8, b: 0.32, m: 0.5 }

  it('passes C ρ0 p1 √(T0/T1) when choked (ISO 6358-1: 2 dm³/(s bar) of air at 7 bar and 20 °C are 16.6 g/s)', () => {
    const flow = flowThrough(part, air(), air().state('pT', 7e5, 293.15), 2e5)
    expect(Math.abs(flow / (2e-8 * 1.185 * 7e5) - 1)).toBeLessThan(1e-3)
  })

  it('and √(1 - ((r - b)/(1 - b))²) of it when not', () => {
    const up = air().state('pT', 7e5, 293.15)
    const choked = flowThrough(part, air(), up, 1e5)
    for (const r of [0.4, 0.6, 0.9]) {
      const factor = Math.sqrt(1 - ((r - 0.32) / 0.68) ** 2)
      expect(flowThrough(part, air(), up, r * up.p_Pa) / choked).toBeCloseTo(factor, 10)
    }
  })
})
