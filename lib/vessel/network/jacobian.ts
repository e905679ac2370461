import type { Network } from './system'

/** Relative step of the difference quotients: a balance between curvature and the noise of an iterated state. */
const DIFFERENCE = 3e-8
/** A cell of a wall feels itself and its neighbours, so every third can be moved at once. */
const STRIDE = 3

/**
 * Jacobian of a network by differences. Cells of a wall are moved three sets a volume, with the contents as they are
 * (their state is not worked out again); masses and energies one at a time.
 */
export function differenceJacobian(network: Network, y: Float64Array, f: Float64Array, out: Float64Array): void {
  const n = network.size
  const moved = Float64Array.from(y)
  const rates = new Float64Array(n)
  const scales = new Float64Array(n)
  out.fill(0)
  network.rates(y, rates)
  network.scales(scales)
  const quotient = (row: number, column: number) => {
    out[row * n + column] = (rates[row] - f[row]) / (moved[column] - y[column])
  }
  network.volumes.forEach((volume, index) => {
    const first = network.at[index] + 2
    const last = first + volume.cells - 1
    const lost = network.heatLedger(index) + 1
    for (let set = first; set < first + Math.min(STRIDE, volume.cells); set++) {
      for (let cell = set; cell <= last; cell += STRIDE) moved[cell] = y[cell] + DIFFERENCE * scales[cell]
      network.rates(moved, rates)
      for (let cell = set; cell <= last; cell += STRIDE) {
        for (let row = Math.max(first, cell - 1); row <= Math.min(last, cell + 1); row++) quotient(row, cell)
        if (cell === last) quotient(lost, cell)
      }
      // The innermost cell alone is felt beyond the wall: by the contents, and by all that follows from them.
      if (set === first) {
        for (let row = 0; row < n; row++) if ((row < first || row > last) && row !== lost) quotient(row, first)
      }
      for (let cell = set; cell <= last; cell += STRIDE) moved[cell] = y[cell]
    }
  })
  network.volumes.forEach((_, index) => {
    for (let column = network.at[index]; column < network.at[index] + 2; column++) {
      moved[column] = y[column] + DIFFERENCE * scales[column]
      network.rates(moved, rates)
      for (let row = 0; row < n; row++) quotient(row, column)
      moved[column] = y[column]
    }
  })
  conserve(network, out)
}

/**
 * Makes each column conserve mass and energy exactly, which differences do to rounding over their step alone: rows of
 * contents are put together anew from the rows of what crosses their borders, and each cell's own entry closes its wall's.
 */
function conserve(network: Network, out: Float64Array): void {
  const n = network.size
  const active = n - network.quadratures
  network.volumes.forEach((volume, index) => {
    const at = network.at[index]
    const ledger = network.heatLedger(index)
    const last = at + 2 + volume.cells
    for (let column = 0; column < active; column++) {
      let mass = 0
      let energy = out[ledger * n + column]
      network.connections.forEach((_, i) => {
        const side = Number(network.sinks[i] === at) - Number(network.sources[i] === at)
        mass += side * out[network.flowLedger(i) * n + column]
        energy += side * out[(network.flowLedger(i) + 1) * n + column]
      })
      out[at * n + column] = mass
      out[(at + 1) * n + column] = energy
      if (volume.cells === 0) continue
      let kept = -out[ledger * n + column] - out[(ledger + 1) * n + column]
      const own = column >= at + 2 && column < last ? column : at + 2
      for (let row = at + 2; row < last; row++) if (row !== own) kept -= out[row * n + column]
      out[own * n + column] = kept
    }
  })
}
