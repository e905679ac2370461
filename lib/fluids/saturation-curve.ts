import type { HelmholtzEnergy } from './helmholtz'

/*
 * The saturation curve of an equation of state: equal pressure and equal Gibbs energy of liquid and vapour at one
 * temperature. It is followed once from well below the critical point, up to it and down to the triple point, and kept
 * as a table from which Newton's method starts; no figure of it is anybody's fit.
 *
 * Temperatures are told by s = ∛(1 − T/Tc): in it the logarithms of both densities run nearly straight through the
 * critical point.
 */

export interface CurveData {
  readonly alpha: HelmholtzEnergy
  readonly T_reducing_K: number
  readonly rho_reducing: number
  readonly T_critical_K: number
  readonly rho_critical: number
  readonly T_triple_K: number
  readonly acentricFactor: number
}

/** Densities in the unit of the data. */
export interface Densities {
  liquid: number
  vapour: number
}

const STEP = 0.004
const FIRST = 0.004
/** Where the following begins: far from both ends rough guesses suffice. */
const START_T = 0.75
const MOST_ITERATIONS = 60

export class SaturationCurve {
  /** ln(ρ/ρc)/s at s = FIRST + i STEP. */
  private readonly liquid: Float64Array
  private readonly vapour: Float64Array
  private readonly last: number

  constructor(private readonly data: CurveData) {
    const s_triple = Math.cbrt(1 - data.T_triple_K / data.T_critical_K)
    // one node beyond the triple point, so that its neighbourhood is interpolated too
    this.last = Math.ceil((s_triple - FIRST) / STEP) + 1
    this.liquid = new Float64Array(this.last + 1)
    this.vapour = new Float64Array(this.last + 1)
    this.follow()
  }

  sOf = (T_K: number) => Math.cbrt(Math.max(0, 1 - T_K / this.data.T_critical_K))

  /** Densities from the table alone: good to about 1e-7, less right at the critical point. */
  guess(T_K: number, out: Densities): void {
    const s = this.sOf(T_K)
    const { rho_critical } = this.data
    out.liquid = rho_critical * Math.exp(s * cubic(this.liquid, (s - FIRST) / STEP))
    out.vapour = rho_critical * Math.exp(s * cubic(this.vapour, (s - FIRST) / STEP))
  }

  /** Densities at equilibrium, to the last digits that the equation has. */
  solve(T_K: number, out: Densities): void {
    this.guess(T_K, out)
    const [liquid, vapour] = [out.liquid, out.vapour]
    if (this.polish(T_K, out)) return
    // within about a millionth of the critical temperature both densities are one to the equation's own digits
    out.liquid = liquid
    out.vapour = vapour
  }

  private follow(): void {
    const { T_critical_K, rho_critical } = this.data
    const startIndex = Math.round((Math.cbrt(1 - START_T) - FIRST) / STEP)
    const at: Densities = { liquid: 0, vapour: 0 }
    const store = (i: number) => {
      const s = FIRST + i * STEP
      this.liquid[i] = Math.log(at.liquid / rho_critical) / s
      this.vapour[i] = Math.log(at.vapour / rho_critical) / s
    }
    const T_at = (i: number) => T_critical_K * (1 - (FIRST + i * STEP) ** 3)
    this.roughGuess(T_at(startIndex), at)
    if (!this.polish(T_at(startIndex), at)) throw new Error('the saturation curve has no beginning')
    store(startIndex)
    for (const direction of [-1, 1]) {
      for (let i = startIndex + direction; i >= 0 && i <= this.last; i += direction) {
        const s = FIRST + i * STEP
        at.liquid = rho_critical * Math.exp(s * ahead(this.liquid, i, direction, startIndex))
        at.vapour = rho_critical * Math.exp(s * ahead(this.vapour, i, direction, startIndex))
        const guessed = { ...at }
        if (!this.polish(T_at(i), at)) Object.assign(at, guessed)
        store(i)
      }
    }
  }

  /** Vapour pressure after Wilson, liquid density after Yen and Woods: from memory, and only to begin with. */
  private roughGuess(T_K: number, out: Densities): void {
    const { T_critical_K, rho_critical, acentricFactor } = this.data
    const Tr = T_K / T_critical_K
    const p_reduced = Math.exp(5.373 * (1 + acentricFactor) * (1 - 1 / Tr))
    out.liquid = rho_critical * (1 + 0.85 * (1 - Tr) + (1.692 + 0.986 * acentricFactor) * Math.cbrt(1 - Tr))
    // the critical compressibility is near 0.28 for all
    out.vapour = (rho_critical * 0.28 * p_reduced) / Tr
  }

  /** Newton's method in both densities at once (R. Akasaka, J. Therm. Sci. Technol. 3 (2008) 442). False where it fails. */
  private polish(T_K: number, out: Densities): boolean {
    const { alpha, T_reducing_K, rho_reducing } = this.data
    const tau = T_reducing_K / T_K
    let l = out.liquid / rho_reducing
    let v = out.vapour / rho_reducing
    for (let i = 0; i < MOST_ITERATIONS; i++) {
      alpha.evaluate(tau, l)
      const Jl = l * (1 + alpha.A01)
      const Kl = alpha.A01 + alpha.A00 + Math.log(l)
      const dJl = 1 + 2 * alpha.A01 + alpha.A02
      alpha.evaluate(tau, v)
      const Jv = v * (1 + alpha.A01)
      const Kv = alpha.A01 + alpha.A00 + Math.log(v)
      const dJv = 1 + 2 * alpha.A01 + alpha.A02
      const dKl = dJl / l
      const dKv = dJv / v
      const determinant = dJv * dKl - dJl * dKv
      let stepL = ((Kv - Kl) * dJv - (Jv - Jl) * dKv) / determinant
      let stepV = ((Kv - Kl) * dJl - (Jv - Jl) * dKl) / determinant
      if (!Number.isFinite(stepL) || !Number.isFinite(stepV)) return false
      const shrink = Math.max(1, (4 * Math.abs(stepL)) / l, (1.25 * Math.abs(stepV)) / v)
      stepL /= shrink
      stepV /= shrink
      l += stepL
      v += stepV
      if (!(l > v)) return false
      if (Math.abs(stepL) < 1e-11 * l && Math.abs(stepV) < 1e-10 * v) {
        out.liquid = l * rho_reducing
        out.vapour = v * rho_reducing
        return true
      }
    }
    return false
  }
}

/** Cubic interpolation in a table of equal steps; beyond its ends it runs on. */
function cubic(table: Float64Array, place: number): number {
  const i = Math.min(Math.max(Math.floor(place) - 1, 0), table.length - 4)
  const t = place - i
  const [a, b, c, d] = [table[i], table[i + 1], table[i + 2], table[i + 3]]
  return (
    (-a * (t - 1) * (t - 2) * (t - 3)) / 6 +
    (b * t * (t - 2) * (t - 3)) / 2 -
    (c * t * (t - 1) * (t - 3)) / 2 +
    (d * t * (t - 1) * (t - 2)) / 6
  )
}

/** The next entry as the last ones lead to it. */
function ahead(table: Float64Array, i: number, direction: number, start: number): number {
  const known = Math.abs(i - start)
  const back = (k: number) => table[i - k * direction]
  if (known === 1) return back(1)
  if (known === 2) return 2 * back(1) - back(2)
  return 3 * back(1) - 3 * back(2) + back(3)
}
