import type { ResidualTerm } from './equation-data'

interface Derivatives {
  A00: number
  A10: number
  A01: number
  A20: number
  A11: number
  A02: number
}

type NonanalyticTerm = Extract<ResidualTerm, { type: 'nonanalytic' }>

/** Nearer to δ = 1 the derivatives are 0/0 in floating point; they are taken this far away instead. */
const NEAREST = 1e-10
/** exp(−60) is 1e−26. */
const FAR = 60

/**
 * The critical-region term n Δ^b δ ψ of the equations for water and carbon dioxide (W. Wagner, A. Pruß, J. Phys. Chem.
 * Ref. Data 31 (2002) 387, table 6.5 of the relations for its derivatives).
 */
export function nonanalyticTerm(term: NonanalyticTerm, i: number) {
  const [n, a, b, beta, A, B, C, D] = [
    term.n[i],
    term.a[i],
    term.b[i],
    term.beta[i],
    term.A[i],
    term.B[i],
    term.C[i],
    term.D[i],
  ]
  const k = 1 / (2 * beta)
  const isSeventhPower = a === 3.5

  return (tau: number, deltaGiven: number, sum: Derivatives): void => {
    const off = deltaGiven - 1
    const d1 = Math.abs(off) < NEAREST ? (off < 0 ? -NEAREST : NEAREST) : off
    const delta = 1 + d1
    const t1 = tau - 1
    const q = d1 * d1
    const exponent = C * q + D * t1 * t1
    // away from the critical point the term is less than the last digit of the others, with room for its derivatives
    if (exponent > FAR) return
    const qk = Math.exp(k * Math.log(q))
    const qa = isSeventhPower ? q * q * q * Math.abs(d1) : q ** a
    const theta = -t1 + A * qk
    const Delta = theta * theta + B * qa
    const psi = Math.exp(-exponent)

    const DeltaD = (A * theta * 4 * k * qk + 2 * B * a * qa) / d1
    const DeltaDD =
      DeltaD / d1 + (4 * B * a * (a - 1) * qa + 8 * A * A * k * k * qk * qk + 8 * A * theta * k * (k - 1) * qk) / q
    const power = Math.exp(b * Math.log(Delta))
    const power1 = Delta === 0 ? 0 : power / Delta
    const power2 = Delta === 0 ? 0 : power1 / Delta
    const pD = b * power1 * DeltaD
    const pDD = b * (power1 * DeltaDD + (b - 1) * power2 * DeltaD * DeltaD)
    const pT = -2 * theta * b * power1
    const pTT = 2 * b * power1 + 4 * theta * theta * b * (b - 1) * power2
    const pDT = (-A * b * 4 * k * power1 * qk) / d1 - 2 * theta * b * (b - 1) * power2 * DeltaD

    const psiD = -2 * C * d1 * psi
    const psiDD = (2 * C * q - 1) * 2 * C * psi
    const psiT = -2 * D * t1 * psi
    const psiTT = (2 * D * t1 * t1 - 1) * 2 * D * psi
    const psiDT = 4 * C * D * d1 * t1 * psi

    sum.A00 += n * power * delta * psi
    sum.A01 += n * delta * (power * (psi + delta * psiD) + pD * delta * psi)
    sum.A02 +=
      n * delta * delta * (power * (2 * psiD + delta * psiDD) + 2 * pD * (psi + delta * psiD) + pDD * delta * psi)
    sum.A10 += n * tau * delta * (pT * psi + power * psiT)
    sum.A20 += n * tau * tau * delta * (pTT * psi + 2 * pT * psiT + power * psiTT)
    sum.A11 +=
      n *
      tau *
      delta *
      (power * (psiT + delta * psiDT) + delta * pD * psiT + pT * (psi + delta * psiD) + pDT * delta * psi)
  }
}
