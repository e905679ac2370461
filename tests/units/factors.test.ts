import Decimal from 'decimal.js'
import * as UnitsNet from 'unitsnet-js'
import { describe, expect, it } from 'vitest'
import { QUANTITIES, fromSI, toSI, unitOf } from '@/lib/units'

Decimal.set({ precision: 40 })

/** The definitions, by hand and in forty figures: yard and pound agreement of 1959, standard gravity of the CGPM of 1901. */
const INCH = new Decimal('0.0254')
const FOOT = INCH.mul(12)
const POUND = new Decimal('0.45359237')
const GRAVITY = new Decimal('9.80665')
const POUND_FORCE = POUND.mul(GRAVITY)
/** ISO 80000-5: the International Table Btu, by 1 Btu/lb = 2.326 kJ/kg. */
const BTU = POUND.mul(2326)
const GALLON = INCH.pow(3).mul(231)

describe('a unit in SI', () => {
  it.each<[string, Decimal.Value]>([
    ['in', INCH],
    ['ft', FOOT],
    ['lb', POUND],
    ['oz', POUND.div(16)],
    ['lbf', POUND_FORCE],
    ['kgf', GRAVITY],
    ['psi', POUND_FORCE.div(INCH.pow(2))],
    ['atm', 101_325],
    ['torr', new Decimal(101_325).div(760)],
    ['bar', 1e5],
    ['mbar', 100],
    ['mmHg', new Decimal('13.5951').mul(GRAVITY)],
    ['inHg', new Decimal('13.5951').mul(GRAVITY).mul('25.4')],
    ['mmH2O', GRAVITY],
    ['inH2O', GRAVITY.mul('25.4')],
    ['Btu', BTU],
    ['Btu/lb', 2326],
    ['Btu/(lb °R)', new Decimal(2326).mul(9).div(5)],
    ['cal', '4.184'],
    ['kWh', 3.6e6],
    ['hp', FOOT.mul(POUND_FORCE).mul(550)],
    ['gal', GALLON],
    ['gal/min', GALLON.div(60)],
    ['L', '0.001'],
    ['lb/ft³', POUND.div(FOOT.pow(3))],
    ['ft³/min', FOOT.pow(3).div(60)],
    ['lb/h', POUND.div(3600)],
    ['kgf/cm^2', 98_066.5],
    ['L/(s bar)', 1e-8],
    ['cP', '0.001'],
    ['%', '0.01'],
    ['ppm', '0.000001'],
    ['d', 86_400],
  ])('should be exact: %s', (text, exact) => {
    const unit = unitOf(text)
    expect(new Decimal(toSI(1, unit, 0)).div(exact).minus(1).abs().toNumber()).toBeLessThan(3e-16)
  })

  it('should carry decimals over without a trace of binary fractions', () => {
    for (let n = 1; n <= 2_000; n++) {
      expect(toSI(n, unitOf('mm'), 0)).toBe(Number(`${n}e-3`))
      expect(toSI(n, unitOf('%'), 0)).toBe(Number(`${n}e-2`))
      expect(toSI(n, unitOf('µPa s'), 0)).toBe(Number(`${n}e-6`))
      expect(toSI(n, unitOf('cm²'), 0)).toBe(Number(`${n}e-4`))
      expect(toSI(n, unitOf('kJ/kg'), 0)).toBe(n * 1000)
    }
  })
})

describe('scales with a zero of their own', () => {
  // the fixed points of the definition: 0 °F is 32 degrees of 5/9 K below the ice point of 273.15 K
  it.each([
    [0, '°C', 273.15],
    [-273.15, '°C', 0],
    [32, '°F', 273.15],
    [212, '°F', 373.15],
    [-40, '°F', 233.15],
    [-459.67, '°F', 0],
    [491.67, '°R', 273.15],
  ])('should read %d %s as %d K', (value, unit, kelvin) => {
    expect(toSI(value, unitOf(unit), 0)).toBeCloseTo(kelvin, 12)
    expect(fromSI(kelvin, unitOf(unit), 0)).toBeCloseTo(value, 12)
  })

  it('should count gauge pressures from the ambient pressure that is handed in', () => {
    expect(toSI(0, unitOf('bar(g)'), 98_000)).toBe(98_000)
    expect(toSI(7, unitOf('bar(g)'), 101_325)).toBe(801_325)
    expect(fromSI(101_325, unitOf('psi(g)'), 101_325)).toBe(0)
    expect(fromSI(101_325, unitOf('psi'), 50_000)).toBeCloseTo(14.695_948_775_513_45, 12)
  })
})

describe('every unit in the menus', () => {
  const inMenus = QUANTITIES.flatMap((quantity) => quantity.units.map((unit) => [quantity.id, unit] as const))

  it.each(inMenus)('%s in %s should come back to 1e-12', (_, text) => {
    const unit = unitOf(text)
    for (const value of [1, 0.1, -7.3, 123_456.789, 1e-6, 3e8]) {
      const back = fromSI(toSI(value, unit, 101_325), unit, 101_325)
      // next to a zero of its own a reading is as fine as the scale is, not as the number is
      const scale = Math.max(Math.abs(value), unit.offset, unit.gauge ? 101_325 / unit.factor : 0)
      expect(Math.abs(back - value) / scale).toBeLessThan(1e-12)
    }
  })

  it.each(inMenus)('%s: %s should be written as it reads, and be of that quantity', (id, text) => {
    const quantity = QUANTITIES.find((candidate) => candidate.id === id)!
    expect(unitOf(text).text).toBe(text)
    expect(unitOf(text).dimension).toEqual(quantity.dimension)
  })
})

describe('against unitsnet-js, quantity by quantity', () => {
  const { Pressure, Density, SpecificEnergy, MassFlow, VolumeFlow, Temperature, Power, ThermalConductivity } = UnitsNet
  // factors that unitsnet-js rounds are held to its own figures only as far as these go
  it.each<[string, number, number]>([
    ['bar', new Pressure(1, UnitsNet.PressureUnits.Bars).Pascals, 1e-15],
    ['psi', new Pressure(1, UnitsNet.PressureUnits.PoundsForcePerSquareInch).Pascals, 1e-12],
    ['mmHg', new Pressure(1, UnitsNet.PressureUnits.MillimetersOfMercury).Pascals, 1e-7],
    ['inHg', new Pressure(1, UnitsNet.PressureUnits.InchesOfMercury).Pascals, 1e-7],
    ['torr', new Pressure(1, UnitsNet.PressureUnits.Torrs).Pascals, 3e-6],
    ['kgf/cm²', new Pressure(1, UnitsNet.PressureUnits.KilogramsForcePerSquareCentimeter).Pascals, 1e-12],
    ['lb/ft³', new Density(1, UnitsNet.DensityUnits.PoundsPerCubicFoot).KilogramsPerCubicMeter, 1e-8],
    ['g/cm³', new Density(1, UnitsNet.DensityUnits.GramsPerCubicCentimeter).KilogramsPerCubicMeter, 1e-15],
    ['Btu/lb', new SpecificEnergy(1, UnitsNet.SpecificEnergyUnits.BtuPerPound).JoulesPerKilogram, 1e-7],
    ['lb/min', new MassFlow(1, UnitsNet.MassFlowUnits.PoundsPerMinute).KilogramsPerSecond, 3e-6],
    ['kg/h', new MassFlow(1, UnitsNet.MassFlowUnits.KilogramsPerHour).KilogramsPerSecond, 1e-12],
    ['L/min', new VolumeFlow(1, UnitsNet.VolumeFlowUnits.LitersPerMinute).CubicMetersPerSecond, 1e-12],
    ['ft³/min', new VolumeFlow(1, UnitsNet.VolumeFlowUnits.CubicFeetPerMinute).CubicMetersPerSecond, 1e-6],
    ['°F', new Temperature(1, UnitsNet.TemperatureUnits.DegreesFahrenheit).Kelvins, 1e-12],
    ['hp', new Power(1, UnitsNet.PowerUnits.MechanicalHorsepower).Watts, 2e-5],
    [
      'W/(m K)',
      new ThermalConductivity(1, UnitsNet.ThermalConductivityUnits.WattsPerMeterKelvin).WattsPerMeterKelvin,
      1e-15,
    ],
  ])('should agree on %s', (text, theirs, tolerance) => {
    expect(Math.abs(toSI(1, unitOf(text), 0) / theirs - 1)).toBeLessThanOrEqual(tolerance)
  })
})
