import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { findFluid, FLUIDS, PAIRS } from '@/lib/fluids'

const water = findFluid('water')!
const air = findFluid('air')!

describe('what cannot be is told in words', () => {
  it.each([
    [
      'too cold',
      () => water.state('pT', 1e5, 250),
      'range',
      'no water below 273.16 K (0.01 °C) here: T is 250 K (−23.15 °C)',
    ],
    [
      'too hot',
      () => water.state('pT', 1e5, 2500),
      'range',
      'no water above 2000 K (1726.8 °C) here: T is 2500 K (2226.8 °C)',
    ],
    ['too much pressure', () => water.state('pT', 2e9, 300), 'range', 'no water above 10000 bar here: p is 20000 bar'],
    [
      'no pressure',
      () => water.state('pT', 0, 300),
      'range',
      'the absolute pressure of water has to be above zero: p is 0 Pa',
    ],
    ['no density', () => water.state('rhoT', 0, 300), 'range', 'the density of water has to be above zero'],
    [
      'beyond saturation',
      () => water.saturationAtT(700),
      'state',
      'water has no saturation above its critical temperature, 647.1 K (373.95 °C): T is 700 K (426.85 °C)',
    ],
    ['a quality of two', () => water.state('Tx', 300, 2), 'range', 'a quality lies between 0 and 1: x is 2'],
    [
      'mixed air',
      () => air.state('Tx', 100, 0.5),
      'unsupported',
      'liquid and vapour of air differ in composition, so what lies between them is not worked out here; above 132.63 K (−140.52 °C) there is one phase',
    ],
    [
      'not a number',
      () => water.state('pT', NaN, 300),
      'range',
      'a state of water needs two numbers: one of them is none',
    ],
  ])('%s', (_, ask, code, reason) => {
    expect(ask).toThrow(Problem)
    expect(ask).toThrow(expect.objectContaining({ code, reason }))
  })

  it('answers any two numbers with a state or a Problem', () => {
    const number = fc.oneof(fc.double(), fc.double({ min: -1e4, max: 1e4 }), fc.double({ min: 0, max: 1e9 }))
    fc.assert(
      fc.property(fc.constantFrom(...FLUIDS), fc.constantFrom(...PAIRS), number, number, (fluid, pair, a, b) => {
        try {
          const { T_K, rho_kg_m3, p_Pa, u_J_kg, h_J_kg, s_J_kgK } = fluid.state(pair, a, b)
          expect([T_K, rho_kg_m3, p_Pa, u_J_kg, h_J_kg, s_J_kgK].every(Number.isFinite)).toBe(true)
        } catch (error) {
          if (!(error instanceof Problem)) throw error
        }
      }),
      { numRuns: 6000, seed: 42, verbose: 1 },
    )
  })
})

describe('names', () => {
  it.each([
    ['N2', 'nitrogen'],
    ['carbon dioxide', 'carbon_dioxide'],
    ['CO2', 'carbon_dioxide'],
    ['steam', 'water'],
    ['R134a', 'r134a'],
    ['n-butane', 'n_butane'],
    ['SF6', 'sulfur_hexafluoride'],
    ['  Hydrogen ', 'hydrogen'],
  ])('%s is %s', (name, id) => expect(findFluid(name)?.id).toBe(id))

  it('means one fluid by each', () => {
    const names = FLUIDS.flatMap((fluid) => [
      ...new Set(
        [fluid.id, fluid.name.replace(/[ -]/g, '_'), ...fluid.info.otherNames].map((name) =>
          name.toLowerCase().replace(/[\s_-]+/g, ' '),
        ),
      ),
    ])
    expect(new Set(names).size).toBe(names.length)
    expect(FLUIDS.length).toBe(30)
    expect(findFluid('unobtainium')).toBeUndefined()
  })
})
