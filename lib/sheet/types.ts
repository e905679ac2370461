import type { Type } from '@/lib/formula'
import { isQuantity, quantity } from '@/lib/units'
import type { RigSection } from './doc/definition'

/** Kinds a column can have that are no quantity, with the words people see. */
export const COLUMN_KINDS = {
  text: 'text',
  logical: 'yes or no',
  gas: 'gas',
  vessel: 'vessel',
  supply: 'supply',
  path: 'path',
  run: 'run',
} as const

export const TEXT: Type = { kind: 'text' }
export const LOGICAL: Type = { kind: 'logical' }
export const ANY: Type = { kind: 'any' }
export const thingType = (thing: string): Type => ({ kind: 'thing', thing })
export const listOf = (of: Type): Type => ({ kind: 'list', of })

export function quantityType(id: string): Type {
  const { dimension, scale } = quantity(id)
  return { kind: 'quantity', dimension, scale }
}

/** The type of a column by its quantity's id; an id that nobody knows (a newer program wrote it) takes anything. */
export function columnType(id: string): Type {
  if (id === 'text') return TEXT
  if (id === 'logical') return LOGICAL
  if (id in COLUMN_KINDS) return thingType(id)
  return isQuantity(id) ? quantityType(id) : ANY
}

export const sectionType = (section: RigSection): Type => thingType(section)

/** A column as an error names it: "the column Pressure". */
export const columnWords = (column: { readonly label: string; readonly symbol: string }) =>
  `the column ${column.label || column.symbol}`

/** What a column holds, in words: "pressure", "run". */
export function kindWords(id: string): string {
  if (Object.hasOwn(COLUMN_KINDS, id)) return COLUMN_KINDS[id as keyof typeof COLUMN_KINDS]
  return isQuantity(id) ? quantity(id).label : id
}
