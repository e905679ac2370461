import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { QUANTITIES, dimensionText, dimensionWords, quantityOf, readUnit, toSI, unitOf, unknownUnit } from '@/lib/units'

const text = (written: string) => readUnit(written)?.text ?? null

describe('a unit as people spell it', () => {
  it.each([
    ['degC', '°C'],
    ['C', '°C'],
    ['℃', '°C'],
    ['º C', '°C'],
    ['degF', '°F'],
    ['m3', 'm³'],
    ['m^3', 'm³'],
    ['m³', 'm³'],
    ['l', 'L'],
    ['ml', 'mL'],
    ['um', 'µm'],
    ['μm', 'µm'],
    ['barg', 'bar(g)'],
    ['bar (g)', 'bar(g)'],
    ['psig', 'psi(g)'],
    ['kPa(g)', 'kPa(g)'],
    ['bar(a)', 'bar'],
    ['psia', 'psi'],
    ['BAR', 'bar'],
    ['Mpa', 'MPa'],
    ['"', 'in'],
    ['hr', 'h'],
    ['kJ/kg', 'kJ/kg'],
    ['W/(m^2 K)', 'W/(m² K)'],
    ['W/(m2·K)', 'W/(m² K)'],
    ['W/(m²*K)', 'W/(m² K)'],
    ['W m-2 K-1', 'W m⁻² K⁻¹'],
    ['kg/m3', 'kg/m³'],
    ['1/s', '1/s'],
    ['mbar L/s', 'mbar L/s'],
    ['Pa·s', 'Pa s'],
  ])('should be read: %s', (written, shown) => {
    expect(text(written)).toBe(shown)
  })

  it.each([
    '',
    'zork',
    'W/m2 K',
    'J/kg·K',
    'J/(kg °C)',
    'kg(g)',
    'kbar(g)(g)',
    'm^99',
    'm^0',
    '/s',
    'kg/',
    '(kg',
    'kg)',
    'mpa',
    'Mbar',
  ])('should be refused rather than guessed: %j', (written) => {
    expect(readUnit(written)).toBeNull()
  })

  it('should not take the words of the program’s own language for units', () => {
    for (const word of ['constructor', 'toString', '__proto__', 'hasOwnProperty', 'valueOf'])
      expect(readUnit(word)).toBeNull()
  })

  it.each([
    ['W/m2 K', 'no unit is called “W/m2 K”: is W/(m² K) meant?'],
    ['J/(kg °C)', 'no unit is called “J/(kg °C)”: per degree is written per K, J/(kg K)'],
    ['KPA(G)', 'no unit is called “KPA(G)”: is kPa(g) meant?'],
    ['mpa', 'no unit is called “mpa”: is MPa meant?'],
    ['zork', 'no unit is called “zork”'],
  ])('should be explained where it is none: %s', (written, reason) => {
    expect(unknownUnit(written)).toBe(reason)
  })
})

describe('compound units', () => {
  const atom = fc.constantFrom('kg', 'm', 's', 'K', 'mol', 'kJ', 'mbar', 'ft', 'lb', 'µm', 'W', 'Pa', 'L', 'in')
  const term = fc
    .tuple(atom, fc.constantFrom('', '2', '^3', '²', '-1', '^-2'))
    .map(([name, exponent]) => name + exponent)
  const product = fc.array(term, { minLength: 1, maxLength: 3 }).map((terms) => terms.join(' '))
  const compound = fc.oneof(
    product,
    fc.tuple(product, term).map(([over, under]) => `${over}/${under}`),
    fc.tuple(product, product).map(([over, under]) => `${over}/(${under})`),
    fc.tuple(product, product).map(([over, under]) => `(${over})/(${under})^2`),
  )

  it('should be shown so that they read the same', () => {
    fc.assert(
      fc.property(compound, (written) => {
        const unit = readUnit(written)!
        expect(unit).not.toBeNull()
        expect(readUnit(unit.text)).toEqual(unit)
      }),
    )
  })

  it('should have the dimension and the size that their parts have together', () => {
    fc.assert(
      fc.property(product, product, (over, under) => {
        const [whole, a, b] = [`(${over})/(${under})`, over, under].map((written) => readUnit(written)!)
        const expected = toSI(1, a, 0) / toSI(1, b, 0)
        expect(Math.abs(toSI(1, whole, 0) / expected - 1)).toBeLessThan(1e-13)
        whole.dimension.forEach((exponent, i) => expect(exponent).toBe(a.dimension[i] - b.dimension[i]))
      }),
    )
  })

  it('should never throw, whatever the text', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ unit: 'binary', maxLength: 80 }),
          fc.string({ unit: fc.constantFrom(...'kgm²/()^-1 °C·s%') }),
        ),
        (any) => {
          const unit = readUnit(any)
          if (unit) expect(Number.isFinite(toSI(1, unit, 0))).toBe(true)
          expect(unknownUnit(any)).toContain('no unit')
        },
      ),
      { numRuns: 2_000 },
    )
  })
})

describe('dimensions in words', () => {
  it.each([
    ['bar', 'a pressure'],
    ['L', 'a volume'],
    ['kg/s', 'a mass flow'],
    ['J', 'an energy'],
    ['1', 'a plain number'],
    ['kg m', 'kg m'],
    ['kg²/(m s³)', 'kg²/(m s³)'],
  ])('should call %s %s', (unit, words) => {
    expect(dimensionWords(unitOf(unit).dimension)).toBe(words)
  })

  it('should tell a temperature from a difference of two', () => {
    const { dimension } = unitOf('K')
    expect(dimensionWords(dimension, 'point')).toBe('a temperature')
    expect(dimensionWords(dimension, 'difference')).toBe('a temperature difference')
    expect(dimensionWords(unitOf('bar').dimension, 'difference')).toBe('a pressure difference')
  })

  it('should be written in base units', () => {
    expect(dimensionText(unitOf('Pa').dimension)).toBe('kg/(m s²)')
    expect(dimensionText(unitOf('1/s').dimension)).toBe('1/s')
    expect(dimensionText([0, 0.5, 0, 0, 0])).toBe('m^0.5')
  })

  it('should find the quantity again, for those that share their dimension with no other', () => {
    const shared = (id: string) => {
      const { dimension } = QUANTITIES.find((quantity) => quantity.id === id)!
      return QUANTITIES.filter((quantity) => quantity.dimension.join() === dimension.join()).length > 1
    }
    const alone = QUANTITIES.filter((quantity) => !shared(quantity.id))
    expect(alone.length).toBeGreaterThan(20)
    for (const quantity of alone) expect(quantityOf(quantity.dimension)?.id).toBe(quantity.id)
  })
})
