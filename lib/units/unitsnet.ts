import * as UnitsNet from 'unitsnet-js'

/*
 * The one door to unitsnet-js: how many SI units one unit is. Where its factor is rounded, the exact one stands here,
 * with the definition that it comes from.
 */

const POUND_KG = 0.45359237
const STANDARD_GRAVITY_M_S2 = 9.80665
const INCH_M = 0.0254
/** International Table Btu: 1 Btu/lb is 2.326 kJ/kg exactly. */
const BTU_J = 2326 * POUND_KG

const EXACT: Readonly<Record<string, number>> = {
  psi: (POUND_KG * STANDARD_GRAVITY_M_S2) / INCH_M ** 2,
  lbf: POUND_KG * STANDARD_GRAVITY_M_S2,
  // conventional columns: mercury of 13 595.1 kg/m³, water of 1 000 kg/m³, under standard gravity
  mmHg: 13.5951 * STANDARD_GRAVITY_M_S2,
  inHg: 13.5951 * STANDARD_GRAVITY_M_S2 * 25.4,
  mmH2O: STANDARD_GRAVITY_M_S2,
  inH2O: STANDARD_GRAVITY_M_S2 * 25.4,
  torr: 101_325 / 760,
  Btu: BTU_J,
  // mechanical: 550 foot-pounds in a second
  hp: 550 * 0.3048 * POUND_KG * STANDARD_GRAVITY_M_S2,
}

const factor = {
  length: (unit: UnitsNet.LengthUnits) => new UnitsNet.Length(1, unit).convert(UnitsNet.LengthUnits.Meters),
  mass: (unit: UnitsNet.MassUnits) => new UnitsNet.Mass(1, unit).convert(UnitsNet.MassUnits.Kilograms),
  duration: (unit: UnitsNet.DurationUnits) => new UnitsNet.Duration(1, unit).convert(UnitsNet.DurationUnits.Seconds),
  pressure: (unit: UnitsNet.PressureUnits) => new UnitsNet.Pressure(1, unit).convert(UnitsNet.PressureUnits.Pascals),
  volume: (unit: UnitsNet.VolumeUnits) => new UnitsNet.Volume(1, unit).convert(UnitsNet.VolumeUnits.CubicMeters),
  energy: (unit: UnitsNet.EnergyUnits) => new UnitsNet.Energy(1, unit).convert(UnitsNet.EnergyUnits.Joules),
  force: (unit: UnitsNet.ForceUnits) => new UnitsNet.Force(1, unit).convert(UnitsNet.ForceUnits.Newtons),
  ratio: (unit: UnitsNet.RatioUnits) => new UnitsNet.Ratio(1, unit).convert(UnitsNet.RatioUnits.DecimalFractions),
}

/** How many SI units one unit is, for every unit that is neither of the SI nor a scale with a zero of its own. */
export const FACTORS = {
  in: factor.length(UnitsNet.LengthUnits.Inches),
  ft: factor.length(UnitsNet.LengthUnits.Feet),
  lb: factor.mass(UnitsNet.MassUnits.Pounds),
  oz: factor.mass(UnitsNet.MassUnits.Ounces),
  t: factor.mass(UnitsNet.MassUnits.Tonnes),
  min: factor.duration(UnitsNet.DurationUnits.Minutes),
  h: factor.duration(UnitsNet.DurationUnits.Hours),
  d: factor.duration(UnitsNet.DurationUnits.Days),
  bar: factor.pressure(UnitsNet.PressureUnits.Bars),
  atm: factor.pressure(UnitsNet.PressureUnits.Atmospheres),
  gal: factor.volume(UnitsNet.VolumeUnits.UsGallons),
  cal: factor.energy(UnitsNet.EnergyUnits.Calories),
  kgf: factor.force(UnitsNet.ForceUnits.KilogramsForce),
  '%': factor.ratio(UnitsNet.RatioUnits.Percent),
  ppm: factor.ratio(UnitsNet.RatioUnits.PartsPerMillion),
  ...EXACT,
} as Readonly<Record<string, number>>
