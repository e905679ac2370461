import type { FluidData, ResidualTerm } from './equation-data'
import { IdealPart } from './ideal-part'
import { nonanalyticTerm } from './nonanalytic'

/**
 * The reduced Helmholtz energy of one fluid, α(τ, δ) = α⁰ + αʳ, with what its first and second derivatives make of it.
 *
 *     A_ij = τ^i δ^j ∂^(i+j) αʳ / ∂τ^i ∂δ^j        B_i = τ^i ∂^i α⁰ / ∂τ^i
 *
 * One evaluation fills the fields of the object; nothing is allocated. The terms are laid out flat, since this is where
 * all the time of a solver goes.
 */
export class HelmholtzEnergy {
  A00 = 0
  A10 = 0
  A01 = 0
  A20 = 0
  A11 = 0
  A02 = 0
  B0 = 0
  B1 = 0
  B2 = 0
  /** How often it has been evaluated: what an algorithm costs, on any machine. */
  evaluations = 0

  /** Power terms n δ^d τ^t exp(−δ^l), and their distinct exponents of τ. */
  private readonly n: Float64Array
  private readonly d: Int32Array
  private readonly t: Float64Array
  private readonly l: Int32Array
  private readonly tAt: Int32Array
  private readonly tDistinct: Float64Array
  private readonly tauPowers: Float64Array
  private readonly deltaPowers: Float64Array
  private readonly decays: Float64Array
  private readonly deltaToL: Float64Array
  /** Gaussian terms and those with a reciprocal in τ, nine figures each: n d t eta beta gamma epsilon b kind. */
  private readonly bells: Float64Array
  private readonly nonanalytic: ReturnType<typeof nonanalyticTerm>[]
  private readonly ideal: IdealPart

  constructor({ ideal, residual }: Pick<FluidData, 'ideal' | 'residual'>) {
    this.ideal = new IdealPart(ideal)
    const power = residual.filter((term) => term.type === 'power')
    const all = (pick: (term: Extract<ResidualTerm, { type: 'power' }>) => readonly number[]) =>
      power.flatMap((term) => [...pick(term)])
    this.n = Float64Array.from(all((term) => term.n))
    this.d = Int32Array.from(all((term) => term.d))
    this.t = Float64Array.from(all((term) => term.t))
    this.l = Int32Array.from(all((term) => term.l))
    this.tDistinct = Float64Array.from(new Set(this.t))
    this.tAt = Int32Array.from(this.t, (exponent) => this.tDistinct.indexOf(exponent))
    this.tauPowers = new Float64Array(this.tDistinct.length)
    const highest = Math.max(0, ...this.d, ...this.l)
    this.deltaPowers = new Float64Array(highest + 1)
    this.decays = new Float64Array(Math.max(0, ...this.l) + 1)
    this.deltaToL = new Float64Array(Math.max(0, ...this.l) + 1)
    this.bells = Float64Array.from(residual.flatMap(bellFigures))
    this.nonanalytic = residual.flatMap((term) =>
      term.type === 'nonanalytic' ? term.n.map((_, i) => nonanalyticTerm(term, i)) : [],
    )
  }

  evaluate(tau: number, delta: number): void {
    this.evaluations++
    this.A00 = this.A10 = this.A01 = this.A20 = this.A11 = this.A02 = 0
    const lnTau = Math.log(tau)
    const lnDelta = Math.log(delta)
    this.addPowers(lnTau, delta)
    if (this.bells.length > 0) this.addBells(tau, delta, lnTau, lnDelta)
    for (let i = 0; i < this.nonanalytic.length; i++) this.nonanalytic[i](tau, delta, this)
    this.ideal.evaluate(tau, lnTau, lnDelta, this)
  }

  private addPowers(lnTau: number, delta: number): void {
    const { n, d, t, l, tAt, tDistinct, tauPowers, deltaPowers, decays, deltaToL } = this
    for (let i = 0; i < tDistinct.length; i++) tauPowers[i] = Math.exp(tDistinct[i] * lnTau)
    deltaPowers[0] = 1
    for (let i = 1; i < deltaPowers.length; i++) deltaPowers[i] = deltaPowers[i - 1] * delta
    decays[0] = 1
    deltaToL[0] = 0
    for (let i = 1; i < decays.length; i++) {
      deltaToL[i] = i * deltaPowers[i]
      decays[i] = Math.exp(-deltaPowers[i])
    }
    let A00 = 0
    let A10 = 0
    let A01 = 0
    let A20 = 0
    let A11 = 0
    let A02 = 0
    for (let i = 0; i < n.length; i++) {
      const li = l[i]
      const ti = t[i]
      const value = n[i] * deltaPowers[d[i]] * tauPowers[tAt[i]] * decays[li]
      const slope = d[i] - deltaToL[li]
      A00 += value
      A10 += ti * value
      A20 += ti * (ti - 1) * value
      A01 += slope * value
      A11 += ti * slope * value
      A02 += (slope * (slope - 1) - li * deltaToL[li]) * value
    }
    this.A00 += A00
    this.A10 += A10
    this.A01 += A01
    this.A20 += A20
    this.A11 += A11
    this.A02 += A02
  }

  private addBells(tau: number, delta: number, lnTau: number, lnDelta: number): void {
    const { bells } = this
    let A00 = 0
    let A10 = 0
    let A01 = 0
    let A20 = 0
    let A11 = 0
    let A02 = 0
    for (let i = 0; i < bells.length; i += BELL_SIZE) {
      const d = bells[i + 1]
      const t = bells[i + 2]
      const eta = bells[i + 3]
      const beta = bells[i + 4]
      const fromGamma = tau - bells[i + 5]
      const fromEpsilon = delta - bells[i + 6]
      const b = bells[i + 7]
      let exponent = t * lnTau - eta * fromEpsilon * fromEpsilon
      let first: number
      let second: number
      if (b === 0) {
        exponent -= beta * fromGamma * fromGamma
        first = -2 * beta * fromGamma
        second = -2 * beta
      } else {
        const u = 1 / (b + beta * fromGamma * fromGamma)
        exponent += u
        first = -2 * beta * fromGamma * u * u
        second = -2 * beta * u * u + 8 * beta * beta * fromGamma * fromGamma * u * u * u
      }
      const value = bells[i] * Math.exp(exponent + d * lnDelta)
      const slopeTau = t + tau * first
      const slopeDelta = d - 2 * eta * delta * fromEpsilon
      A00 += value
      A10 += slopeTau * value
      A01 += slopeDelta * value
      A20 += (slopeTau * slopeTau - t + tau * tau * second) * value
      A11 += slopeTau * slopeDelta * value
      A02 += (slopeDelta * slopeDelta - d - 2 * eta * delta * delta) * value
    }
    this.A00 += A00
    this.A10 += A10
    this.A01 += A01
    this.A20 += A20
    this.A11 += A11
    this.A02 += A02
  }
}

const BELL_SIZE = 8

function bellFigures(term: ResidualTerm): number[] {
  if (term.type !== 'gaussian' && term.type !== 'gao_b') return []
  return term.n.flatMap((n, i) => [
    n,
    term.d[i],
    term.t[i],
    // the published form of the term with the reciprocal has + η (δ − ε)² in its exponent
    term.type === 'gaussian' ? term.eta[i] : -term.eta[i],
    term.beta[i],
    term.gamma[i],
    term.epsilon[i],
    term.type === 'gaussian' ? 0 : term.b[i],
  ])
}
