import { describe, expect, it } from 'vitest'
import { bind, compile } from '@/lib/formula'
import type { Type } from '@/lib/formula'
import { dimensionText } from '@/lib/units'
import { SCOPE, VOCABULARY, faultOf, quantityType, valueOf } from './vocabulary'

function typeOf(text: string): string {
  const compilation = compile(text, SCOPE, VOCABULARY)
  if (!compilation.ok) throw new Error(compilation.fault.reason)
  const { type } = compilation
  return type.kind === 'quantity' ? `${dimensionText(type.dimension)} ${type.scale}` : type.kind
}

describe('the quantity of an expression', () => {
  it.each([
    ['15 °C', 'K point'],
    ['15 K', 'K open'],
    ['T', 'K point'],
    ['T - T@from', 'K difference'],
    ['T - 15 °C', 'K difference'],
    ['T - 5 K', 'K open'],
    ['T + 5 K', 'K point'],
    ['T + dT', 'K point'],
    ['T - dT', 'K point'],
    ['dT + dT', 'K difference'],
    ['dT - 5 K', 'K difference'],
    ['dT * 2', 'K difference'],
    ['2 * dT', 'K difference'],
    ['-dT', 'K difference'],
    ['T * 1.2', 'K open'],
    ['T / T@from', '1 ratio'],
    ['2 bar', 'kg/(m s²) open'],
    ['5 bar(g)', 'kg/(m s²) point'],
    ['p', 'kg/(m s²) ratio'],
    ['p - p@from', 'kg/(m s²) difference'],
    ['p - 5 bar(g)', 'kg/(m s²) difference'],
    ['5 bar(g) - 2 bar(g)', 'kg/(m s²) difference'],
    ['300 bar - p', 'kg/(m s²) difference'],
    ['p - 2 bar', 'kg/(m s²) open'],
    ['5 bar(g) + 2 bar', 'kg/(m s²) point'],
    ['p + rise', 'kg/(m s²) ratio'],
    ['p - rise', 'kg/(m s²) ratio'],
    ['(p + p@from) / 2', 'kg/(m s²) ratio'],
    ['m * 8.3 [J/(kg K)] * T / (50 L)', 'kg/(m s²) open'],
    ['p * 50 L', 'kg m²/s² ratio'],
    ['m / (50 L)', 'kg/m³ ratio'],
    ['sqrt(2 * 5 [kJ/kg])', 'm/s ratio'],
    ['(8 [m^3])^(1/3)', 'm ratio'],
    ['(3 m)^-2', '1/m² ratio'],
    ['T^2 / T', 'K open'],
    ['57 %', '1 ratio'],
    ['p > 5 bar(g)', 'logical'],
    ['step & "!"', 'text'],
    ['if(p > 1 bar, 15 °C, 5 K)', 'K point'],
    ['max(p@all)', 'kg/(m s²) ratio'],
    ['max(p@all) - min(p@all)', 'kg/(m s²) difference'],
    ['average(T@all, 15 °C)', 'K point'],
    ['vessel.volume', 'm³ ratio'],
  ])('%s is %s', (text, type) => {
    expect(typeOf(text)).toBe(type)
  })
})

describe('quantities that do not go together', () => {
  it.each([
    ['p + m', 'p is a pressure and m is a mass: they cannot be added'],
    ['m - 5 K', 'm is a mass and 5 K is a temperature: they cannot be subtracted'],
    ['p > m', 'p is a pressure and m is a mass: they cannot be compared'],
    ['T + T@from', 'T + T@from: two temperatures cannot be added: a difference is written in K, a mean is average(…)'],
    [
      '15 °C + 5 °C',
      '15 °C + 5 °C: two temperatures cannot be added: a difference is written in K, a mean is average(…)',
    ],
    ['5 bar(g) + 2 bar(g)', '5 bar(g) + 2 bar(g): two gauge readings cannot be added'],
    ['p + 5 bar(g)', 'p + 5 bar(g): a gauge reading and an absolute pressure cannot be added'],
    ['dT - T', 'dT − T: a temperature cannot be taken from a difference'],
    ['rise - p', 'rise − p: a pressure cannot be taken from a difference'],
    ['dT > 5 °C', 'dT is a temperature difference and 5 °C is a temperature: they cannot be compared'],
    ['rise > p', 'rise is a pressure difference and p is a pressure: they cannot be compared'],
    [
      '5 bar(g) * 2',
      '5 bar(g) is a gauge reading: it cannot be multiplied or divided; write it as an absolute pressure',
    ],
    ['-T', 'T is a reading on a scale: it has no negative'],
    ['T %', 'T is no plain number: it cannot be a percentage'],
    ['2 ^ m', 'm is no plain number: it cannot be an exponent'],
    ['m ^ (p / p)', 'm has a unit, so its exponent has to be a number that stands in the formula'],
    ['m ^ 1e9', 'nothing is measured in such a power of m'],
    ['step + 1', 'step is a text: a number is needed here'],
    ['step & 1', '1 is a plain number: & joins texts'],
    ['p@all', 'a whole column is no value: sum, min or max it'],
    ['p@all + p', 'p@all is a whole column: a number is needed here'],
    ['sum(p, m)', 'sum takes numbers of one quantity, not a pressure and a mass together'],
    ['sum(T@all)', 'readings on a scale have no sum: two temperatures cannot be added'],
    ['abs(T)', 'a reading on a scale has no size of its own: take abs of a difference'],
    ['max(step)', 'max takes numbers'],
    ['if(m, 1, 2)', 'm is a mass, but if takes yes or no for condition'],
    ['if(p > 1 bar, T, m)', 'the results of if have to be of one kind'],
    ['ln(m)', 'm is a mass, but ln takes a plain number for x'],
    ['tank(5 kg)', '5 kg is a mass, but tank takes a volume for volume'],
    ['state(vessel, p: p, T: T)', 'vessel is a tank, but state takes a gas or a text for gas'],
    ['vessel.volume + 1 kg', 'vessel.volume is a volume and 1 kg is a mass: they cannot be added'],
    ['vessel > vessel@from', 'vessel is a tank: a number is needed here'],
    ['m.volume', 'm is a mass: it has no fields'],
    [
      '(p + 1 bar) * (p@[Fill quick] + p) + m',
      '(p + 1 bar) * (p@[Fill quick] + p) is kg²/(m² s⁴) and m is a mass: they cannot be added',
    ],
    ['vessel.mass', 'a tank has no mass; it has volume, mode'],
  ])('%s: %s', (text, reason) => {
    expect(faultOf(text).reason).toBe(reason)
    // as it is kept, the formula holds identities: what is said of it is in names all the same
    expect(faultOf(bind(text, SCOPE)).reason).toBe(reason)
  })

  it('should point at the part that is wrong', () => {
    expect(faultOf('1 kg + (p + m)').span).toEqual({ from: 8, to: 13 })
    expect(faultOf('sum(1, ln(m))').span).toEqual({ from: 10, to: 11 })
    expect(faultOf('vessel.mass').span).toEqual({ from: 7, to: 11 })
  })
})

describe('the quantity that a place wants', () => {
  const pressure = { expected: quantityType('pressure'), expectedWords: 'the column Pressure' }
  const rise = { expected: quantityType('pressure_difference'), expectedWords: 'the column Rise' }
  const temperature = { expected: quantityType('temperature'), expectedWords: 'the column Gas' }
  const difference = { expected: quantityType('temperature_difference'), expectedWords: 'the column Margin' }
  const text = { expected: { kind: 'text' } satisfies Type, expectedWords: 'the column Step' }

  it.each([
    ['m', pressure, 'this is a mass, but the column Pressure takes a pressure'],
    ['p - p@from', pressure, 'this is a pressure difference, but the column Pressure takes a pressure'],
    ['p', rise, 'this is a pressure, but the column Rise takes a pressure difference'],
    ['7 bar(g)', rise, 'this is a pressure, but the column Rise takes a pressure difference'],
    ['T - T@from', temperature, 'this is a temperature difference, but the column Gas takes a temperature'],
    ['T', difference, 'this is a temperature, but the column Margin takes a temperature difference'],
    ['15 °C', difference, 'this is a temperature, but the column Margin takes a temperature difference'],
    ['vessel', text, 'this is a tank, but the column Step takes a text'],
  ])('should refuse %s', (formula, expectation, reason) => {
    expect(faultOf(formula, {}, expectation)).toMatchObject({ fault: 'dimension', reason })
  })

  it.each([
    ['7 bar(g)', pressure],
    ['2 bar', pressure],
    ['p - 2 bar', pressure],
    ['2 bar', rise],
    ['p - p@from', rise],
    ['300 K', temperature],
    ['T * 2', temperature],
    ['5 K', difference],
    ['T - 15 °C', difference],
    ['step', text],
  ])('should take %s', (formula, expectation) => {
    expect(compile(formula, SCOPE, VOCABULARY, expectation)).toMatchObject({ ok: true })
  })
})

describe('temperatures and gauge pressures in numbers', () => {
  it.each<[string, number]>([
    ['15 °C', 288.15],
    ['72 °F - 32 °F', 40 / 1.8],
    ['15 °C - 10 K', 278.15],
    ['average(10 °C, 20 °C)', 288.15],
    // the ambient pressure of these tests is one bar
    ['5 bar(g)', 6e5],
    ['5 bar(g) - 2 bar(g)', 3e5],
    ['5 bar(g) + 2 bar', 8e5],
    ['-0.5 bar(g)', 5e4],
    ['2 * (1 bar + 50 kPa)', 3e5],
  ])('%s is %d in SI', (text, si) => {
    expect(valueOf(text)).toBeCloseTo(si, 9)
  })

  it('should refuse what lies below the end of a scale', () => {
    expect(faultOf('-300 °C').reason).toBe('−300 °C is below absolute zero')
    expect(faultOf('-1.5 bar(g)').reason).toBe('−1.5 bar(g) is below vacuum')
  })
})
