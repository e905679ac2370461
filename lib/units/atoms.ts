import { DIMENSIONLESS } from './dimension'
import type { Dimension } from './dimension'
import { FACTORS } from './unitsnet'

/** A unit that others are made of: a reading is (number + offset) · factor / divisor in SI. */
export interface Atom {
  /** As it is shown. */
  readonly text: string
  readonly dimension: Dimension
  readonly factor: number
  /** A thousandth is 1/1000 and not 0.001, which has no exact form in binary: 57 mm is then 0.057 m to the last bit. */
  readonly divisor: number
  /** Of a scale whose zero is not that of the quantity, in the unit itself: 273.15 for °C. */
  readonly offset: number
  /** The SI prefixes that it takes. */
  readonly prefixes: string
}

const MASS: Dimension = [1, 0, 0, 0, 0]
const LENGTH: Dimension = [0, 1, 0, 0, 0]
const TIME: Dimension = [0, 0, 1, 0, 0]
const TEMPERATURE: Dimension = [0, 0, 0, 1, 0]
const AMOUNT: Dimension = [0, 0, 0, 0, 1]
const VOLUME: Dimension = [0, 3, 0, 0, 0]
const FORCE: Dimension = [1, 1, -2, 0, 0]
export const PRESSURE: Dimension = [1, -1, -2, 0, 0]
const VISCOSITY: Dimension = [1, -1, -1, 0, 0]
const ENERGY: Dimension = [1, 2, -2, 0, 0]
const POWER: Dimension = [1, 2, -3, 0, 0]
const FREQUENCY: Dimension = [0, 0, -1, 0, 0]

const ALL_PREFIXES = 'nµmcdhkMG'
const SMALL_PREFIXES = 'µm'

function atom(text: string, dimension: Dimension, factor: number, more: Partial<Atom> = {}): Atom {
  const part = Math.round(1 / factor)
  const isPart = part > 1 && Math.abs(part * factor - 1) < 1e-14
  const scale = isPart ? { factor: 1, divisor: part } : { factor, divisor: 1 }
  return { text, dimension, offset: 0, prefixes: '', ...scale, ...more }
}

const si = (text: string, dimension: Dimension, factor = 1) => atom(text, dimension, factor, { prefixes: ALL_PREFIXES })
const other = (text: string, dimension: Dimension, prefixes = '') => atom(text, dimension, FACTORS[text], { prefixes })

const ATOMS: ReadonlyMap<string, Atom> = new Map(
  [
    si('m', LENGTH),
    si('g', MASS, 1e-3),
    si('s', TIME),
    si('K', TEMPERATURE),
    si('mol', AMOUNT),
    si('N', FORCE),
    si('Pa', PRESSURE),
    si('J', ENERGY),
    si('W', POWER),
    si('Hz', FREQUENCY),
    si('L', VOLUME, 1e-3),
    si('Wh', ENERGY, 3600),
    si('P', VISCOSITY, 0.1),
    other('cal', ENERGY, 'k'),
    other('bar', PRESSURE, SMALL_PREFIXES),
    other('atm', PRESSURE),
    other('psi', PRESSURE, 'k'),
    other('torr', PRESSURE, 'm'),
    other('mmHg', PRESSURE),
    other('inHg', PRESSURE),
    other('mmH2O', PRESSURE),
    other('inH2O', PRESSURE),
    other('t', MASS),
    other('lb', MASS),
    other('oz', MASS),
    other('in', LENGTH),
    other('ft', LENGTH),
    other('gal', VOLUME),
    other('min', TIME),
    other('h', TIME),
    other('d', TIME),
    other('kgf', FORCE),
    other('lbf', FORCE),
    other('Btu', ENERGY),
    other('hp', POWER),
    atom('°C', TEMPERATURE, 1, { offset: 273.15 }),
    atom('°F', TEMPERATURE, 5, { divisor: 9, offset: 459.67 }),
    atom('°R', TEMPERATURE, 5, { divisor: 9 }),
    other('%', DIMENSIONLESS),
    other('ppm', DIMENSIONLESS),
  ].map((known) => [known.text, known]),
)

/** Other spellings that people type. Those that could be read two ways (mpa, cc) are not among them. */
const SPELLINGS: ReadonlyMap<string, string> = new Map(
  Object.entries({
    L: 'l ltr litre litres liter liters',
    mL: 'ml',
    m: 'metre metres meter meters',
    in: 'inch inches " ” ″',
    ft: "foot feet ' ′",
    s: 'sec secs second seconds',
    min: 'mins minute minutes',
    h: 'hr hrs hour hours',
    d: 'day days',
    t: 'tonne tonnes',
    kg: 'Kg KG kgs',
    lb: 'lbs Lb LB',
    bar: 'Bar BAR',
    mbar: 'mBar',
    psi: 'PSI Psi',
    kPa: 'kpa Kpa KPa KPA',
    MPa: 'Mpa MPA',
    torr: 'Torr',
    Btu: 'BTU btu',
    K: 'kelvin Kelvin',
    '°C': '℃ degC C',
    '°F': '℉ degF F',
    '°R': 'degR',
    '%': 'percent',
  }).flatMap(([unit, others]) => others.split(' ').map((spelling) => [spelling, unit] as const)),
)

const PREFIXES: ReadonlyMap<string, { readonly factor: number; readonly divisor: number }> = new Map([
  ['n', { factor: 1, divisor: 1e9 }],
  ['µ', { factor: 1, divisor: 1e6 }],
  ['m', { factor: 1, divisor: 1e3 }],
  ['c', { factor: 1, divisor: 1e2 }],
  ['d', { factor: 1, divisor: 1e1 }],
  ['h', { factor: 1e2, divisor: 1 }],
  ['k', { factor: 1e3, divisor: 1 }],
  ['M', { factor: 1e6, divisor: 1 }],
  ['G', { factor: 1e9, divisor: 1 }],
])

/** Finds a unit by a single word: `bar`, `kPa`, `µm`, `degC`. Undefined where it is none. */
export function findAtom(word: string): Atom | undefined {
  // people type a Greek mu, a u or the sign of an ordinal where a micro or a degree belongs
  const tidy = word.replace(/^[uμ](?=\p{L})/u, 'µ').replace(/[º˚]/g, '°')
  const name = SPELLINGS.get(tidy) ?? tidy
  const known = ATOMS.get(name)
  if (known) return known
  const prefix = PREFIXES.get(name[0])
  const base = ATOMS.get(SPELLINGS.get(name.slice(1)) ?? name.slice(1))
  if (!prefix || !base?.prefixes.includes(name[0])) return undefined
  return { ...base, ...fraction(base.factor * prefix.factor, base.divisor * prefix.divisor), text: name[0] + base.text }
}

/** A factor and a divisor, one of them 1 where that is exact. */
export function fraction(factor: number, divisor: number): { readonly factor: number; readonly divisor: number } {
  const whole = Number.isSafeInteger(factor) && Number.isSafeInteger(divisor)
  if (whole && factor % divisor === 0) return { factor: factor / divisor, divisor: 1 }
  if (whole && divisor % factor === 0) return { factor: 1, divisor: divisor / factor }
  return { factor, divisor }
}
