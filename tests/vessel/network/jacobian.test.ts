import { describe, expect, it } from 'vitest'
import type { Shell } from '@/lib/vessel'
import { Network } from '@/lib/vessel/network/system'
import { Reservoir } from '@/lib/vessel/network/boundary'
import { link, ofBoundary, ofVolume, volumeFrom } from '@/lib/vessel/operations/parts'
import { bank, filled, fluid, LAYERS, LUMPED, ORIFICE, vessel } from '../vessels'

const jet = { inside: { kind: 'jet', inletDiameter_m: 5e-3, diameter_m: 0.23 } } as const

/** Column by column, with central differences, each time from scratch. */
function plainJacobian(make: () => { network: Network; y: Float64Array }) {
  const { network, y } = make()
  const n = network.size
  const scales = new Float64Array(n)
  network.rates(y, new Float64Array(n))
  network.scales(scales)
  const active = n - network.quadratures
  const out = new Float64Array(n * n)
  for (let column = 0; column < active; column++) {
    const sides = [1, -1].map((side) => {
      const { network: fresh, y: moved } = make()
      moved[column] += side * 1e-5 * scales[column]
      const rates = new Float64Array(n)
      fresh.rates(moved, rates)
      return { at: moved[column], rates }
    })
    for (let row = 0; row < n; row++) {
      out[row * n + column] = (sides[0].rates[row] - sides[1].rates[row]) / (sides[0].at - sides[1].at)
    }
  }
  return { network, y, scales, plain: out }
}

function charging(shell: Shell, inside: object) {
  const nitrogen = fluid('nitrogen')
  const from = filled(nitrogen, 50e5, vessel(shell, inside), 300)
  const volume = volumeFrom(
    { ...from, shell: { ...from.shell, cells_K: from.shell.cells_K.map((T, i) => T + 5 + i) } },
    'by_coefficients',
  )
  const reservoir = ofBoundary(new Reservoir(nitrogen, 300e5, 288))
  const way = { from: reservoir, to: ofVolume(volume), fluid: nitrogen, path: ORIFICE, mass_kg: 1, bothWays: false }
  const network = new Network([volume], [link(way)])
  const y = new Float64Array(network.size)
  volume.write(from.m_kg, from.u_J_kg, y, 0)
  return { network, y }
}

function twoVessels() {
  const nitrogen = fluid('nitrogen')
  const cool = filled(nitrogen, 40e5, vessel(LAYERS, jet))
  const a = { ...cool, shell: { ...cool.shell, cells_K: cool.shell.cells_K.map((T, i) => T + 5 + i) } }
  const b = bank(nitrogen, 1, 90e5, vessel(LUMPED)).contents
  const volumes = [volumeFrom(a, 'by_coefficients'), volumeFrom(b, 'by_coefficients')]
  const way = {
    from: ofVolume(volumes[1]),
    to: ofVolume(volumes[0]),
    fluid: nitrogen,
    path: ORIFICE,
    mass_kg: 1,
    bothWays: true,
  }
  const network = new Network(volumes, [link(way)])
  const y = new Float64Array(network.size)
  volumes[0].write(a.m_kg, a.u_J_kg, y, network.at[0])
  volumes[1].write(b.m_kg, b.u_J_kg, y, network.at[1])
  return { network, y }
}

describe('the Jacobian of a network', () => {
  it.each([
    ['a vessel with layers and a jet', () => charging(LAYERS, jet)],
    ['a vessel with a lumped shell', () => charging(LUMPED, {})],
    ['two vessels with shells', twoVessels],
  ])('by sets of cells is that by single columns: %s', (_, make) => {
    const { network, y, scales, plain } = plainJacobian(make)
    const n = network.size
    const f = new Float64Array(n)
    const found = new Float64Array(n * n)
    network.rates(y, f)
    network.jacobian(y, f, found)
    for (let row = 0; row < n; row++) {
      // Compare what each entry does to its row over a whole scale of its column.
      const size = Math.max(...Array.from({ length: n }, (__, j) => Math.abs(plain[row * n + j] * scales[j])))
      for (let column = 0; column < n; column++) {
        const difference = Math.abs((found[row * n + column] - plain[row * n + column]) * scales[column])
        expect(difference).toBeLessThanOrEqual(2e-4 * size)
      }
    }
  })

  it('has columns that conserve mass and energy', () => {
    const { network, y } = twoVessels()
    const n = network.size
    const f = new Float64Array(n)
    const jacobian = new Float64Array(n * n)
    network.rates(y, f)
    network.jacobian(y, f, jacobian)
    const [a, b] = network.at
    for (let column = 0; column < n - network.quadratures; column++) {
      const [first, second] = [jacobian[a * n + column], jacobian[b * n + column]]
      expect(Math.abs(first + second)).toBeLessThanOrEqual(1e-6 * Math.max(Math.abs(first), 1e-9))
    }
  })
})
