import { fromSI } from './convert'
import { isQuantity, quantity as quantityById, unitOf } from './quantities'
import { readUnit } from './unit'
import type { Unit } from './unit'

export interface Formatting {
  /** By id. */
  readonly quantity: string
  /** Left out: the first unit of the quantity. */
  readonly unit?: string
  /** Left out: as many as show five figures. */
  readonly decimals?: number
  readonly ambient_Pa: number
}

const MINUS = '\u2212'
const FIGURES = 5

/** The number alone, in the unit asked for: "88.3". A minus is a minus, not a hyphen. */
export function formatNumber(si: number, formatting: Formatting): string {
  return numberText(fromSI(si, unitFor(formatting), formatting.ambient_Pa), formatting.decimals)
}

/** The number with its unit: "88.3 °C". */
export function formatQuantity(si: number, formatting: Formatting): string {
  const unit = unitFor(formatting)
  const number = formatNumber(si, formatting)
  return unit.text === '1' ? number : `${number} ${unit.text}`
}

function unitFor({ quantity, unit }: Formatting): Unit {
  const asked = unit ? readUnit(unit) : null
  return asked ?? unitOf(isQuantity(quantity) ? quantityById(quantity).units[0] : '1')
}

/** A value too great or too small for its decimals is shown by its power of ten rather than as nothing, or as a row of zeros. */
function numberText(value: number, decimals: number | undefined): string {
  if (!Number.isFinite(value)) return '–'
  const size = Math.abs(value)
  const text =
    value === 0
      ? (0).toFixed(decimals ?? 0)
      : size >= 1e9 || (decimals === undefined && size < 1e-4)
        ? powerOfTen(value)
        : decimals === undefined
          ? String(Number(value.toPrecision(FIGURES)))
          : size < 0.5 * 10 ** -decimals && size > 0
            ? powerOfTen(value)
            : value.toFixed(decimals)
  return text.replace('-', MINUS)
}

function powerOfTen(value: number): string {
  const [mantissa, exponent] = value.toExponential(2).split('e')
  return `${Number(mantissa)}e${Number(exponent)}`
}
