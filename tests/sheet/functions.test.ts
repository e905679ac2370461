import { describe, expect, it } from 'vitest'
import { evaluateFormulas } from '@/lib/sheet/engine/evaluate'
import { FUNCTIONS, VOCABULARY } from '@/lib/sheet/engine/vocabulary'
import { compile } from '@/lib/formula'

const shownOf = (formula: string) => {
  const [result] = evaluateFormulas([formula], [], 'gpl-v3')
  return 'shown' in result ? result.shown : 'text' in result ? result.text : `! ${result.error}`
}

describe('the function table', () => {
  it('should have each name once', () => {
    const names = FUNCTIONS.map((spec) => spec.name.toLowerCase())
    expect(names).toEqual([...new Set(names)])
    expect(VOCABULARY.functions.size).toBe(names.length)
  })

  it.each(FUNCTIONS.map((spec) => [spec.name, spec] as const))(
    'should work out the example of %s as it says',
    (_name, spec) => {
      expect(shownOf(spec.example.formula)).toBe(spec.example.shown)
    },
  )

  it.each(FUNCTIONS.map((spec) => [spec.name, spec] as const))(
    'should say in words what %s is and takes',
    (_name, spec) => {
      expect(spec.help).not.toBe('')
      for (const parameter of spec.parameters) expect(parameter.help, parameter.name).not.toBe('')
      // a default stands in for an argument: it has to be a formula of the argument's own type
      for (const parameter of spec.parameters) {
        if (parameter.default === undefined) continue
        const types = Array.isArray(parameter.type) ? parameter.type : [parameter.type]
        const scope = { columns: [], rows: [], things: [] }
        expect(
          types.some((expected) => compile(parameter.default!, scope, VOCABULARY, { expected }).ok),
          parameter.name,
        ).toBe(true)
      }
    },
  )
})

describe('a line that is tried by itself', () => {
  it.each([
    ['temperature(water, p: 1 MPa, u: enthalpy(water, p: 1 MPa, T: 300 °C))', '456.45 °C'],
    [
      'charge(from: start(vessel(50 L), water, p: 0 bar), supply: header(water, p: 1 MPa, T: 300 °C), until_p: 1 MPa).T',
      '456.45 °C',
    ],
    ['heat_capacity_ratio(ideal(air), p: 1 bar, T: 300 K) * 300 K', '146.85 °C'],
    [
      'charge(from: start(vessel(50 L), ideal(air), p: 0 bar), supply: header(ideal(air), p: 1 bar, T: 300 K), until_p: 1 bar).T',
      '146.85 °C',
    ],
  ])('should give %j', (formula, shown) => {
    expect(shownOf(formula)).toBe(shown)
  })

  it.each([
    ['charge(', 'a closing bracket is missing'],
    ['charg(1)', 'there is no function charg'],
    ['foo + 1', 'foo is not known here'],
    ['1 bar + 1 K', '1 bar is a pressure and 1 K is a temperature'],
    ['density(water, p: 1 bar, T: 250 K)', 'no water below 273.16 K'],
    ['density(nitrogen, p: 1 bar)', 'a state is given by two of these together'],
    [
      'charge(from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), supply: header(nitrogen, p: 100 bar, T: 15 °C), until_p: 200 bar)',
      'the supply has 100 bar: 200 bar cannot be reached',
    ],
    ['start(vessel(-1 L), nitrogen, p: 5 bar, T: 18 °C)', 'the volume of a vessel has to be more than zero'],
    ['vessel(volume: 5 kg)', '5 kg is a mass, but vessel takes a volume for volume'],
    ['start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C).colour', 'a run has no colour'],
  ])('should say of %j what is wrong', (formula, reason) => {
    expect(shownOf(formula)).toContain(reason)
  })
})
