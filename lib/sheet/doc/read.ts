import * as Y from 'yjs'
import { RIG_SECTIONS } from './definition'
import type { ColumnDefinition, RigSection, RowDefinition, SheetDefinition, ThingDefinition } from './definition'
import { sheetParts } from './document'

/**
 * Reads the shared document as plain data. What other people's programs may have put there is not trusted: a field of
 * the wrong type reads as its default, an entry that is no entry is passed over, a state that starts from itself or
 * from a ring of states starts from none.
 */
export function readSheet(doc: Y.Doc): SheetDefinition {
  const parts = sheetParts(doc)
  const rows = ordered(parts.rows, readRow)
  const rowIds = new Set(rows.map((row) => row.id))
  const columns = ordered(parts.columns, readColumn)
  const columnIds = new Set(columns.map((column) => column.id))
  const cells = new Map<string, string>()
  parts.cells.forEach((source, key) => {
    const slash = key.indexOf('/')
    if (typeof source === 'string' && rowIds.has(key.slice(0, slash)) && columnIds.has(key.slice(slash + 1))) {
      cells.set(key, source)
    }
  })
  return { rig: ordered(parts.rig, readThing), columns, rows: withoutRings(rows, rowIds), cells }
}

/** Entries sorted by their order key, ties (two people inserting at the same place) by id, so that all agree. */
function ordered<T extends { readonly id: string }>(
  map: Y.Map<Y.Map<unknown>>,
  read: (id: string, entry: Y.Map<unknown>) => T,
): T[] {
  const entries: { order: string; value: T }[] = []
  map.forEach((entry, id) => {
    if (entry instanceof Y.Map) entries.push({ order: text(entry, 'order', ''), value: read(id, entry) })
  })
  const compare = (a: string, b: string) => (a < b ? -1 : a > b ? 1 : 0)
  entries.sort((a, b) => compare(a.order, b.order) || compare(a.value.id, b.value.id))
  return entries.map((entry) => entry.value)
}

function readThing(id: string, entry: Y.Map<unknown>): ThingDefinition {
  const section = text(entry, 'section', 'vessel')
  const given = entry.get('arguments')
  const values: Record<string, string> = {}
  if (given instanceof Y.Map) {
    given.forEach((source: unknown, name: string) => {
      if (typeof source === 'string') values[name] = source
    })
  }
  return {
    id,
    section: isSection(section) ? section : 'vessel',
    name: text(entry, 'name', ''),
    make: text(entry, 'make', ''),
    arguments: values,
  }
}

const isSection = (name: string): name is RigSection => (RIG_SECTIONS as readonly string[]).includes(name)

function readColumn(id: string, entry: Y.Map<unknown>): ColumnDefinition {
  const decimals = entry.get('decimals')
  const width = entry.get('width')
  return {
    id,
    symbol: text(entry, 'symbol', ''),
    label: text(entry, 'label', ''),
    quantity: text(entry, 'quantity', 'dimensionless'),
    unit: text(entry, 'unit', ''),
    decimals: typeof decimals === 'number' && decimals >= 0 && decimals <= 12 ? Math.round(decimals) : 1,
    formula: formula(entry, 'formula'),
    high: formula(entry, 'high'),
    low: formula(entry, 'low'),
    display: entry.get('display') === 'margin' ? 'margin' : 'number',
    width: typeof width === 'number' && width > 0 ? width : null,
    hidden: entry.get('hidden') === true,
  }
}

function readRow(id: string, entry: Y.Map<unknown>): RowDefinition {
  return { id, label: text(entry, 'label', ''), from: formula(entry, 'from') }
}

/** Two people can each make a state start from the other's: both edits stand in the document, neither is obeyed. */
function withoutRings(rows: readonly RowDefinition[], known: ReadonlySet<string>): RowDefinition[] {
  const fromOf = new Map(rows.map((row) => [row.id, row.from]))
  return rows.map((row) => {
    if (row.from === null) return row
    if (!known.has(row.from)) return { ...row, from: null }
    const seen = new Set<string>()
    let at: string | null | undefined = row.from
    while (at && !seen.has(at)) {
      if (at === row.id) return { ...row, from: null }
      seen.add(at)
      at = fromOf.get(at)
    }
    return row
  })
}

function text(entry: Y.Map<unknown>, field: string, otherwise: string): string {
  const value = entry.get(field)
  return typeof value === 'string' ? value : otherwise
}

function formula(entry: Y.Map<unknown>, field: string): string | null {
  return text(entry, field, '') || null
}
