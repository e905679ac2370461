/** The value of a function at a point, and its slope. */
export interface ValueAndSlope {
  value: number
  slope: number
}

export interface MonotoneOptions {
  /** The function changes its sign between these. */
  readonly low: number
  readonly high: number
  readonly guess: number
  /** A step this small, relative to the point, ends the search. */
  readonly tolerance: number
  readonly most: number
}

/**
 * The root of a monotone function between two bounds: Newton's method where it behaves, halving where it does not, so
 * that it always ends. Fills the last slope into `f` as it goes.
 * @param f writes value and slope at x into the object it is handed
 * @returns the root; NaN where the bounds enclose none after `most` steps
 */
export function monotoneRoot(f: (x: number, at: ValueAndSlope) => void, options: MonotoneOptions): number {
  const { tolerance, most } = options
  let { low, high } = options
  let x = options.guess > low && options.guess < high ? options.guess : (low + high) / 2
  const at: ValueAndSlope = { value: 0, slope: 0 }
  let lastStep = high - low
  for (let i = 0; i < most; i++) {
    f(x, at)
    if (at.value === 0) return x
    const rising = at.slope > 0
    if (at.value > 0 === rising) high = x
    else low = x
    const step = -at.value / at.slope
    const next = x + step
    const wild = !(next > low && next < high) || Math.abs(step) > 0.5 * Math.abs(lastStep)
    const taken = wild && i > 0 ? (low + high) / 2 : next > low && next < high ? next : (low + high) / 2
    lastStep = taken - x
    if (Math.abs(lastStep) <= tolerance * Math.abs(taken)) return taken
    x = taken
  }
  return NaN
}
