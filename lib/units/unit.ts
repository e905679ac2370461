import { DIMENSIONLESS, divide, multiply, power } from './dimension'
import type { Dimension } from './dimension'
import { FACTORS } from './unitsnet'

/** A unit: an SI value is (number · factor) + offset, a gauge one counts from the ambient pressure besides. */
export interface Unit {
  /** As it is shown: `kJ/(kg K)`. */
  readonly text: string
  readonly dimension: Dimension
  readonly factor: number
  /** Of a scale whose zero is not that of the quantity: 273.15 for °C. */
  readonly offset: number
  readonly gauge: boolean
}

interface Atom {
  readonly dimension: Dimension
  readonly factor: number
  readonly offset?: number
  readonly prefixes?: boolean
}

const D = {
  mass: [1, 0, 0, 0, 0],
  length: [0, 1, 0, 0, 0],
  time: [0, 0, 1, 0, 0],
  temperature: [0, 0, 0, 1, 0],
  amount: [0, 0, 0, 0, 1],
  volume: [0, 3, 0, 0, 0],
  force: [1, 1, -2, 0, 0],
  pressure: [1, -1, -2, 0, 0],
  energy: [1, 2, -2, 0, 0],
  power: [1, 2, -3, 0, 0],
  frequency: [0, 0, -1, 0, 0],
} as const satisfies Record<string, Dimension>

const si = (dimension: Dimension, factor = 1): Atom => ({ dimension, factor, prefixes: true })
const other = (dimension: Dimension, name: string, prefixes = false): Atom => ({
  dimension,
  factor: FACTORS[name],
  prefixes,
})

/** Units that others are made of. Those marked take the SI prefixes. */
const ATOMS: Readonly<Record<string, Atom>> = {
  m: si(D.length),
  g: si(D.mass, 1e-3),
  s: si(D.time),
  K: si(D.temperature),
  mol: si(D.amount),
  N: si(D.force),
  Pa: si(D.pressure),
  J: si(D.energy),
  W: si(D.power),
  Hz: si(D.frequency),
  bar: other(D.pressure, 'bar', true),
  L: other(D.volume, 'L', true),
  P: si([1, -1, -1, 0, 0], 0.1),
  cal: other(D.energy, 'cal', true),
  t: other(D.mass, 't'),
  in: other(D.length, 'in'),
  ft: other(D.length, 'ft'),
  lb: other(D.mass, 'lb'),
  oz: other(D.mass, 'oz'),
  min: other(D.time, 'min'),
  h: other(D.time, 'h'),
  d: other(D.time, 'd'),
  atm: other(D.pressure, 'atm'),
  psi: other(D.pressure, 'psi'),
  torr: other(D.pressure, 'torr'),
  mmHg: other(D.pressure, 'mmHg'),
  inHg: other(D.pressure, 'inHg'),
  gal: other(D.volume, 'gal'),
  kgf: other(D.force, 'kgf'),
  lbf: other(D.force, 'lbf'),
  Btu: other(D.energy, 'Btu'),
  hp: other(D.power, 'hp'),
  '°C': { dimension: D.temperature, factor: 1, offset: 273.15 },
  '°F': { dimension: D.temperature, factor: 5 / 9, offset: 459.67 * (5 / 9) },
  '°R': { dimension: D.temperature, factor: 5 / 9 },
  '%': other(DIMENSIONLESS, 'percent'),
  ppm: other(DIMENSIONLESS, 'ppm'),
}

/** Other spellings that people type. */
const SPELLINGS: Readonly<Record<string, string>> = {
  l: 'L',
  ml: 'mL',
  degC: '°C',
  degF: '°F',
  '℃': '°C',
  '℉': '°F',
  sec: 's',
  hr: 'h',
  day: 'd',
  days: 'd',
  inch: 'in',
  lbs: 'lb',
  Torr: 'torr',
  BTU: 'Btu',
  '”': 'in',
}

/** Kindnesses for gauge units; `bar(g)` is the one spelling that is shown. */
const GAUGE_SPELLINGS: Readonly<Record<string, string>> = {
  barg: 'bar',
  psig: 'psi',
  kPag: 'kPa',
  MPag: 'MPa',
  mbarg: 'mbar',
}
const ABSOLUTE_SPELLINGS: Readonly<Record<string, string>> = { bara: 'bar', psia: 'psi' }

const PREFIXES: Readonly<Record<string, number>> = {
  n: 1e-9,
  µ: 1e-6,
  μ: 1e-6,
  u: 1e-6,
  m: 1e-3,
  c: 1e-2,
  d: 1e-1,
  h: 1e2,
  k: 1e3,
  M: 1e6,
  G: 1e9,
}

function atom(name: string): Atom | null {
  const known = SPELLINGS[name] ?? name
  if (Object.hasOwn(ATOMS, known)) return ATOMS[known]
  const prefix = PREFIXES[known[0]]
  const rest = known.slice(1)
  const base = Object.hasOwn(ATOMS, SPELLINGS[rest] ?? rest) ? ATOMS[SPELLINGS[rest] ?? rest] : null
  // a factor below one is divided by its reciprocal: 1e-3 is not exact in binary, 1/1000 is rounded once
  return prefix !== undefined && base?.prefixes ? { ...base, factor: scale(base.factor, prefix) } : null
}

const scale = (factor: number, prefix: number) => (prefix < 1 ? factor / Math.round(1 / prefix) : factor * prefix)

const cache = new Map<string, Unit | null>()
const CACHE_LIMIT = 2_000
const LONGEST = 60

/** Reads a unit, simple or compound: `bar`, `°C`, `bar(g)`, `W/(m^2 K)`, `kg/m³`. Null where it is none. */
export function readUnit(text: string): Unit | null {
  const trimmed = text.trim()
  let unit = cache.get(trimmed)
  if (unit === undefined) {
    unit = trimmed.length > LONGEST ? null : (simpleUnit(trimmed) ?? compoundUnit(trimmed))
    if (cache.size >= CACHE_LIMIT) cache.clear()
    cache.set(trimmed, unit)
  }
  return unit
}

function simpleUnit(text: string): Unit | null {
  const gauge = /^(.+)\(g\)$/.exec(text)?.[1] ?? GAUGE_SPELLINGS[text]
  const name = gauge ?? /^(.+)\(a\)$/.exec(text)?.[1] ?? ABSOLUTE_SPELLINGS[text] ?? text
  const found = atom(name)
  if (!found) return null
  if ((gauge !== undefined || name !== text) && found.dimension !== D.pressure) return null
  const shown = prettyName(name)
  return {
    text: gauge === undefined ? shown : `${shown}(g)`,
    dimension: found.dimension,
    factor: found.factor,
    offset: found.offset ?? 0,
    gauge: gauge !== undefined,
  }
}

const prettyName = (name: string) => (SPELLINGS[name] ?? name).replace(/^[uμ](?=\p{L})/u, 'µ')

const SUPERSCRIPT_DIGITS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

/** Products and quotients of simple units: terms side by side, `·`, `*`, `/`, brackets, powers as `^2`, `²` or `m2`. */
function compoundUnit(text: string): Unit | null {
  const tokens = text.match(/[\p{L}°%]+|\^?[-−⁻]?[\d⁰¹²³⁴⁵⁶⁷⁸⁹]+|[/·*()]|\S/gu) ?? []
  let at = 0

  const quotient = (): Unit | null => {
    let left = product()
    while (left && tokens[at] === '/') {
      at++
      const right = factor()
      left = right && join(left, right, -1)
    }
    return left
  }
  const product = (): Unit | null => {
    let left = factor()
    while (left && at < tokens.length && tokens[at] !== '/' && tokens[at] !== ')') {
      if (tokens[at] === '·' || tokens[at] === '*') at++
      const right = factor()
      left = right && join(left, right, 1)
    }
    return left
  }
  const factor = (): Unit | null => {
    const token = tokens[at++]
    if (token === undefined) return null
    let unit: Unit | null
    if (token === '(') {
      unit = quotient()
      if (tokens[at++] !== ')') return null
    } else if (token === '1') {
      return ONE
    } else {
      const found = atom(token)
      // a scale with an offset of its own means nothing inside a product: J/(kg °C) is read as per kelvin by nobody's guess
      unit =
        found && !found.offset
          ? { text: prettyName(token), dimension: found.dimension, factor: found.factor, offset: 0, gauge: false }
          : null
    }
    const exponent = unit && exponentOf(tokens[at])
    if (unit && exponent !== null) {
      at++
      return { ...unit, dimension: power(unit.dimension, exponent), factor: unit.factor ** exponent }
    }
    return unit
  }

  const unit = quotient()
  return unit && at === tokens.length ? { ...unit, text: prettyText(text) } : null
}

const ONE: Unit = { text: '1', dimension: DIMENSIONLESS, factor: 1, offset: 0, gauge: false }

function join(a: Unit, b: Unit, sign: 1 | -1): Unit {
  const dimension = sign === 1 ? multiply(a.dimension, b.dimension) : divide(a.dimension, b.dimension)
  return { ...ONE, dimension, factor: sign === 1 ? a.factor * b.factor : a.factor / b.factor }
}

function exponentOf(token: string | undefined): number | null {
  if (token === undefined || !/^\^?[-−⁻]?[\d⁰¹²³⁴⁵⁶⁷⁸⁹]+$/.test(token)) return null
  const digits = [...token.replace(/^\^/, '').replace(/[−⁻]/, '-')].map((digit) => {
    const superscript = SUPERSCRIPT_DIGITS.indexOf(digit)
    return superscript < 0 ? digit : String(superscript)
  })
  const exponent = Number(digits.join(''))
  return Math.abs(exponent) <= 9 ? exponent : null
}

/** `W/(m^2 K)` is shown as `W/(m² K)`, `m3` as `m³`. */
function prettyText(text: string): string {
  return text
    .replace(/\^?(?<=[\p{L}^)])\^?(\d)/gu, (_, digit: string) => SUPERSCRIPT_DIGITS[Number(digit)])
    .replace(/\s*[·*]\s*/g, ' ')
    .replace(/\s+/g, ' ')
    .replace(/(?<![\p{L}])[uμ](?=\p{L})/gu, 'µ')
}
