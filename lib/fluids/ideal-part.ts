import type { IdealTerm } from './equation-data'

/** Where the ideal part puts B_i = τ^i ∂^i α⁰/∂τ^i. */
interface Derivatives {
  B0: number
  B1: number
  B2: number
}

/** The ideal part of a Helmholtz energy: ln δ + a₁ + a₂ τ + a ln τ, powers of τ, and harmonic oscillators, laid out flat. */
export class IdealPart {
  private constant = 0
  private linear = 0
  private logarithm = 0
  private readonly powers: Float64Array
  /** Plain oscillators n ln(1 − exp(−θτ)). */
  private readonly oscillators: Float64Array
  /** Of the general form n ln(c + d exp(θτ)), which only air has. */
  private readonly general: Float64Array

  constructor(terms: readonly IdealTerm[]) {
    const powers: number[] = []
    const oscillators: number[] = []
    const general: number[] = []
    for (const term of terms) {
      switch (term.type) {
        case 'lead':
          this.constant += term.a1
          this.linear += term.a2
          break
        case 'log':
          this.logarithm += term.a
          break
        case 'power':
          term.n.forEach((n, i) => powers.push(n, term.t[i]))
          break
        case 'planck_einstein':
          term.n.forEach((n, i) => oscillators.push(n, term.theta[i]))
          break
        case 'planck_einstein_general':
          term.n.forEach((n, i) => general.push(n, term.theta[i], term.c[i], term.d[i]))
          break
      }
    }
    this.powers = Float64Array.from(powers)
    this.oscillators = Float64Array.from(oscillators)
    this.general = Float64Array.from(general)
  }

  evaluate(tau: number, lnTau: number, lnDelta: number, out: Derivatives): void {
    const { powers, oscillators, general, logarithm } = this
    let B0 = lnDelta + this.constant + this.linear * tau + logarithm * lnTau
    let B1 = this.linear * tau + logarithm
    let B2 = -logarithm
    for (let i = 0; i < powers.length; i += 2) {
      const t = powers[i + 1]
      const value = powers[i] * Math.exp(t * lnTau)
      B0 += value
      B1 += t * value
      B2 += t * (t - 1) * value
    }
    for (let i = 0; i < oscillators.length; i += 2) {
      const n = oscillators[i]
      const x = oscillators[i + 1] * tau
      const rest = -Math.expm1(-x)
      const share = x / rest
      const decay = 1 - rest
      // ln(1 − e^−x) is −e^−x to the last digit where that is small
      B0 += n * (x > 40 ? -decay : Math.log(rest))
      B1 += n * share * decay
      B2 -= n * share * share * decay
    }
    for (let i = 0; i < general.length; i += 4) {
      const n = general[i]
      const x = general[i + 1] * tau
      const grown = general[i + 3] * Math.exp(x)
      const whole = general[i + 2] + grown
      const share = grown / whole
      B0 += n * Math.log(whole)
      B1 += n * x * share
      B2 += n * x * x * share * (1 - share)
    }
    out.B0 = B0
    out.B1 = B1
    out.B2 = B2
  }
}
