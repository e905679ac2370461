import { dimensionText, isDimensionless } from './dimension'
import type { Dimension } from './dimension'
import { quantityOf } from './quantities'

/** A dimension as a person names it: "a pressure", or "kg/(m s²)" where it has no name. */
export function dimensionWords(dimension: Dimension, scale?: string): string {
  if (isDimensionless(dimension)) return 'a plain number'
  const named = quantityOf(dimension, scale)
  if (!named) return dimensionText(dimension)
  return `${/^[aeiou]/.test(named.label) ? 'an' : 'a'} ${named.label}`
}
