import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Fluid } from '@/lib/fluids'
import { film, heatIn } from '@/lib/vessel/heat/inside'
import { heatOut } from '@/lib/vessel/heat/outside'
import { IDEAL } from '../vessels'

/** An ideal gas with the transport properties of air at 300 K. */
const air: Fluid = Object.create(IDEAL, {
  viscosity_Pa_s: { value: () => 1.846e-5 },
  conductivity_W_mK: { value: () => 0.0263 },
})
const gas = air.state('pT', 1e5, 300)
const prandtl = (1.846e-5 * gas.cp_J_kgK) / 0.0263

describe('free convection', () => {
  it('is that of Churchill and Chu, with the expansion of an ideal gas', () => {
    const [height, difference] = [0.6, 20]
    const rayleigh = (((9.80665 / 300) * difference * height ** 3 * gas.rho_kg_m3 ** 2) / 1.846e-5 ** 2) * prandtl
    const nusselt = (0.825 + (0.387 * rayleigh ** (1 / 6)) / (1 + (0.492 / prandtl) ** (9 / 16)) ** (8 / 27)) ** 2
    const layer = film({ kind: 'free', height_m: height }, air)
    layer.setGas(gas)
    expect(layer.coefficient(difference) / ((nusselt * 0.0263) / height)).toBeCloseTo(1, 9)
    expect(layer.coefficient(-difference)).toBe(layer.coefficient(difference))
    // McAdams’ simpler law for turbulent air on a wall, Nu = 0.1 Ra^(1/3), is near it.
    expect(nusselt / (0.1 * rayleigh ** (1 / 3))).toBeGreaterThan(0.9)
    expect(nusselt / (0.1 * rayleigh ** (1 / 3))).toBeLessThan(1.4)
  })
})

describe('a jet', () => {
  const layer = film({ kind: 'jet', inletDiameter_m: 4e-3, diameter_m: 0.24 }, air)
  layer.setGas(gas)

  it('stirs with the Reynolds number of its inlet to the power 0.67', () => {
    const forced = (flow: number) => {
      layer.setInflow(flow)
      return layer.coefficient(0)
    }
    expect(forced(0.02) / forced(0.01)).toBeCloseTo(2 ** 0.67, 9)
    const reynolds = (4 * 0.01) / (Math.PI * 4e-3 * 1.846e-5)
    expect(forced(0.01)).toBeCloseTo((0.56 * reynolds ** 0.67 * 0.0263) / 0.24, 6)
  })

  it('does not while gas flows out', () => {
    layer.setInflow(-0.05)
    const outward = layer.coefficient(10)
    layer.setInflow(0)
    expect(outward).toBe(layer.coefficient(10))
    expect(outward).toBeGreaterThan(0)
  })
})

describe('heat through the faces', () => {
  const out = { heat_W: 0, face_K: 0 }

  it('inside is the same through the film as through the half cell behind it', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 200, max: 400, noNaN: true }),
        fc.double({ min: 1e-4, max: 1, noNaN: true }),
        fc.constantFrom('free' as const, 'jet' as const, 'fixed' as const),
        (cell_K, resistance, kind) => {
          const layer = film(
            kind === 'free'
              ? { kind, height_m: 1 }
              : kind === 'jet'
                ? { kind, inletDiameter_m: 4e-3, diameter_m: 0.3 }
                : { kind, coefficient_W_m2K: 40 },
            air,
          )
          layer.setGas(gas)
          layer.setInflow(0.003)
          heatIn(layer, 0.7, 300, cell_K, resistance, out)
          const conducted = (cell_K - out.face_K) / resistance
          const scale = Math.abs(out.heat_W) + 1e-6
          expect(Math.abs(out.heat_W - conducted) / scale).toBeLessThan(1e-8 + 1e-10 / (resistance * scale))
          const through = 0.7 * layer.coefficient(out.face_K - 300) * (out.face_K - 300)
          expect(Math.abs(out.heat_W - through) / scale).toBeLessThan(1e-8)
        },
      ),
    )
  })

  it('outside is convection and radiation at the face, and conduction to it', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 200, max: 900, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 0.5, noNaN: true }),
        (cell_K, emissivity, resistance) => {
          heatOut({ kind: 'fixed', coefficient_W_m2K: 8, emissivity }, 0.9, cell_K, resistance, 290, out)
          const lost = 0.9 * (8 * (out.face_K - 290) + emissivity * 5.670374419e-8 * (out.face_K ** 4 - 290 ** 4))
          expect(out.heat_W).toBeCloseTo(lost, 6)
          expect(cell_K - out.face_K).toBeCloseTo(resistance * lost, 6)
        },
      ),
    )
  })

  it('absorbed comes in whatever the temperature; without an outside nothing passes', () => {
    heatOut({ kind: 'absorbed', flux_W_m2: 50e3 }, 0.9, 700, 0.001, 290, out)
    expect(out.heat_W).toBe(-45e3)
    expect(out.face_K).toBe(745)
    heatOut(undefined, 0.9, 700, 0.001, 290, out)
    expect(out).toEqual({ heat_W: 0, face_K: 700 })
  })
})
