import { describe, expect, it } from 'vitest'
import { hold, start, type Vessel } from '@/lib/vessel'
import { IDEAL } from '../vessel/vessels'

/*
 * A plane wall, at one temperature, whose inner face is suddenly exposed to a fluid of another through a film; outer face
 * insulated. H. S. Carslaw, J. C. Jaeger, Conduction of Heat in Solids (1959), 3.11:
 * θ = Σ 4 sin ζ / (2 ζ + sin 2ζ) exp(-ζ² Fo) cos(ζ x/L), ζ tan ζ = Bi, x from the insulated face.
 */
const [L, k, rho, c, h] = [0.02, 15, 7900, 480, 400]
const BIOT = (h * L) / k

function eigenvalues(count: number): number[] {
  return Array.from({ length: count }, (_, n) => {
    let [low, high] = [n * Math.PI, n * Math.PI + Math.PI / 2 - 1e-12]
    for (let i = 0; i < 200; i++) {
      const middle = (low + high) / 2
      if (middle * Math.tan(middle) > BIOT) high = middle
      else low = middle
    }
    return (low + high) / 2
  })
}

/** Temperature difference to the fluid over the first one, at a depth x from the insulated face, and its mean. */
function series(fourier: number, x: number) {
  let at = 0
  let mean = 0
  for (const z of eigenvalues(60)) {
    const part = ((4 * Math.sin(z)) / (2 * z + Math.sin(2 * z))) * Math.exp(-z * z * fourier)
    at += part * Math.cos((z * x) / L)
    mean += (part * Math.sin(z)) / z
  }
  return { at, mean }
}

/** So much gas that its temperature stays. */
const wall = (cells: number): Vessel => ({
  volume_m3: 1e7,
  shell: {
    kind: 'layers',
    layers: [{ thickness_m: L, conductivity_W_mK: k, density_kg_m3: rho, heatCapacity: c, cells }],
    area_m2: 1,
  },
  inside: { kind: 'fixed', coefficient_W_m2K: h },
  ambient_T_K: 300,
})

function heatedFor(fourier: number, cells: number) {
  const time = (fourier * L * L * rho * c) / k
  const from = start(wall(cells), IDEAL, { pair: 'pT', a: 1e5, b: 400 }, 300)
  const { shell } = hold({ from, stops: { for_s: time }, rtol: 1e-8 })
  const theta = (T_K: number) => (400 - T_K) / 100
  return { mean: theta(shell.mean_K), inner: theta(shell.inner_K), outer: theta(shell.outer_K) }
}

describe('conduction in a slab', () => {
  it.each([0.05, 0.2, 1, 3])('follows the series solution at Fo = %s', (fourier) => {
    const found = heatedFor(fourier, 40)
    expect(Math.abs(found.mean - series(fourier, 0).mean)).toBeLessThan(2e-4)
    expect(Math.abs(found.inner - series(fourier, L).at)).toBeLessThan(4e-4)
    // The outer face is read off the outermost cell, half a cell under an insulated face.
    expect(Math.abs(found.outer - series(fourier, L / 80).at)).toBeLessThan(2e-4)
  })

  it('has an error that falls with the square of the cell', () => {
    const exact = series(0.2, 0).mean
    const [coarse, fine] = [10, 20].map((cells) => Math.abs(heatedFor(0.2, cells).mean - exact))
    expect(Math.log2(coarse / fine)).toBeGreaterThan(1.8)
  })
})
