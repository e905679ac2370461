import { describe, expect, it } from 'vitest'
import { findFluid } from '@/lib/fluids'
import { FLUID_DATA } from '@/lib/fluids/data'
import { HelmholtzEnergy } from '@/lib/fluids/helmholtz'

/*
 * IAPWS R6-95(2018), Revised Release on the IAPWS Formulation 1995 for the Thermodynamic Properties of Ordinary Water
 * Substance for General and Scientific Use: tables 6, 7 and 8, all of them, to the printed digits.
 */
const water = findFluid('water')!
const printed = (value: number, digits = 9) => value.toExponential(digits - 1)

describe('table 6: the reduced Helmholtz energy and its derivatives', () => {
  const data = FLUID_DATA.find((fluid) => fluid.id === 'water')!
  const M = data.molarMass_kg_mol

  it.each([
    [
      500,
      838.025,
      [0.204797733e1, 0.384236747, -0.147637878, 0.904611106e1, -0.193249185e1],
      [-0.342693206e1, -0.36436665, 0.856063701, -0.581403435e1, -0.223440737e1, -0.112176915e1],
    ],
    [
      647,
      358,
      [-0.156319605e1, 0.899441341, -0.808994726, 0.980343918e1, -0.343316334e1],
      [-0.121202657e1, -0.714012024, 0.475730696, -0.321722501e1, -0.996029507e1, -0.13321472e1],
    ],
  ])('at %d K and %d kg/m³', (T_K, rho, ideal, residual) => {
    const alpha = new HelmholtzEnergy(data)
    const tau = data.reducing.T_K / T_K
    const delta = rho / (data.reducing.rho_mol_m3 * M)
    alpha.evaluate(tau, delta)
    const { A00, A10, A01, A20, A11, A02, B0, B1, B2 } = alpha
    const d2 = delta * delta
    const t2 = tau * tau
    expect([B0, 1 / delta, -1 / d2, B1 / tau, B2 / t2].map((value) => printed(value))).toEqual(
      ideal.map((value) => printed(value)),
    )
    expect(
      [A00, A01 / delta, A02 / d2, A10 / tau, A20 / t2, A11 / (tau * delta)].map((value) => printed(value)),
    ).toEqual(residual.map((value) => printed(value)))
  })
})

describe('table 7: single-phase states', () => {
  it.each([
    [300, 996.556, 0.992418352e-1, 0.413018112e1, 0.150151914e4, 0.393062643],
    [300, 1005.308, 0.200022515e2, 0.406798347e1, 0.153492501e4, 0.387405401],
    [300, 1188.202, 0.700004704e3, 0.34613558e1, 0.244357992e4, 0.132609616],
    [500, 0.435, 0.999679423e-1, 0.150817541e1, 0.548314253e3, 0.794488271e1],
    [500, 4.532, 0.999938125, 0.166991025e1, 0.535739001e3, 0.682502725e1],
    [500, 838.025, 0.100003858e2, 0.322106219e1, 0.127128441e4, 0.256690919e1],
    [500, 1084.564, 0.700000405e3, 0.307437693e1, 0.241200877e4, 0.203237509e1],
    [647, 358, 0.220384756e2, 0.618315728e1, 0.252145078e3, 0.432092307e1],
    [900, 0.241, 0.100062559, 0.175890657e1, 0.724027147e3, 0.916653194e1],
    [900, 52.615, 0.20000069e2, 0.193510526e1, 0.698445674e3, 0.659070225e1],
    [900, 870.769, 0.700000006e3, 0.26642235e1, 0.201933608e4, 0.417223802e1],
  ])('at %d K and %d kg/m³', (T_K, rho, p_MPa, cv, w, s) => {
    const state = water.state('rhoT', rho, T_K)
    expect(
      [state.p_Pa / 1e6, state.cv_J_kgK / 1e3, state.w_m_s, state.s_J_kgK / 1e3].map((value) => printed(value)),
    ).toEqual([p_MPa, cv, w, s].map((value) => printed(value)))
  })
})

describe('table 8: saturation', () => {
  it.each([
    [275, 0.698451167e-3, 0.999887406e3, 0.550664919e-2, 0.775972202e1, 0.250428995e4, 0.28309467e-1, 0.910660121e1],
    [450, 0.932203564, 0.89034125e3, 0.48120036e1, 0.749161585e3, 0.277441078e4, 0.210865845e1, 0.660921221e1],
    [625, 0.169082693e2, 0.567090385e3, 0.11829028e3, 0.168626976e4, 0.255071625e4, 0.380194683e1, 0.518506121e1],
  ])('at %d K', (T_K, ...expected) => {
    const { p_Pa, liquid, vapour } = water.saturationAtT(T_K)
    const got = [
      p_Pa / 1e6,
      liquid.rho_kg_m3,
      vapour.rho_kg_m3,
      liquid.h_J_kg / 1e3,
      vapour.h_J_kg / 1e3,
      liquid.s_J_kgK / 1e3,
      vapour.s_J_kgK / 1e3,
    ]
    expect(got.map((value) => printed(value))).toEqual(expected.map((value) => printed(value)))
  })
})
