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
}
