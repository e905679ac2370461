/** A function of one variable that is evaluated into its fields, so that a search allocates nothing. */
export interface Objective {
  value: number
  slope: number
  evaluate(x: number): void
}

const MOST = 120

/**
 * The zero of a function that rises (or falls) from below zero to above it (or back) between two bounds, once. Each step goes through the last two points and
 * their slopes (a cubic in the inverse function; the first by Newton's method), kept between the bounds by halving, so that
 * it always ends.
 * @param tolerance a step this small, relative to x, ends the search
 * @returns the last x at which the objective was evaluated; `value / slope` there is the step that was not worth taking.
 *   NaN where the bounds enclose no zero.
 */
export function monotoneRoot(
  f: Objective,
  direction: 'rising' | 'falling',
  low: number,
  high: number,
  guess: number,
  tolerance: number,
): number {
  const rising = direction === 'rising'
  let [a, b] = [low, high]
  let x = guess > a && guess < b ? guess : (a + b) / 2
  let [x0, f0, g0] = [NaN, NaN, NaN]
  let lastStep = Infinity
  for (let i = 0; i < MOST; i++) {
    f.evaluate(x)
    const { value, slope } = f
    if (value === 0) return x
    if (value > 0 === rising) b = x
    else a = x
    // over a stretch that runs the other way only the bounds help
    const helps = slope > 0 === rising
    let step = helps ? -value / slope : Infinity
    if (Math.abs(step) <= tolerance * Math.abs(x)) return x
    const t = -value / (f0 - value)
    if (helps && Math.abs(t) < 0.5 && g0 * slope > 0) {
      const h = f0 - value
      step = t * t * (3 - 2 * t) * (x0 - x) + h * (t * (1 - t) * (1 - t) * (1 / slope) + t * t * (t - 1) * (1 / g0))
    }
    x0 = x
    f0 = value
    g0 = slope
    let next = x + step
    const wild = !(next > a && next < b) || Math.abs(step) > 0.7 * Math.abs(lastStep)
    if (wild && !(i < 2 && next > a && next < b)) {
      // a step that leaves the bounds by little means a zero next to them; else halve
      if (Number.isFinite(step) && i < 3) next = step > 0 ? b - 0.01 * (b - x) : a + 0.01 * (x - a)
      else next = a > 0 && b > 4 * a ? Math.sqrt(a * b) : (a + b) / 2
    }
    if (next === x || b - a <= 2e-16 * Math.abs(b)) return isEnd(x, low) || isEnd(x, high) ? NaN : x
    lastStep = next - x
    x = next
  }
  return NaN
}

/** A search that runs up against a bound has found that there is no zero. */
const isEnd = (x: number, bound: number) => Math.abs(x - bound) <= 1e-15 * Math.abs(bound)
