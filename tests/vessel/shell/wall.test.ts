import { describe, expect, it } from 'vitest'
import { wallOf } from '@/lib/vessel/shell/wall'
import type { Layer } from '@/lib/vessel'

const LINER: Layer = { thickness_m: 0.005, conductivity_W_mK: 0.4, density_kg_m3: 950, heatCapacity: 1800 }
const WRAP: Layer = { thickness_m: 0.03, conductivity_W_mK: 0.7, density_kg_m3: 1550, heatCapacity: 920 }

const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0)
const resistance = (wall: ReturnType<typeof wallOf>) =>
  wall.innerResistance_K_W + total(wall.conductance_W_K.map((g) => 1 / g)) + wall.outerResistance_K_W

describe('a wall of layers', () => {
  it('has the mass and the resistance of the layers, when plane', () => {
    const wall = wallOf({ kind: 'layers', layers: [LINER, WRAP], area_m2: 1.2 })
    expect(total(wall.mass_kg)).toBeCloseTo(1.2 * (0.005 * 950 + 0.03 * 1550), 12)
    expect(resistance(wall)).toBeCloseTo((0.005 / 0.4 + 0.03 / 0.7) / 1.2, 12)
    expect(wall.outerArea_m2).toBe(1.2)
  })

  it('has those of the cylinder it is, when round', () => {
    const [radius, length] = [0.15, 0.8]
    const area_m2 = 2 * Math.PI * radius * length
    const wall = wallOf({ kind: 'layers', layers: [LINER, WRAP], area_m2, innerDiameter_m: 2 * radius })
    const [r1, r2] = [radius + 0.005, radius + 0.035]
    const mass = Math.PI * length * (950 * (r1 ** 2 - radius ** 2) + 1550 * (r2 ** 2 - r1 ** 2))
    expect(total(wall.mass_kg)).toBeCloseTo(mass, 10)
    const conducted = (Math.log(r1 / radius) / 0.4 + Math.log(r2 / r1) / 0.7) / (2 * Math.PI * length)
    expect(resistance(wall)).toBeCloseTo(conducted, 12)
    expect(wall.outerArea_m2).toBeCloseTo(2 * Math.PI * r2 * length, 12)
  })

  it('is cut into some twenty cells, at least three a layer, or as it is told', () => {
    const wall = wallOf({ kind: 'layers', layers: [LINER, WRAP], area_m2: 1 })
    expect(wall.cells).toBeGreaterThanOrEqual(19)
    expect(wall.cells).toBeLessThanOrEqual(22)
    const thin = { ...LINER, thickness_m: 1e-4 }
    expect(wallOf({ kind: 'layers', layers: [thin], area_m2: 1 }).cells).toBe(20)
    expect(wallOf({ kind: 'layers', layers: [{ ...WRAP, cells: 7 }], area_m2: 1 }).cells).toBe(7)
  })
})

describe('a lumped shell', () => {
  it('is one cell with an area inside and out', () => {
    const shell = { kind: 'lumped', mass_kg: 52, heatCapacity: 470, area_m2: 0.75 } as const
    expect(wallOf(shell)).toMatchObject({ cells: 1, innerArea_m2: 0.75, outerArea_m2: 0.75, mass_kg: [52] })
    expect(wallOf({ ...shell, outsideArea_m2: 0.9 }).outerArea_m2).toBe(0.9)
  })
})
