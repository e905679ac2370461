import { PRESSURE, findAtom, fraction } from './atoms'
import { DIMENSIONLESS, divide, multiply, power } from './dimension'
import type { Dimension } from './dimension'

/** A unit: a reading is (number + offset) · factor / divisor in SI, a gauge one counts from the ambient pressure besides. */
export interface Unit {
  /** As it is shown: `kJ/(kg K)`. Reading it gives this unit again. */
  readonly text: string
  readonly dimension: Dimension
  readonly factor: number
  readonly divisor: number
  /** Of a scale whose zero is not that of the quantity, in the unit itself: 273.15 for °C. */
  readonly offset: number
  readonly gauge: boolean
}

/** Kindnesses; `bar(g)` is the one spelling of a gauge unit that is shown. */
const GAUGE_SPELLINGS: ReadonlyMap<string, string> = new Map([
  ['barg', 'bar'],
  ['mbarg', 'mbar'],
  ['psig', 'psi'],
  ['PSIG', 'psi'],
  ['kPag', 'kPa'],
  ['MPag', 'MPa'],
])
const ABSOLUTE_SPELLINGS: ReadonlyMap<string, string> = new Map([
  ['bara', 'bar'],
  ['psia', 'psi'],
  ['PSIA', 'psi'],
])

const LONGEST = 60
const CACHE_LIMIT = 2_000
const cache = new Map<string, Unit | null>()

/** Reads a unit, simple or compound: `bar`, `°C`, `bar(g)`, `W/(m^2 K)`, `kg/m³`. Null where it is none. */
export function readUnit(text: string): Unit | null {
  if (text.length > LONGEST) return null
  let unit = cache.get(text)
  if (unit === undefined) {
    const tidy = text.trim().replace(/([°º˚])\s+(?=[CFR]$)/, '$1')
    // kg(g) is no kilogram times gram: what looks like a gauge unit is one, or none
    unit = simpleUnit(tidy) ?? (/\p{L}\s?\([ga]\)$/u.test(tidy) ? null : compoundUnit(tidy))
    if (cache.size >= CACHE_LIMIT) cache.clear()
    cache.set(text, unit)
  }
  return unit
}

export const PLAIN: Unit = { text: '1', dimension: DIMENSIONLESS, factor: 1, divisor: 1, offset: 0, gauge: false }

function simpleUnit(text: string): Unit | null {
  const gauge = /^(.+?)\s?\(g\)$/.exec(text)?.[1] ?? GAUGE_SPELLINGS.get(text)
  const absolute = /^(.+?)\s?\(a\)$/.exec(text)?.[1] ?? ABSOLUTE_SPELLINGS.get(text)
  const found = findAtom(gauge ?? absolute ?? text)
  if (!found) return null
  if ((gauge ?? absolute) !== undefined && found.dimension !== PRESSURE) return null
  const { dimension, factor, divisor, offset } = found
  const shown = gauge === undefined ? found.text : `${found.text}(g)`
  return { text: shown, dimension, factor, divisor, offset, gauge: gauge !== undefined }
}

const TOKEN = /[\p{L}°º˚%]+|\^?[-−⁻]?[\d⁰¹²³⁴⁵⁶⁷⁸⁹]+|\S/gu
const EXPONENT = /^\^?[-−⁻]?[\d⁰¹²³⁴⁵⁶⁷⁸⁹]+$/
const HIGHEST_POWER = 9

/** Products and quotients of simple units: terms side by side, `·`, `*`, `/`, brackets, powers as `^2`, `²`, `m2` or `s-2`. */
function compoundUnit(text: string): Unit | null {
  const tokens = text.match(TOKEN) ?? []
  let at = 0

  const quotient = (): Unit | null => {
    let left = product()
    while (left && tokens[at] === '/') {
      at++
      // one factor only: what J/kg K means is a matter of opinion, so that brackets are asked for
      left = joined(left, '/', factor())
    }
    return left
  }
  const product = (): Unit | null => {
    let left = factor()
    while (left && at < tokens.length && tokens[at] !== '/' && tokens[at] !== ')') {
      if (tokens[at] === '·' || tokens[at] === '*') at++
      left = joined(left, ' ', factor())
    }
    return left
  }
  const factor = (): Unit | null => {
    const token = tokens[at++]
    if (token === undefined) return null
    if (token === '1') return PLAIN
    const base = token === '(' ? group() : term(token)
    const exponent = base && exponentOf(tokens[at])
    if (!base || exponent === null) return base
    at++
    return raised(base, exponent)
  }
  const group = (): Unit | null => {
    const inside = quotient()
    return tokens[at++] === ')' && inside ? { ...inside, text: `(${inside.text})` } : null
  }

  const unit = quotient()
  return unit && at === tokens.length ? { ...unit, ...fraction(unit.factor, unit.divisor) } : null
}

/** A scale with a zero of its own means nothing inside a product: nobody knows whether J/(kg °C) is meant per kelvin. */
function term(word: string): Unit | null {
  const found = findAtom(word)
  if (!found || found.offset !== 0) return null
  const { text, dimension, factor, divisor } = found
  return { text, dimension, factor, divisor, offset: 0, gauge: false }
}

function joined(a: Unit, sign: ' ' | '/', b: Unit | null): Unit | null {
  if (!b) return null
  const over = sign === '/'
  return {
    ...PLAIN,
    text: `${a.text}${sign}${b.text}`,
    dimension: over ? divide(a.dimension, b.dimension) : multiply(a.dimension, b.dimension),
    factor: a.factor * (over ? b.divisor : b.factor),
    divisor: a.divisor * (over ? b.factor : b.divisor),
  }
}

function raised(base: Unit, exponent: number): Unit {
  const [factor, divisor] = exponent < 0 ? [base.divisor, base.factor] : [base.factor, base.divisor]
  const size = Math.abs(exponent)
  return {
    ...PLAIN,
    text: `${base.text}${superscript(exponent)}`,
    dimension: power(base.dimension, exponent),
    factor: factor ** size,
    divisor: divisor ** size,
  }
}

const SUPERSCRIPT_DIGITS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

const superscript = (exponent: number) =>
  `${exponent < 0 ? '⁻' : ''}${[...String(Math.abs(exponent))].map((digit) => SUPERSCRIPT_DIGITS[Number(digit)]).join('')}`

function exponentOf(token: string | undefined): number | null {
  if (token === undefined || !EXPONENT.test(token)) return null
  const digits = [...token.replace('^', '').replace(/[−⁻]/, '-')].map((digit) => {
    const raised = SUPERSCRIPT_DIGITS.indexOf(digit)
    return raised < 0 ? digit : String(raised)
  })
  const exponent = Number(digits.join(''))
  return exponent !== 0 && Math.abs(exponent) <= HIGHEST_POWER ? exponent : null
}
