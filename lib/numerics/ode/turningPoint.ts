/** Where the cubic through two values with two slopes (per step) of opposite sign turns, as a fraction of the step. */
export function turningPoint(v0: number, v1: number, d0: number, d1: number): number {
  // The derivative is a θ² + b θ + d0.
  const a = 3 * (d0 + d1) - 6 * (v1 - v0)
  const b = 6 * (v1 - v0) - 4 * d0 - 2 * d1
  const root = Math.sqrt(Math.max(0, b * b - 4 * a * d0))
  const q = -(b + (b >= 0 ? root : -root)) / 2
  for (const theta of [q / a, d0 / q]) if (theta > 0 && theta < 1) return theta
  return 0.5
}
