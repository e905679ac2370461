import { describe, expect, it } from 'vitest'
import { findFluid } from '@/lib/fluids'
import type { HelmholtzFluid } from '@/lib/fluids/helmholtz-fluid'

/*
 * IAPWS R6-95(2018), Revised Release on the IAPWS Formulation 1995 for the Thermodynamic Properties of Ordinary Water
 * Substance for General and Scientific Use: its tables for checking a program, from memory.
 */
const water = findFluid('water')!

/** Agreement to the nine digits that are printed; pressures of a liquid to as many as its density allows. */
const agrees = (got: number, printed: number, relative = 6e-9) =>
  expect(Math.abs(got / printed - 1), `${got} and ${printed}`).toBeLessThan(relative)

describe('table 6, the parts of the equation at 500 K and 838.025 kg/m³', () => {
  const T = 500
  const rho = 838.025
  const { alpha, scales } = water as HelmholtzFluid
  const tau = scales.T_reducing_K / T
  const delta = rho / scales.rho_reducing_kg_m3
  alpha.evaluate(tau, delta)
  const { A00, A01, A02, A10, A20, A11, B0, B1, B2 } = alpha
  it.each([
    ['ideal part', B0, 0.204797733e1],
    ['its slope in τ', B1 / tau, 0.904611106e1],
    ['its curvature in τ', B2 / tau ** 2, -0.193249185e1],
    ['residual part', A00, -0.342693206e1],
    ['its slope in δ', A01 / delta, -0.36436665],
    ['its curvature in δ', A02 / delta ** 2, 0.856063701],
    ['its slope in τ', A10 / tau, -0.581403435e1],
    ['its curvature in τ', A20 / tau ** 2, -0.223440737e1],
    ['its mixed derivative', A11 / (tau * delta), -0.112176915e1],
  ])('%s', (_, got, printed) => agrees(got, printed))
})

describe('table 7, single phase', () => {
  it.each([
    [300, 996.556, 0.0992418352, 4.13018112, 1501.51914, 0.393062643],
    [300, 1005.308, 20.0022515, 4.06798347, 1534.92501, 0.387405401],
    [300, 1188.202, 700.004704, 3.4613558, 2443.57992, 0.132609616],
    [500, 0.435, 0.0999679423, 1.50817541, 548.314253, 7.94488271],
    [500, 4.532, 0.999938125, 1.66991025, 535.739001, 6.82502725],
    [500, 838.025, 10.0003858, 3.22106219, 1271.28441, 2.56690919],
    [500, 1084.564, 700.000405, 3.07437693, 2412.00877, 2.03237509],
    [647, 358, 22.0384756, 6.18315728, 252.145078, 4.32092307],
    [900, 0.241, 0.100062559, 1.75890657, 724.027147, 9.16653194],
    [900, 52.615, 20.000069, 1.93510526, 698.445674, 6.59070225],
    [900, 870.769, 700.000006, 2.6642235, 2019.33608, 4.17223802],
  ])('at %d K and %d kg/m³', (T, rho, p_MPa, cv, w, s) => {
    const state = water.state('rhoT', rho, T)
    agrees(state.p_Pa / 1e6, p_MPa, 1e-8)
    agrees(state.cv_J_kgK / 1e3, cv)
    agrees(state.w_m_s, w)
    agrees(state.s_J_kgK / 1e3, s)
  })
})

describe('table 8, saturation', () => {
  it.each([
    [275, 0.698451167e-3, 999.887406, 0.550664919e-2, 7.75972202, 2504.28995, 0.028309467, 9.10660121],
    [450, 0.932203564, 890.34125, 4.8120036, 749.161585, 2774.41078, 2.10865845, 6.60921221],
    [625, 16.9082693, 567.090385, 118.29028, 1686.26976, 2550.71625, 3.80194683, 5.18506121],
  ])('at %d K', (T, p_MPa, rho_l, rho_v, h_l, h_v, s_l, s_v) => {
    const { p_Pa, liquid, vapour } = water.saturationAtT(T)
    agrees(p_Pa / 1e6, p_MPa)
    agrees(liquid.rho_kg_m3, rho_l)
    agrees(vapour.rho_kg_m3, rho_v)
    agrees(liquid.h_J_kg / 1e3, h_l)
    agrees(vapour.h_J_kg / 1e3, h_v)
    agrees(liquid.s_J_kgK / 1e3, s_l, 2e-8)
    agrees(vapour.s_J_kgK / 1e3, s_v)
    expect(Math.abs(water.saturationAtP(p_Pa).T_K / T - 1)).toBeLessThan(1e-12)
  })
})
