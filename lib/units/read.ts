import { sameDimension } from './dimension'
import { toSI } from './convert'
import { quantity as quantityById, unitOf } from './quantities'
import { readUnit } from './unit'
import type { Unit } from './unit'
import { dimensionWords } from './words'

export interface ReadingContext {
  /** The column's quantity, by id. */
  readonly quantity: string
  /** The unit that a plain number is in. */
  readonly unit: string
  readonly ambient_Pa: number
}

export type Reading =
  | {
      readonly ok: true
      readonly si: number
      /** The same value as a formula keeps it: `200 bar`, `0.375 in`. */
      readonly formula: string
    }
  | { readonly ok: false; readonly reason: string }

const NUMBER = String.raw`[+\-−–]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+\-−]?\d+)?`
const FRACTION = String.raw`[+\-−–]?(?:\d+[ \u00a0-])?\d+/\d+`
const READING = new RegExp(`^(${FRACTION}|${NUMBER})\\s*(.*)$`, 'su')

/**
 * Reads what a person types into a cell: `200 bar`, `15 °C`, `3/8 in`, `1 1/2 in`, `72 °F`, or a plain number in the
 * column's unit. Spaces part thousands; a comma is refused, since it parts thousands in one country and decimals in another.
 */
export function readQuantity(text: string, context: ReadingContext): Reading {
  const wanted = quantityById(context.quantity)
  const trimmed = text.trim().replaceAll('\u2009', ' ').replaceAll('\u202f', ' ')
  const joined = trimmed.replace(/(\d) (?=\d{3}(?!\d))/g, '$1')
  const match = READING.exec(joined)
  if (!match) return { ok: false, reason: `“${text}” is no number` }
  const [, number, unitText] = match
  if (unitText.startsWith(','))
    return { ok: false, reason: 'write decimals with a point: 1.5; a comma can be read two ways' }
  const value = numberOf(number)
  if (!Number.isFinite(value)) return { ok: false, reason: `“${number}” is no number that can be worked with` }
  const unit = unitText === '' ? defaultUnit(context.unit) : readUnit(unitText)
  if (!unit) return { ok: false, reason: `no unit is called “${unitText}”` }
  const kelvinFor = wanted.scale === 'difference' && unit.offset !== 0
  if (!sameDimension(unit.dimension, wanted.dimension) || kelvinFor) {
    return { ok: false, reason: `${unit.text} is ${dimensionWords(unit.dimension)}, here a ${wanted.label} is needed` }
  }
  return { ok: true, si: toSI(value, unit, context.ambient_Pa), formula: formulaOf(value, unit) }
}

const defaultUnit = (text: string): Unit => (text === '' ? unitOf('1') : unitOf(text))

function numberOf(text: string): number {
  const plain = text.replace(/[−–]/g, '-')
  const fraction = /^([+-]?)(?:(\d+)[ \u00a0-])?(\d+)\/(\d+)$/.exec(plain)
  if (!fraction) return Number(plain)
  const [, sign, whole = '0', over, under] = fraction
  return (sign === '-' ? -1 : 1) * (Number(whole) + Number(over) / Number(under))
}

/** A number with its unit, as the formula language writes it: compound units in brackets. */
export function formulaOf(value: number, unit: Unit): string {
  if (unit.text === '1') return String(value)
  const simple = /^[\p{L}°µ]+(\(g\))?$/u.test(unit.text)
  if (unit.text === '%') return `${value} %`
  return simple ? `${value} ${unit.text}` : `${value} [${unit.text}]`
}
