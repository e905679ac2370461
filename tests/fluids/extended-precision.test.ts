import Decimal from 'decimal.js'
import { describe, expect, it } from 'vitest'
import { FLUIDS } from '@/lib/fluids'
import { FLUID_DATA } from '@/lib/fluids/data'
import type { FluidData, IdealTerm, ResidualTerm } from '@/lib/fluids/equation-data'

/*
 * A second route to the same numbers: the Helmholtz energy as the terms are printed, in forty digits, with its
 * derivatives by difference quotients so narrow that they are exact to twenty.
 */
const D = Decimal.clone({ precision: 40 })
type Num = Decimal
const STEP = new D('1e-10')

function idealTerm(term: IdealTerm, tau: Num): Num {
  const sum = (n: readonly number[], each: (i: number) => Num) =>
    n.reduce((so, coefficient, i) => so.plus(each(i).times(coefficient)), new D(0))
  switch (term.type) {
    case 'lead':
      return tau.times(term.a2).plus(term.a1)
    case 'log':
      return tau.ln().times(term.a)
    case 'power':
      return sum(term.n, (i) => tau.pow(term.t[i]))
    case 'planck_einstein':
      return sum(term.n, (i) => new D(1).minus(tau.times(-term.theta[i]).exp()).ln())
    case 'planck_einstein_general':
      return sum(term.n, (i) => tau.times(term.theta[i]).exp().times(term.d[i]).plus(term.c[i]).ln())
  }
}

function residualTerm(term: ResidualTerm, tau: Num, delta: Num): Num {
  const square = (x: Num) => x.times(x)
  return term.n.reduce((so, n, i) => {
    let value: Num
    if (term.type === 'nonanalytic') {
      const off = square(delta.minus(1))
      const theta = new D(1).minus(tau).plus(off.pow(new D(1).div(new D(2).times(term.beta[i]))).times(term.A[i]))
      const Delta = square(theta).plus(off.pow(term.a[i]).times(term.B[i]))
      const psi = off
        .times(-term.C[i])
        .minus(square(tau.minus(1)).times(term.D[i]))
        .exp()
      value = Delta.pow(term.b[i]).times(delta).times(psi)
    } else {
      value = delta.pow(term.d[i]).times(tau.pow(term.t[i]))
      if (term.type === 'power') {
        if (term.l[i] > 0) value = value.times(delta.pow(term.l[i]).neg().exp())
      } else {
        const fromTau = square(tau.minus(term.gamma[i])).times(term.beta[i])
        const fromDelta = square(delta.minus(term.epsilon[i])).times(term.eta[i])
        const exponent =
          term.type === 'gaussian'
            ? fromDelta.plus(fromTau).neg()
            : fromDelta.plus(new D(1).div(fromTau.plus(term.b[i])))
        value = value.times(exponent.exp())
      }
    }
    return so.plus(value.times(n))
  }, new D(0))
}

/** Value and first and second derivatives of f(τ, δ), scaled by τ and δ. */
function derivatives(f: (tau: Num, delta: Num) => Num, tau: Num, delta: Num) {
  const [h, k] = [tau.times(STEP), delta.times(STEP)]
  const at = (i: number, j: number) => f(tau.plus(h.times(i)), delta.plus(k.times(j)))
  const middle = at(0, 0)
  const [n, s, e, w] = [at(1, 0), at(-1, 0), at(0, 1), at(0, -1)]
  const twice = new D(2).times(STEP)
  const cross = at(1, 1).minus(at(1, -1)).minus(at(-1, 1)).plus(at(-1, -1))
  return {
    f00: middle,
    f10: n.minus(s).div(twice),
    f01: e.minus(w).div(twice),
    f20: n.minus(middle.times(2)).plus(s).div(STEP.times(STEP)),
    f02: e.minus(middle.times(2)).plus(w).div(STEP.times(STEP)),
    f11: cross.div(twice.times(twice)),
  }
}

function properties(data: FluidData, T_K: number, rho_kg_m3: number) {
  const tau = new D(data.reducing.T_K).div(T_K)
  const rho = new D(rho_kg_m3)
  const delta = rho.div(data.molarMass_kg_mol).div(data.reducing.rho_mol_m3)
  const A = derivatives(
    (t, d) => data.residual.reduce((so, term) => so.plus(residualTerm(term, t, d)), new D(0)),
    tau,
    delta,
  )
  const B = derivatives((t, d) => data.ideal.reduce((so, term) => so.plus(idealTerm(term, t)), d.ln()), tau, delta)
  const R = new D(data.gasConstant_J_molK).div(data.molarMass_kg_mol)
  const RT = R.times(T_K)
  const cv = B.f20.plus(A.f20).neg()
  const dpdrho = A.f01.times(2).plus(A.f02).plus(1)
  const dpdT = A.f01.minus(A.f11).plus(1)
  const rest = dpdT.times(dpdT)
  return {
    RT: RT.toNumber(),
    R: R.toNumber(),
    p: rho.times(RT).times(A.f01.plus(1)).toNumber(),
    u: RT.times(B.f10.plus(A.f10)).toNumber(),
    h: RT.times(B.f10.plus(A.f10).plus(A.f01).plus(1)).toNumber(),
    s: R.times(B.f10.plus(A.f10).minus(B.f00).minus(A.f00)).toNumber(),
    cv: R.times(cv).toNumber(),
    cp: R.times(cv.plus(rest.div(dpdrho))).toNumber(),
    w: RT.times(dpdrho.plus(rest.div(cv)))
      .sqrt()
      .toNumber(),
  }
}

describe.each(FLUIDS)('$name in forty digits', (fluid) => {
  const { T_min_K, T_max_K, critical } = fluid.info
  const data = FLUID_DATA.find(({ id }) => id === fluid.id) as FluidData
  it.each([
    ['thin gas', 0.5 * (T_min_K + T_max_K), 1e3],
    ['dense gas', 1.2 * critical!.T_K, 1.4 * critical!.p_Pa],
    ['liquid', Math.max(T_min_K, 0.6 * critical!.T_K), 2 * critical!.p_Pa],
  ])('%s', (_, T, p_Pa) => {
    const T_K = Math.min(T, T_max_K)
    const { rho_kg_m3: rho } = fluid.state('pT', p_Pa, T_K)
    const got = fluid.state('rhoT', rho, T_K)
    const exact = properties(data, T_K, rho)
    // u, h and s have an arbitrary zero, and p of a liquid is a small difference: on the scale of what they are made of
    expect(Math.abs(got.p_Pa - exact.p) / (rho * exact.RT)).toBeLessThan(1e-12)
    expect(Math.abs(got.u_J_kg - exact.u) / exact.RT).toBeLessThan(1e-11)
    expect(Math.abs(got.h_J_kg - exact.h) / exact.RT).toBeLessThan(1e-11)
    expect(Math.abs(got.s_J_kgK - exact.s) / exact.R).toBeLessThan(1e-11)
    expect(Math.abs(got.cv_J_kgK / exact.cv - 1)).toBeLessThan(1e-11)
    expect(Math.abs(got.cp_J_kgK / exact.cp - 1)).toBeLessThan(1e-11)
    expect(Math.abs(got.w_m_s / exact.w - 1)).toBeLessThan(1e-11)
  })
})
