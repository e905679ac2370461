/**
 * Where g falls to zero between a (g(a) > 0) and b (g(b) ≤ 0): the last point found at which g is still ≥ 0, within
 * `tolerance` of zero there, or as close as numbers get. Never more than `limit` evaluations (regula falsi in the Illinois form, held by bisection).
 */
export function fallToZero(
  g: (x: number) => number,
  a: number,
  ga: number,
  b: number,
  gb: number,
  tolerance: number,
  limit = 80,
): number {
  let [low, glow, high, ghigh] = [a, ga, b, gb]
  let [weightLow, weightHigh] = [1, 1]
  let last = 0
  for (let count = 0; count < limit; count++) {
    if (glow <= tolerance || high - low <= 4e-16 * Math.abs(high)) break
    const width = high - low
    const secant = low + (width * glow * weightLow) / (glow * weightLow - ghigh * weightHigh)
    // Every fourth point halves the bracket, so that a jump in g costs a bounded number of evaluations.
    const x = count % 4 === 3 || !(secant > low && secant < high) ? low + width / 2 : secant
    if (x === low || x === high) break
    const gx = g(x)
    if (gx >= 0) {
      ;[low, glow] = [x, gx]
      weightHigh = last === 1 ? weightHigh / 2 : 1
      weightLow = 1
      last = 1
    } else {
      ;[high, ghigh] = [x, gx]
      weightLow = last === -1 ? weightLow / 2 : 1
      weightHigh = 1
      last = -1
    }
  }
  return low
}
