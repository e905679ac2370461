import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { ALUMINIUM, POLYMER, STEEL } from '@/lib/vessel'
import { caloric, type HeatCapacity } from '@/lib/vessel/shell/heatCapacity'

const TABLES: readonly HeatCapacity[] = [STEEL, ALUMINIUM, POLYMER, 470]

describe('energy of a solid', () => {
  it('and temperature are each other’s inverse, beyond the table too', () => {
    fc.assert(
      fc.property(fc.constantFrom(...TABLES), fc.double({ min: 20, max: 1500, noNaN: true }), (c, T_K) => {
        const solid = caloric(c)
        expect(Math.abs(solid.temperature_K(solid.energy_J_kg(T_K)) - T_K)).toBeLessThan(1e-10 * T_K)
      }),
    )
  })

  it('rises with temperature as the heat capacity says', () => {
    fc.assert(
      fc.property(fc.constantFrom(...TABLES), fc.double({ min: 60, max: 900, noNaN: true }), (c, T_K) => {
        const solid = caloric(c)
        const d = 0.01
        const slope = (solid.energy_J_kg(T_K + d) - solid.energy_J_kg(T_K - d)) / (2 * d)
        expect(Math.abs(slope / solid.capacity_J_kgK(T_K) - 1)).toBeLessThan(2e-4)
      }),
    )
  })

  it('is counted from 0 °C, by a constant as by a table', () => {
    for (const c of TABLES) expect(caloric(c).energy_J_kg(273.15)).toBeCloseTo(0, 9)
  })
})

describe('materials', () => {
  it('carry the values of the standards at 100 °C and 400 °C', () => {
    const steel = (θ: number) => 425 + 0.773 * θ - 1.69e-3 * θ ** 2 + 2.22e-6 * θ ** 3
    for (const θ of [100, 200, 400]) {
      expect(caloric(STEEL).capacity_J_kgK(θ + 273.15)).toBeCloseTo(steel(θ), 0)
      expect(caloric(ALUMINIUM).capacity_J_kgK(θ + 273.15)).toBeCloseTo(903 + 0.41 * θ, 0)
    }
  })
})
