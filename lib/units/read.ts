import { toSI } from './convert'
import { columnUnit, isQuantity, isUnitOf, quantity as quantityById, QUANTITIES } from './quantities'
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

const MINUS = '[-−–]'
/** Digits, in threes or not; the spaces are gone before a number is made of it. */
const DIGITS = String.raw`\d{1,3}(?: \d{3})+(?!\d)|\d+`
const NUMBER = String.raw`(?:(?:${DIGITS})(?:\.\d*)?|\.\d+)(?:[eE](?:\+|${MINUS})?\d+)?`
const FRACTION = String.raw`(?:\d+ )?\d+\/\d+(?![\d.])`
const READING = new RegExp(`^((?:\\+|${MINUS})? ?)(${FRACTION}|${NUMBER})(.*)$`, 'su')

/**
 * Reads what a person types into a cell: `200 bar`, `15 °C`, `3/8 in`, `1 1/2 in`, `72 °F`, or a plain number in the
 * column's unit. Spaces part thousands; a comma is refused, since it parts thousands in one country and decimals in another.
 */
export function readQuantity(text: string, context: ReadingContext): Reading {
  if (!isQuantity(context.quantity)) return refused('this column takes no number')
  const wanted = quantityById(context.quantity)
  const match = READING.exec(text.trim().replace(/[\u00a0\u2009\u202f]/g, ' '))
  if (!match) return refused(`“${shorten(text.trim())}” is no number`)
  const [, sign, digits, rest] = match
  const unitText = rest.trim()
  if (/^,\d/.test(unitText))
    return refused('write decimals with a point, 1.5, and thousands with none: a comma is read two ways')
  const value = numberOf(digits) * (/^[-−–]/.test(sign) ? -1 : 1)
  if (!Number.isFinite(value)) return refused(`${shorten(digits)} is no number that can be worked with`)
  const unit = unitText === '' ? columnUnit(context) : readUnit(unbracketed(unitText))
  if (!unit) return refused(unknownUnit(unitText))
  if (!isUnitOf(unit, wanted)) {
    const is = dimensionWords(unit.dimension, unit.offset !== 0 || unit.gauge ? 'point' : undefined)
    return refused(`${unit.text} is for ${is}, here ${dimensionWords(wanted.dimension, wanted.scale)} is needed`)
  }
  const si = toSI(value, unit, context.ambient_Pa)
  const below = belowZero(si, value, unit)
  return below ? refused(below) : { ok: true, si, formula: formulaOf(value, unit) }
}

const refused = (reason: string): Reading => ({ ok: false, reason })
const shorten = (text: string) => (text.length > 30 ? `${text.slice(0, 30)}…` : text)
const unbracketed = (text: string) => /^\[(.*)\]$/s.exec(text)?.[1] ?? text

function numberOf(text: string): number {
  const fraction = /^(?:(\d+) )?(\d+)\/(\d+)$/.exec(text)
  if (!fraction) return Number(text.replaceAll(' ', '').replace(/[−–]/g, '-'))
  const [, whole = '0', over, under] = fraction
  return Number(whole) + Number(over) / Number(under)
}

/** Why a reading on a scale cannot be: it lies below absolute zero, or below vacuum. Null where it can. */
export function belowZero(si: number, value: number, unit: Unit): string | null {
  if (si >= 0 || (unit.offset === 0 && !unit.gauge)) return null
  return `${value} ${unit.text}`.replace('-', '−') + (unit.gauge ? ' is below vacuum' : ' is below absolute zero')
}

/** What to say of a unit that is none: most have been meant for something. */
export function unknownUnit(text: string): string {
  const said = `no unit is called “${shorten(text)}”`
  const [over, ...under] = text.split('/')
  const bracketed = `${over.trim()}/(${under.join('/').trim()})`
  if (under.length === 1 && readUnit(bracketed)) return `${said}: is ${readUnit(bracketed)!.text} meant?`
  const kelvin = text.replace(/°[CF]|℃|℉/g, 'K')
  if (kelvin !== text && readUnit(kelvin)) return `${said}: per degree is written per K, ${readUnit(kelvin)!.text}`
  const alike = MENU_UNITS.filter((unit) => unit.toLowerCase() === text.toLowerCase())
  return alike.length > 0 ? `${said}: is ${alike.join(' or ')} meant?` : said
}

const MENU_UNITS = [...new Set(QUANTITIES.flatMap((quantity) => quantity.units))]

/** A number with its unit, as the formula language writes it: compound units in brackets. */
export function formulaOf(value: number, unit: Unit): string {
  if (unit.text === '1') return String(value)
  return `${value} ${unitInFormula(unit.text)}`
}

/** A unit behind a number in a formula: `bar(g)`, `[W/(m² K)]`. */
export const unitInFormula = (text: string): string =>
  /^[°\p{L}][°²³\p{L}]*(\(g\))?$|^%$/u.test(text) ? text : `[${text}]`
