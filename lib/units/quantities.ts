import type { Dimension } from './dimension'
import { sameDimension } from './dimension'
import { readUnit } from './unit'
import type { Unit } from './unit'

/** How a quantity adds: see lib/formula/types. */
export type QuantityScale = 'ratio' | 'point' | 'difference'

export interface Quantity {
  readonly id: string
  /** In words. */
  readonly label: string
  readonly dimension: Dimension
  readonly scale: QuantityScale
  /** For a menu: the first is the one a new column takes. */
  readonly units: readonly string[]
}

const table: readonly (readonly [id: string, label: string, units: string, scale?: QuantityScale])[] = [
  ['dimensionless', 'number', '1, %, ppm'],
  ['fraction', 'fraction', '%, 1, ppm'],
  ['pressure', 'pressure', 'bar, bar(g), kPa, kPa(g), MPa, MPa(g), mbar, Pa, psi, psi(g), atm, torr, mmHg, inHg'],
  ['pressure_difference', 'pressure difference', 'bar, mbar, kPa, MPa, Pa, psi, mmH2O, inH2O', 'difference'],
  ['temperature', 'temperature', '°C, K, °F, °R', 'point'],
  ['temperature_difference', 'temperature difference', 'K, °R', 'difference'],
  ['mass', 'mass', 'kg, g, t, lb, oz, mg'],
  ['volume', 'volume', 'L, m³, mL, cm³, ft³, in³, gal'],
  ['density', 'density', 'kg/m³, g/L, g/cm³, lb/ft³'],
  ['specific_volume', 'specific volume', 'm³/kg, L/kg, ft³/lb'],
  ['specific_energy', 'specific energy', 'kJ/kg, J/kg, MJ/kg, Btu/lb'],
  ['specific_entropy', 'specific entropy', 'kJ/(kg K), J/(kg K), Btu/(lb °R)'],
  ['specific_heat_capacity', 'specific heat capacity', 'J/(kg K), kJ/(kg K), Btu/(lb °R)'],
  ['heat_capacity', 'heat capacity', 'kJ/K, J/K'],
  ['energy', 'energy', 'kJ, J, MJ, kWh, Btu'],
  ['power', 'power', 'kW, W, MW, hp'],
  ['leak_rate', 'leak rate', 'mbar L/s, Pa m³/s'],
  ['time', 'time', 's, min, h, d, ms'],
  ['length', 'length', 'mm, m, cm, µm, in, ft'],
  ['area', 'area', 'm², cm², mm², in², ft²'],
  ['velocity', 'speed', 'm/s, ft/s'],
  ['mass_flow', 'mass flow', 'g/s, kg/s, kg/min, kg/h, lb/min, lb/h'],
  ['molar_flow', 'molar flow', 'mol/s, kmol/h'],
  ['volume_flow', 'volume flow', 'm³/h, m³/s, L/min, L/s, ft³/min, gal/min'],
  ['flow_coefficient', 'flow coefficient Kv', 'm³/h'],
  ['sonic_conductance', 'sonic conductance', 'L/(s bar), m³/(s Pa)'],
  ['pressure_rate', 'change of pressure in a time', 'bar/min, bar/s, MPa/min, psi/min, Pa/s'],
  ['temperature_rate', 'change of temperature in a time', 'K/min, K/s'],
  ['mass_flux', 'mass flux', 'kg/(s m²)'],
  ['heat_flux', 'heat flux', 'kW/m², W/m²'],
  ['heat_transfer_coefficient', 'heat-transfer coefficient', 'W/(m² K), kW/(m² K)'],
  ['thermal_conductance', 'thermal conductance', 'W/K'],
  ['thermal_conductivity', 'thermal conductivity', 'W/(m K), mW/(m K)'],
  ['thermal_expansion', 'coefficient of thermal expansion', '1/K'],
  ['joule_thomson', 'Joule–Thomson coefficient', 'K/bar, K/MPa'],
  ['compressibility', 'compressibility', '1/bar, 1/MPa, 1/Pa'],
  ['dynamic_viscosity', 'dynamic viscosity', 'µPa s, mPa s, Pa s, cP'],
  ['kinematic_viscosity', 'kinematic viscosity', 'mm²/s, m²/s'],
  ['molar_mass', 'molar mass', 'g/mol, kg/mol'],
  ['amount', 'amount of substance', 'mol, kmol'],
  ['molar_volume', 'molar volume', 'L/mol, m³/mol, cm³/mol'],
  ['molar_density', 'molar density', 'mol/L, mol/m³'],
  ['molar_energy', 'molar energy', 'kJ/mol, J/mol'],
  ['molar_entropy', 'molar entropy', 'J/(mol K)'],
  ['force', 'force', 'N, kN, kgf, lbf'],
  ['frequency', 'frequency', 'Hz, 1/s, 1/min'],
]

export const QUANTITIES: readonly Quantity[] = table.map(([id, label, list, scale = 'ratio']) => {
  const units = list.split(', ')
  return { id, label, dimension: unitOf(units[0]).dimension, scale, units }
})

const byId = new Map(QUANTITIES.map((quantity) => [quantity.id, quantity]))

export const isQuantity = (id: string): boolean => byId.has(id)

/** @throws Error where there is no quantity with this id: ask `isQuantity` of what comes from outside. */
export function quantity(id: string): Quantity {
  const found = byId.get(id)
  if (!found) throw new Error(`no quantity has the id ${id}`)
  return found
}

/** The quantity that a dimension most likely is; undefined where it has no name. */
export function quantityOf(dimension: Dimension, scale?: string): Quantity | undefined {
  const alike = QUANTITIES.filter((candidate) => sameDimension(candidate.dimension, dimension))
  const wanted = scale === 'difference' ? 'difference' : scale === 'point' || scale === 'open' ? 'point' : undefined
  return alike.find((candidate) => candidate.scale === wanted) ?? alike[0]
}

/** Whether a reading of a quantity can be in a unit: a difference has no zero, so that °C and gauge units are not for it. */
export function isUnitOf(unit: Unit, { dimension, scale }: Quantity): boolean {
  return sameDimension(unit.dimension, dimension) && !(scale === 'difference' && (unit.offset !== 0 || unit.gauge))
}

/** The unit that a column's numbers are in: the one it names, or the first of its quantity where that is none for it. */
export function columnUnit({
  quantity: id,
  unit: text = '',
}: {
  readonly quantity: string
  readonly unit?: string
}): Unit {
  const known = byId.get(id)
  const asked = readUnit(text)
  if (!known) return asked ?? unitOf('1')
  return asked && isUnitOf(asked, known) ? asked : unitOf(known.units[0])
}

/** A unit that is known to be one. @throws Error where it is none. */
export function unitOf(text: string): Unit {
  const unit = readUnit(text)
  if (!unit) throw new Error(`no unit is called ${text}`)
  return unit
}
