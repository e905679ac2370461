/** The two sides of the two-phase region. */
export type Side = 0 | 1
export const LIQUID: Side = 0
export const VAPOUR: Side = 1

/** One temperature's entry: saturated density, pressure, internal energy and entropy of one side. */
export interface Entry {
  readonly rho: number
  readonly p_Pa: number
  readonly u: number
  readonly s: number
}

const ORDER = 8
/** Of Lagrange's polynomial through eight points at equal steps. */
const WEIGHTS = [-1, 7, -21, 35, -35, 21, -7, 1]
export const STEP = 0.0025

/**
 * The edges of the two-phase region as a table of an equation of state's own solutions, at equal steps of
 * σ = (1 − T/T_top)^exponent, in which densities run smoothly into the critical point. Between entries it is good to some
 * 1e-10: enough to tell on which side of the edge a state lies, and for one step of Newton's method to end at the last digit.
 */
export class SaturationTable {
  readonly size: number
  private readonly lnRho: readonly [Float64Array, Float64Array]
  private readonly lnP: readonly [Float64Array, Float64Array]
  private readonly u: readonly [Float64Array, Float64Array]
  private readonly s: readonly [Float64Array, Float64Array]

  constructor(
    readonly T_top_K: number,
    readonly rho_top: number,
    readonly T_low_K: number,
    readonly exponent: number,
  ) {
    // beyond the lower end, so that its neighbourhood is interpolated too
    this.size = Math.ceil((1 - T_low_K / T_top_K) ** exponent / STEP) + 3
    const pair = () => [new Float64Array(this.size), new Float64Array(this.size)] as const
    this.lnRho = pair()
    this.lnP = pair()
    this.u = pair()
    this.s = pair()
  }

  /** Temperature of entry i; entry 0 is one step below the top. */
  T_at(i: number): number {
    return this.T_top_K * (1 - ((i + 1) * STEP) ** (1 / this.exponent))
  }

  set(side: Side, i: number, { rho, p_Pa, u, s }: Entry): void {
    this.lnRho[side][i] = Math.log(rho / this.rho_top) / ((i + 1) * STEP)
    this.lnP[side][i] = Math.log(p_Pa)
    this.u[side][i] = u
    this.s[side][i] = s
  }

  /** The density that the entries so far lead to, one further on in either direction. */
  ahead(side: Side, i: number, direction: 1 | -1, start: number): number {
    const table = this.lnRho[side]
    const known = Math.min(Math.abs(i - start), 5)
    let value = 0
    for (let k = 1; k <= known; k++) value += AHEAD[known][k - 1] * table[i - k * direction]
    return this.rho_top * Math.exp((i + 1) * STEP * value)
  }

  rho(side: Side, T_K: number): number {
    const sigma = this.sigma(T_K)
    return this.rho_top * Math.exp(sigma * interpolate(this.lnRho[side], sigma / STEP - 1))
  }

  p_Pa(side: Side, T_K: number): number {
    return Math.exp(interpolate(this.lnP[side], this.sigma(T_K) / STEP - 1))
  }

  u_J_kg(side: Side, T_K: number): number {
    return interpolate(this.u[side], this.sigma(T_K) / STEP - 1)
  }

  s_J_kgK(side: Side, T_K: number): number {
    return interpolate(this.s[side], this.sigma(T_K) / STEP - 1)
  }

  /** Where the side has a pressure; the ends of the table bound the answer. */
  T_atPressure(side: Side, p_Pa: number): number {
    const table = this.lnP[side]
    const lnP = Math.log(p_Pa)
    return this.search((place) => interpolate(table, place) - lnP, 1)
  }

  /** The warmest temperature at which the side has a density; NaN where it has it nowhere. */
  T_atDensity(side: Side, rho: number): number {
    const table = this.lnRho[side]
    const lnRho = Math.log(rho / this.rho_top)
    const off = (place: number) => (place + 1) * STEP * interpolate(table, place) - lnRho
    const sign = side === VAPOUR ? 1 : -1
    const end = side === VAPOUR ? this.sigma(this.T_low_K) / STEP - 1 : this.densestPlace()
    const past = sign * off(end)
    if (sign * off(-1) < 0 || past > 1e-9) return NaN
    // on the last of the edge itself, as far as the table can tell
    if (past > -1e-12) return this.T_at(end)
    return this.search(off, sign, end)
  }

  /** Of water, the saturated liquid is densest some degrees above the triple point; of most fluids, there. */
  private densestPlace(): number {
    const lnRho = (place: number) => (place + 1) * STEP * interpolate(this.lnRho[LIQUID], place)
    let high = this.sigma(this.T_low_K) / STEP - 1
    let low = high - 4
    while (high - low > 1e-9) {
      const third = (high - low) / 3
      if (lnRho(low + third) < lnRho(high - third)) low += third
      else high -= third
    }
    return (low + high) / 2
  }

  private sigma(T_K: number): number {
    const off = Math.max(0, 1 - T_K / this.T_top_K)
    return this.exponent === 0.5 ? Math.sqrt(off) : Math.cbrt(off)
  }

  /** The zero of a function of the place in the table that falls (sign 1) or rises (−1) with it. */
  private search(f: (place: number) => number, sign: number, last = this.size - 1): number {
    let low = -1
    let high = last
    let fLow = sign * f(low)
    let fHigh = sign * f(high)
    let place = (low + high) / 2
    for (let i = 0; i < 80 && high - low > 1e-13 * (high + 1); i++) {
      // false position with halving in between: sure, and quick once the table is straight
      place = i % 3 === 2 ? (low + high) / 2 : low + ((high - low) * fLow) / (fLow - fHigh)
      if (!(place > low && place < high)) place = (low + high) / 2
      const value = sign * f(place)
      if (value === 0) break
      if (value > 0) {
        low = place
        fLow = value
        if (i % 3 === 1) fHigh /= 2
      } else {
        high = place
        fHigh = value
        if (i % 3 === 1) fLow /= 2
      }
    }
    return this.T_top_K * (1 - Math.max(0, (place + 1) * STEP) ** (1 / this.exponent))
  }
}

/** Coefficients that run a polynomial through the last 1 to 5 entries one further. */
const AHEAD = [[], [1], [2, -1], [3, -3, 1], [4, -6, 4, -1], [5, -10, 10, -5, 1]]

/** Lagrange's polynomial through the eight entries around a place; beyond the ends it runs on. */
function interpolate(table: Float64Array, place: number): number {
  const first = Math.min(Math.max(Math.floor(place) - 3, 0), table.length - ORDER)
  const t = place - first
  let above = 0
  let below = 0
  for (let k = 0; k < ORDER; k++) {
    if (t === k) return table[first + k]
    const weight = WEIGHTS[k] / (t - k)
    above += weight * table[first + k]
    below += weight
  }
  return above / below
}
