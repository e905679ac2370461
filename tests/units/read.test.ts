import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { compile } from '@/lib/formula'
import { QUANTITIES, readQuantity, toSI, unitOf } from '@/lib/units'

const AMBIENT = 101_325
const read = (text: string, quantity: string, unit = '') => readQuantity(text, { quantity, unit, ambient_Pa: AMBIENT })

describe('what is typed into a cell', () => {
  it.each([
    ['200 bar', 'pressure', 'psi', 20_000_000, '200 bar'],
    ['200', 'pressure', 'bar', 20_000_000, '200 bar'],
    ['200bar', 'pressure', 'psi', 20_000_000, '200 bar'],
    ['7 bar(g)', 'pressure', 'bar', 801_325, '7 bar(g)'],
    ['7 barg', 'pressure', 'bar', 801_325, '7 bar(g)'],
    ['7', 'pressure', 'bar(g)', 801_325, '7 bar(g)'],
    ['-0.5 bar(g)', 'pressure', 'bar', 51_325, '-0.5 bar(g)'],
    ['15 °C', 'temperature', 'K', 288.15, '15 °C'],
    ['−20', 'temperature', '°C', 253.15, '-20 °C'],
    ['– 20', 'temperature', '°C', 253.15, '-20 °C'],
    ['3/8 in', 'length', 'mm', 0.009_525, '0.375 in'],
    ['3/8"', 'length', 'mm', 0.009_525, '0.375 in'],
    ['1 1/2 in', 'length', 'mm', 0.0381, '1.5 in'],
    ['1 200 kg', 'mass', 'kg', 1200, '1200 kg'],
    ['1 200 000.5 kg', 'mass', 'kg', 1_200_000.5, '1200000.5 kg'],
    ['.5 kg', 'mass', 'kg', 0.5, '0.5 kg'],
    ['1e-3 kg', 'mass', 'kg', 0.001, '0.001 kg'],
    ['57 %', 'fraction', '1', 0.57, '57 %'],
    ['57', 'fraction', '%', 0.57, '57 %'],
    ['3', 'dimensionless', '1', 3, '3'],
    ['470 J/(kg K)', 'specific_heat_capacity', 'kJ/(kg K)', 470, '470 [J/(kg K)]'],
    ['470 [J/(kg K)]', 'specific_heat_capacity', '', 470, '470 [J/(kg K)]'],
    ['0.75 m2', 'area', 'cm²', 0.75, '0.75 m²'],
    ['5 K', 'temperature_difference', 'K', 5, '5 K'],
    ['3 mbar', 'pressure_difference', 'bar', 300, '3 mbar'],
  ])('should be read: %j as %s', (text, quantity, unit, si, formula) => {
    const reading = read(text, quantity, unit)
    expect(reading).toMatchObject({ ok: true, formula })
    if (reading.ok) expect(Math.abs(reading.si - si)).toBeLessThanOrEqual(1e-15 * Math.abs(si))
  })

  it('should read 72 °F to the last figure', () => {
    const reading = read('72 °F', 'temperature', '°C')
    expect(reading.ok && reading.si).toBeCloseTo(295.372_222_222_222_2, 11)
  })

  it.each([
    ['1,5 bar', 'pressure', 'write decimals with a point, 1.5, and thousands with none: a comma is read two ways'],
    ['1,000', 'mass', 'write decimals with a point, 1.5, and thousands with none: a comma is read two ways'],
    ['abc', 'mass', '“abc” is no number'],
    ['', 'mass', '“” is no number'],
    ['5 zork', 'mass', 'no unit is called “zork”'],
    ['1.5 200 kg', 'mass', 'no unit is called “200 kg”'],
    ['5 bar', 'mass', 'bar is for a pressure, here a mass is needed'],
    ['5 °C', 'temperature_difference', '°C is for a temperature, here a temperature difference is needed'],
    ['5 bar(g)', 'pressure_difference', 'bar(g) is for a pressure, here a pressure difference is needed'],
    ['1/0 in', 'length', '1/0 is no number that can be worked with'],
    ['1e999', 'mass', '1e999 is no number that can be worked with'],
    ['-300 °C', 'temperature', '−300 °C is below absolute zero'],
    ['-2 bar(g)', 'pressure', '−2 bar(g) is below vacuum'],
    ['5', 'run', 'this column takes no number'],
  ])('should be refused with a reason: %j as %s', (text, quantity, reason) => {
    expect(read(text, quantity)).toEqual({ ok: false, reason })
  })

  it('should take a plain number in the first unit of the menu where the column’s own is none', () => {
    expect(read('5', 'pressure', 'zork')).toMatchObject({ ok: true, formula: '5 bar' })
    expect(read('5', 'pressure', '°C')).toMatchObject({ ok: true, formula: '5 bar' })
    expect(read('5', 'pressure_difference', 'bar(g)')).toMatchObject({ ok: true, formula: '5 bar' })
  })

  it('should never throw, and keep exactly the value it read in the formula it gives', () => {
    const menu = QUANTITIES.flatMap((quantity) => quantity.units.map((unit) => [quantity.id, unit] as const))
    const number = fc.oneof(
      fc.double({ noNaN: true, noDefaultInfinity: true, min: 0, max: 1e9 }).map(String),
      fc.nat(100_000).map((n) => String(n / 100)),
      fc.tuple(fc.nat(9), fc.integer({ min: 1, max: 64 })).map(([over, under]) => `${over}/${under}`),
    )
    const vocabulary = { functions: new Map(), things: new Map(), words: new Map() }
    const nothing = { columns: [], rows: [], things: [] }
    fc.assert(
      fc.property(fc.constantFrom(...menu), number, ([quantity, unit], digits) => {
        const reading = read(`${digits} ${unit === '1' ? '' : unit}`, quantity, unit)
        if (!reading.ok) throw new Error(reading.reason)
        const compilation = compile(reading.formula, nothing, vocabulary)
        if (!compilation.ok) throw new Error(compilation.fault.reason)
        expect(compilation.literal).toBe(true)
        expect(compilation.run([], { p_Pa: AMBIENT, T_K: 290 })).toBe(reading.si)
        if (!digits.includes('/')) expect(reading.si).toBe(toSI(Number(digits), unitOf(unit), AMBIENT))
      }),
      { numRuns: 2_000 },
    )
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), fc.constantFrom(...menu), (text, [quantity, unit]) => {
        const reading = read(text, quantity, unit)
        expect(reading.ok ? reading.formula : reading.reason).not.toBe('')
      }),
    )
  })
})
