import { bind, parse, show, written } from '@/lib/formula'
import type { Ast, Scope } from '@/lib/formula'
import { readQuantity } from '@/lib/units'
import type { ColumnDefinition } from './doc/definition'
import { COLUMN_KINDS } from './types'

/**
 * Makes the stored formula of a cell from what a person typed. Nothing typed is lost: what cannot be read as a value is
 * kept as a formula, and the cell then says what is wrong with it.
 *
 * - a leading `=` always means a formula
 * - a quantity column reads `200 bar`, `3/8 in`, `72 °F`, or a plain number in the column's unit; the unit is kept with
 *   the number, so that changing the column's unit later changes no result
 * - a text column takes the text as it is
 * - any other column takes a name
 */
export function storedFromTyped(typed: string, column: ColumnDefinition, scope: Scope, ambient_Pa: number): string {
  const text = typed.trim()
  if (text.startsWith('=')) return bind(text.slice(1).trim(), scope)
  if (column.quantity === 'text') return textLiteral(text)
  if (!(column.quantity in COLUMN_KINDS)) {
    const { quantity, unit } = column
    const reading = readQuantity(text, { quantity, unit, ambient_Pa })
    if (reading.ok) return reading.formula
  }
  // in a column of things a name is typed as it is, spaces and all
  const named = scope.things.some((thing) => thing.name === text)
  return bind(named ? written(text) : text, scope)
}

/** What editing a cell starts with: the value as it was typed, or the formula behind `=`, in people's names. */
export function typedFromStored(stored: string, column: ColumnDefinition, scope: Scope): string {
  const shown = show(stored, scope)
  const { ast } = parse(shown)
  if (ast?.type === 'text') return ast.value
  const name = nameOf(stored, scope)
  if (name !== null && column.quantity in COLUMN_KINDS) return name
  const plain = ast !== null && isPlain(ast)
  return plain && column.quantity !== 'text' ? shown : `=${shown}`
}

/** Whether a cell holds a value that was typed, rather than working. */
export function isTypedValue(stored: string): boolean {
  const { ast } = parse(stored)
  return ast !== null && (ast.type === 'text' || isPlain(ast))
}

/** The name that stands alone in a cell, without its brackets; null where there is more, or something else. */
export function nameOf(stored: string | null, scope: Scope): string | null {
  const { ast } = parse(stored === null ? '' : show(stored, scope))
  return ast?.type === 'reference' && ast.row === null && ast.target.by === 'name' ? ast.target.name : null
}

/** A number, a quantity, or the name of a thing: what a person types as a value. */
const isPlain = (ast: Ast) =>
  ast.type === 'number' || ast.type === 'quantity' || (ast.type === 'reference' && ast.row === null)

const textLiteral = (text: string) => `"${text.replaceAll('"', '""')}"`
