/**
 * LU factors of a small dense matrix (row-major, n × n) with row pivoting, in place.
 * Returns false when the matrix is singular to working precision.
 */
export function factorize(a: Float64Array, n: number, pivots: Int32Array): boolean {
  for (let col = 0; col < n; col++) {
    let best = col
    for (let row = col + 1; row < n; row++) {
      if (Math.abs(a[row * n + col]) > Math.abs(a[best * n + col])) best = row
    }
    pivots[col] = best
    const pivot = a[best * n + col]
    if (pivot === 0 || !Number.isFinite(pivot)) return false
    if (best !== col) {
      for (let j = 0; j < n; j++) {
        const held = a[col * n + j]
        a[col * n + j] = a[best * n + j]
        a[best * n + j] = held
      }
    }
    for (let row = col + 1; row < n; row++) {
      const at = row * n
      const factor = a[at + col] / pivot
      a[at + col] = factor
      // Conduction makes most of the matrix zero: rows that the pivot does not touch cost nothing.
      if (factor === 0) continue
      for (let j = col + 1; j < n; j++) a[at + j] -= factor * a[col * n + j]
    }
  }
  return true
}

/** Solves with the factors of `factorize`; b becomes the solution. */
export function solveFactorized(a: Float64Array, n: number, pivots: Int32Array, b: Float64Array): void {
  for (let i = 0; i < n; i++) {
    const at = pivots[i]
    if (at === i) continue
    const held = b[i]
    b[i] = b[at]
    b[at] = held
  }
  for (let i = 1; i < n; i++) {
    let sum = b[i]
    for (let j = 0; j < i; j++) sum -= a[i * n + j] * b[j]
    b[i] = sum
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]
    for (let j = i + 1; j < n; j++) sum -= a[i * n + j] * b[j]
    b[i] = sum / a[i * n + i]
  }
}
