/** Exponents of kg, m, s, K and mol. */
export type Dimension = readonly [kg: number, m: number, s: number, K: number, mol: number]

export const DIMENSIONLESS: Dimension = [0, 0, 0, 0, 0]
const BASE = ['kg', 'm', 's', 'K', 'mol'] as const

/** Powers of a quantity may be broken (a square root), and third roots do not come out even. */
const TOLERANCE = 1e-9

export const multiply = (a: Dimension, b: Dimension): Dimension => combine(a, (x, i) => x + b[i])
export const divide = (a: Dimension, b: Dimension): Dimension => combine(a, (x, i) => x - b[i])
export const power = (a: Dimension, exponent: number): Dimension => combine(a, (x) => x * exponent)
export const sameDimension = (a: Dimension, b: Dimension): boolean => a.every((x, i) => Math.abs(x - b[i]) < TOLERANCE)
export const isDimensionless = (a: Dimension): boolean => sameDimension(a, DIMENSIONLESS)

function combine(a: Dimension, f: (x: number, i: number) => number): Dimension {
  return [f(a[0], 0), f(a[1], 1), f(a[2], 2), f(a[3], 3), f(a[4], 4)]
}

/** In base units: `kg/(m s²)`; `1` for a plain number. */
export function dimensionText(dimension: Dimension): string {
  const term = (i: number) => `${BASE[i]}${exponentText(Math.abs(dimension[i]))}`
  const over = BASE.map((_, i) => i).filter((i) => dimension[i] > TOLERANCE)
  const under = BASE.map((_, i) => i).filter((i) => dimension[i] < -TOLERANCE)
  const top = over.map(term).join(' ') || '1'
  if (under.length === 0) return top
  const bottom = under.map(term).join(' ')
  return `${top}/${under.length > 1 ? `(${bottom})` : bottom}`
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹'

function exponentText(exponent: number): string {
  if (Math.abs(exponent - 1) < TOLERANCE) return ''
  const whole = Math.round(exponent)
  if (Math.abs(exponent - whole) > TOLERANCE) return `^${Number(exponent.toFixed(4))}`
  return [...String(whole)].map((digit) => SUPERSCRIPTS[Number(digit)]).join('')
}
