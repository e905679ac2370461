import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { QUANTITIES, formatNumber, formatQuantity, fromSI, unitOf } from '@/lib/units'

const AMBIENT = 100_000
const number = (si: number, quantity: string, unit?: string, decimals?: number) =>
  formatNumber(si, { quantity, unit, decimals, ambient_Pa: AMBIENT })

describe('a value as people read it', () => {
  it.each([
    [361.45, 'temperature', '°C', 1, '88.3'],
    [253.15, 'temperature', '°C', 1, '−20.0'],
    [2e7, 'pressure', 'bar', 1, '200.0'],
    [8e5, 'pressure', 'bar(g)', 2, '7.00'],
    [5e4, 'pressure', 'bar(g)', 2, '−0.50'],
    [0.57, 'fraction', '%', 0, '57'],
    [0.05, 'volume', 'L', 0, '50'],
    [2e7, 'pressure', 'bar', undefined, '200'],
    [123_456_789, 'mass', 'kg', undefined, '123456789'],
    [12.345_678, 'mass', 'kg', undefined, '12.346'],
    [3e12, 'mass', 'kg', 1, '3e12'],
    [4e-6, 'mass', 'kg', 1, '4e-6'],
    [-4.56e-6, 'mass', 'kg', 1, '−4.56e-6'],
    [4e-6, 'mass', 'kg', undefined, '4e-6'],
    [0, 'mass', 'kg', 2, '0.00'],
    [0, 'mass', 'kg', undefined, '0'],
  ])('should show %d as %s in %s, %s decimals', (si, quantity, unit, decimals, shown) => {
    expect(number(si, quantity, unit, decimals)).toBe(shown)
  })

  it('should show nothing but zero next to a zero that is only agreed', () => {
    expect(number(273.15 - 0.02, 'temperature', '°C', 1)).toBe('0.0')
    expect(number(273.15 + 1e-11, 'temperature', '°C')).toBe('0')
    expect(number(AMBIENT - 1, 'pressure', 'bar(g)', 1)).toBe('0.0')
    expect(number(-1e-13, 'temperature_difference', 'K', 1)).toBe('0.0')
  })

  it('should carry its unit, and none where there is none', () => {
    const shown = (si: number, quantity: string, unit?: string) =>
      formatQuantity(si, { quantity, unit, decimals: 1, ambient_Pa: AMBIENT })
    expect(shown(361.45, 'temperature', '°C')).toBe('88.3 °C')
    expect(shown(8e5, 'pressure', 'barg')).toBe('7.0 bar(g)')
    expect(shown(0.25, 'dimensionless')).toBe('0.3')
  })

  it('should fall back on the first unit of the menu where the one that is asked for is none', () => {
    for (const unit of ['', 'zork', 'kg', 'bar(g)']) {
      expect(formatQuantity(2e5, { quantity: 'pressure_difference', unit, ambient_Pa: AMBIENT })).toBe('2 bar')
    }
    expect(formatQuantity(2, { quantity: 'what nobody knows', ambient_Pa: AMBIENT })).toBe('2')
  })

  it('should come through whatever stands in a document as decimals or as a value', () => {
    for (const decimals of [-3, 500, 2.5, Number.NaN, Infinity])
      expect(number(2e7, 'pressure', 'bar', decimals)).toMatch(/^200(\.0+)?$/)
    expect(number(Number.NaN, 'pressure')).toBe('–')
    expect(number(Infinity, 'pressure')).toBe('–')
  })

  it('should be off by no more than half of its last place', () => {
    const menu = QUANTITIES.flatMap((quantity) => quantity.units.map((unit) => [quantity.id, unit] as const))
    fc.assert(
      fc.property(
        fc.constantFrom(...menu),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.nat(6),
        ([quantity, unit], si, decimals) => {
          const shown = Number(number(si, quantity, unit, decimals).replace('−', '-'))
          const value = fromSI(si, unitOf(unit), AMBIENT)
          const slack = Math.abs(value) >= 1e9 || Math.abs(value) < 10 ** -decimals ? Math.abs(value) * 0.006 : 0
          expect(Math.abs(shown - value)).toBeLessThanOrEqual(Math.max(0.5 * 10 ** -decimals, slack) * (1 + 1e-9))
        },
      ),
    )
  })
})
