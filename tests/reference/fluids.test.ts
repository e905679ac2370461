import { describe, expect, it } from 'vitest'
import { findFluid } from '@/lib/fluids'

/*
 * Values that the papers of the equations state, and that tables made with them repeat. All of these are from memory, to
 * the digits given; each is held to one unit of its last digit.
 */
const fluid = (name: string) => findFluid(name)!
const within = (value: number, expected: number, unit: number) =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(unit)
const ATMOSPHERE_Pa = 101_325

describe('normal boiling points, from memory', () => {
  it.each([
    // R. Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361
    ['nitrogen', 77.355, 0.001],
    // J. W. Leachman et al., J. Phys. Chem. Ref. Data 38 (2009) 721
    ['hydrogen', 20.369, 0.001],
    ['parahydrogen', 20.271, 0.001],
    // Ch. Tegeler et al., J. Phys. Chem. Ref. Data 28 (1999) 779
    ['argon', 87.302, 0.001],
    // U. Setzmann, W. Wagner, J. Phys. Chem. Ref. Data 20 (1991) 1061
    ['methane', 111.667, 0.001],
    // IAPWS-95
    ['water', 373.124, 0.001],
    // E. W. Lemmon et al., J. Chem. Eng. Data 54 (2009) 3141
    ['propane', 231.036, 0.001],
    // R. Tillner-Roth, H. D. Baehr, J. Phys. Chem. Ref. Data 23 (1994) 657
    ['r134a', 247.076, 0.001],
  ])('%s', (name, T_K, unit) => {
    within(fluid(name).saturationAtP(ATMOSPHERE_Pa).T_K, T_K, unit)
  })
})

describe('gas at 300 K and 101 325 Pa, from memory', () => {
  it.each([
    // as above; air: E. W. Lemmon et al., J. Phys. Chem. Ref. Data 29 (2000) 331
    ['nitrogen', 1.138, 1.0414, 353.16],
    ['air', 1.1769, 1.0064, 347.32],
    ['hydrogen', 0.0818, 14.312, 1319.3],
    ['helium', 0.1625, 5.1931, 1019.5],
    ['carbon_dioxide', 1.7966, 0.8525, 269.4],
  ])('%s: density, cp and speed of sound', (name, rho, cp, w) => {
    const state = fluid(name).state('pT', ATMOSPHERE_Pa, 300)
    within(state.rho_kg_m3, rho, 2e-4)
    within(state.cp_J_kgK / 1e3, cp, name === 'hydrogen' ? 2e-3 : 3e-4)
    within(state.w_m_s, w, 0.15)
  })
})
