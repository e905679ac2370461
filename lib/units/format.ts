import { fromSI } from './convert'
import { columnUnit, isQuantity, quantity as quantityById } from './quantities'
import type { Unit } from './unit'

export interface Formatting {
  /** By id; a number whose quantity nobody knows is shown in SI. */
  readonly quantity: string
  /** Left out, or no unit of the quantity: the first of its menu. */
  readonly unit?: string
  /** Left out: as many as show five figures. */
  readonly decimals?: number
  readonly ambient_Pa: number
}

const MINUS = '\u2212'
const FIGURES = 5
const MOST_DECIMALS = 15
const GREATEST_IN_FULL = 1e9
const SMALLEST_IN_FULL = 1e-4

/** The number alone, in the unit asked for: "88.3". A minus is a minus, not a hyphen. */
export function formatNumber(si: number, formatting: Formatting): string {
  const unit = columnUnit(formatting)
  const value = fromSI(si, unit, formatting.ambient_Pa)
  if (!Number.isFinite(value)) return '–'
  return numberText(value, formatting.decimals, tinyMatters(unit, formatting.quantity)).replace(/^-/, MINUS)
}

/** The number with its unit: "88.3 °C". */
export function formatQuantity(si: number, formatting: Formatting): string {
  const unit = columnUnit(formatting)
  const number = formatNumber(si, formatting)
  return unit.text === '1' ? number : `${number} ${unit.text}`
}

/** A tiny number is a small amount of something, unless zero is an agreed point (0 °C, 0 bar(g)) or the likeness of two readings. */
const tinyMatters = (unit: Unit, id: string) =>
  unit.offset === 0 && !unit.gauge && !(isQuantity(id) && quantityById(id).scale === 'difference')

function numberText(value: number, decimals: number | undefined, tiny: boolean): string {
  const size = Math.abs(value)
  if (size >= GREATEST_IN_FULL) return powerOfTen(value)
  if (decimals === undefined) {
    if (size > 0 && size < SMALLEST_IN_FULL && tiny) return powerOfTen(value)
    return plain(size >= 10 ** FIGURES ? Math.round(value) : value.toPrecision(FIGURES))
  }
  const places = Math.min(Math.max(Math.round(decimals) || 0, 0), MOST_DECIMALS)
  const fixed = value.toFixed(places)
  if (Number(fixed) !== 0) return fixed
  // a residue of 4 mg in a column of whole kilograms is not nothing
  return size > 0 && tiny ? powerOfTen(value) : (0).toFixed(places)
}

/** Without the zeros that toPrecision leaves, and without a power of ten. */
function plain(value: number | string): string {
  const number = Number(value)
  return Math.abs(number) < SMALLEST_IN_FULL ? '0' : String(number)
}

function powerOfTen(value: number): string {
  const [mantissa, exponent] = value.toExponential(2).split('e')
  return `${Number(mantissa)}e${Number(exponent)}`
}
