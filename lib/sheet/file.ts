import * as Y from 'yjs'
import { z } from 'zod'
import { bind, show } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import { addColumn, addRow, addThing, edit, setCell, setRow, updateColumn, updateThing } from './doc/commands'
import { cellKey } from './doc/definition'
import type { SheetDefinition } from './doc/definition'
import { ORIGIN } from './doc/document'
import { readSheet } from './doc/read'
import { sectionOf } from './engine/vocabulary'
import { scopeOf } from './scope'

/*
 * A sheet as a file that people can read, keep and send: formulas in people's names, states in a formula by their label or number.
 * Version 1. A field that is left out takes its default.
 */

export const rigFileSchema = z.array(
  z.strictObject({
    name: z.string().max(60),
    /** The constructor: vessel, header, bank, orifice, gas, surroundings … */
    make: z.string().max(60),
    /** Each as it stands in a formula: { "volume": "50 L" }. */
    arguments: z.record(z.string().max(60), z.string().max(10_000)).default({}),
  }),
)

export const sheetFileSchema = z.strictObject({
  format: z.literal('chargehand-sheet'),
  version: z.literal(1),
  rig: rigFileSchema,
  columns: z.array(
    z.strictObject({
      symbol: z.string().max(60),
      label: z.string().max(120),
      quantity: z.string().max(60),
      unit: z.string().max(60).default(''),
      decimals: z.int().min(0).max(12).default(1),
      formula: z.string().max(10_000).nullable().default(null),
      high: z.string().max(10_000).nullable().default(null),
      low: z.string().max(10_000).nullable().default(null),
      display: z.enum(['number', 'margin']).default('number'),
      width: z.number().positive().nullable().default(null),
      hidden: z.boolean().default(false),
    }),
  ),
  rows: z.array(
    z.strictObject({
      label: z.string().max(500),
      /** The number of the state it starts from, counted from 1; null: none. */
      from: z.int().positive().nullable().default(null),
      /** By column symbol: { "p_to": "200 bar" }. */
      cells: z.record(z.string().max(60), z.string().max(10_000)).default({}),
    }),
  ),
})

export type RigFile = z.input<typeof rigFileSchema>
export type SheetFile = z.input<typeof sheetFileSchema>

/** Writes a sheet into an empty document. */
export function fillDocument(doc: Y.Doc, input: SheetFile): void {
  const file = sheetFileSchema.parse(input)
  edit(
    doc,
    () => {
      const things = file.rig.map(({ name, make }) =>
        addThing(doc, { section: sectionOf(make), name, make, arguments: {} }),
      )
      const columns = file.columns.map(({ formula: _f, high: _h, low: _l, ...column }) => addColumn(doc, column))
      const rows: string[] = []
      for (const { label } of file.rows) rows.push(addRow(doc, { label }))
      // names are bound to identities once all that they can mean is there
      const scope = scopeOf(readSheet(doc))
      file.rig.forEach((thing, i) => updateThing(doc, things[i], { arguments: bindAll(thing.arguments, scope) }))
      file.columns.forEach((column, i) =>
        updateColumn(doc, columns[i], bindAll({ formula: column.formula, high: column.high, low: column.low }, scope)),
      )
      file.rows.forEach((row, i) => {
        if (row.from !== null && rows[row.from - 1]) setRow(doc, rows[i], { from: rows[row.from - 1] })
        for (const [symbol, typed] of Object.entries(row.cells)) {
          const column = columns[file.columns.findIndex((candidate) => candidate.symbol === symbol)]
          if (column) setCell(doc, rows[i], column, bind(typed, scope))
        }
      })
    },
    ORIGIN.seed,
  )
}

/** The sheet as such a file. */
export function sheetFile(definition: SheetDefinition): z.output<typeof sheetFileSchema> {
  const scope = scopeOf(definition)
  const shown = (stored: string | null) => (stored === null ? null : show(stored, scope))
  return {
    format: 'chargehand-sheet',
    version: 1,
    rig: definition.rig.map(({ name, make, arguments: given }) => ({ name, make, arguments: showAll(given, scope) })),
    columns: definition.columns.map(({ id: _id, ...column }) => ({
      ...column,
      formula: shown(column.formula),
      high: shown(column.high),
      low: shown(column.low),
    })),
    rows: definition.rows.map((row) => ({
      label: row.label,
      from: row.from === null ? null : definition.rows.findIndex((other) => other.id === row.from) + 1,
      cells: Object.fromEntries(
        definition.columns.flatMap((column) => {
          const stored = definition.cells.get(cellKey(row.id, column.id))
          return stored === undefined ? [] : [[column.symbol, show(stored, scope)]]
        }),
      ),
    })),
  }
}

/** A rig alone, for formulas that are tried without a sheet. */
export function rigDefinition(input: RigFile): SheetDefinition {
  const doc = new Y.Doc()
  fillDocument(doc, { format: 'chargehand-sheet', version: 1, rig: input, columns: [], rows: [] })
  return readSheet(doc)
}

function bindAll<T extends string | null>(formulas: Readonly<Record<string, T>>, scope: Scope): Record<string, T> {
  const bound = Object.entries(formulas).map(([name, source]) => [name, source === null ? null : bind(source, scope)])
  return Object.fromEntries(bound) as Record<string, T>
}

function showAll(formulas: Readonly<Record<string, string>>, scope: Scope): Record<string, string> {
  return Object.fromEntries(Object.entries(formulas).map(([name, stored]) => [name, show(stored, scope)]))
}
