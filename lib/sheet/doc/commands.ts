import { generateKeyBetween } from 'fractional-indexing'
import { customAlphabet } from 'nanoid'
import * as Y from 'yjs'
import { cellKey } from './definition'
import type { ColumnDefinition, RowDefinition, ThingDefinition } from './definition'
import { ORIGIN, sheetParts } from './document'
import type { Origin } from './document'

/*
 * All that can be done to a sheet. Each command is one transaction, so that it reaches the others, and is undone, whole.
 * Formulas come in their stored form (references by identity): lib/sheet/entry makes it from what was typed.
 */

/** Letters and digits only, a letter first: ids stand inside formulas. */
const newId = customAlphabet('abcdefghijkmnpqrstuvwxyz23456789', 11)
const freshId = (prefix: string) => `${prefix}${newId()}`

type Entries = Y.Map<Y.Map<unknown>>
/** Where to put something: after the entry with this id, or first (null); left out: last. */
export interface Place {
  readonly after?: string | null
}

export function edit<T>(doc: Y.Doc, change: () => T, origin: Origin = ORIGIN.local): T {
  return doc.transact(change, origin)
}

// Cells

export function setCell(doc: Y.Doc, row: string, column: string, stored: string): void {
  edit(doc, () => sheetParts(doc).cells.set(cellKey(row, column), stored))
}

/** The cell follows its column's formula again, or is empty. */
export function clearCell(doc: Y.Doc, row: string, column: string): void {
  edit(doc, () => sheetParts(doc).cells.delete(cellKey(row, column)))
}

// Rows (states)

export function addRow(doc: Y.Doc, row: Partial<Omit<RowDefinition, 'id'>> & Place & { id?: string }): string {
  const { rows } = sheetParts(doc)
  const id = row.id ?? freshId('r')
  edit(doc, () => rows.set(id, entry({ label: row.label ?? '', from: row.from ?? '', order: orderAt(rows, row) })))
  return id
}

export function setRow(doc: Y.Doc, id: string, change: Partial<Omit<RowDefinition, 'id'>>): void {
  setFields(doc, sheetParts(doc).rows, id, change)
}

export function moveRow(doc: Y.Doc, id: string, place: Place): void {
  move(doc, sheetParts(doc).rows, id, place)
}

/** A sibling that starts from the same state and says the same, to change one thing in. */
export function branchRow(doc: Y.Doc, id: string, label: string): string {
  return edit(doc, () => {
    const { rows, cells } = sheetParts(doc)
    const from = String(rows.get(id)?.get('from') ?? '') || null
    const twin = addRow(doc, { label, from, after: id })
    for (const [key, source] of [...cells.entries()]) {
      if (key.startsWith(`${id}/`)) cells.set(cellKey(twin, key.slice(id.length + 1)), source)
    }
    return twin
  })
}

/** States that started from the removed one start from none; formulas that named it say that it was deleted. */
export function removeRow(doc: Y.Doc, id: string): void {
  edit(doc, () => {
    const { rows, cells } = sheetParts(doc)
    rows.delete(id)
    for (const key of [...cells.keys()]) if (key.startsWith(`${id}/`)) cells.delete(key)
  })
}

// Columns

export type NewColumn = Partial<Omit<ColumnDefinition, 'id'>> &
  Pick<ColumnDefinition, 'symbol' | 'label' | 'quantity'> &
  Place & { id?: string }

export function addColumn(doc: Y.Doc, { after, id = freshId('c'), ...fields }: NewColumn): string {
  const { columns } = sheetParts(doc)
  const place = after === undefined ? {} : { after }
  edit(doc, () => columns.set(id, entry({ unit: '', decimals: 1, ...fields, order: orderAt(columns, place) })))
  return id
}

export function updateColumn(doc: Y.Doc, id: string, change: Partial<Omit<ColumnDefinition, 'id'>>): void {
  setFields(doc, sheetParts(doc).columns, id, change)
}

export function moveColumn(doc: Y.Doc, id: string, place: Place): void {
  move(doc, sheetParts(doc).columns, id, place)
}

export function removeColumn(doc: Y.Doc, id: string): void {
  edit(doc, () => {
    const { columns, cells } = sheetParts(doc)
    columns.delete(id)
    for (const key of [...cells.keys()]) if (key.endsWith(`/${id}`)) cells.delete(key)
  })
}

// Rig

export type NewThing = Omit<ThingDefinition, 'id'> & Place & { id?: string }

export function addThing(doc: Y.Doc, thing: NewThing): string {
  const { rig } = sheetParts(doc)
  const id = thing.id ?? freshId('t')
  const { section, name, make } = thing
  edit(doc, () =>
    rig.set(
      id,
      entry({ section, name, make, order: orderAt(rig, thing), arguments: new Y.Map(Object.entries(thing.arguments)) }),
    ),
  )
  return id
}

/** Changes a thing's name, its constructor or some arguments; an argument set to null is left out. */
export function updateThing(
  doc: Y.Doc,
  id: string,
  change: { name?: string; make?: string; arguments?: Readonly<Record<string, string | null>> },
): void {
  const thing = sheetParts(doc).rig.get(id)
  if (!thing) return
  edit(doc, () => {
    if (change.name !== undefined) thing.set('name', change.name)
    if (change.make !== undefined) thing.set('make', change.make)
    let given = thing.get('arguments')
    if (!(given instanceof Y.Map)) thing.set('arguments', (given = new Y.Map()))
    for (const [name, source] of Object.entries(change.arguments ?? {})) {
      if (source === null) (given as Y.Map<unknown>).delete(name)
      // an unchanged field is not written, lest it undo what somebody else does to it at this moment
      else if ((given as Y.Map<unknown>).get(name) !== source) (given as Y.Map<unknown>).set(name, source)
    }
  })
}

export function removeThing(doc: Y.Doc, id: string): void {
  edit(doc, () => sheetParts(doc).rig.delete(id))
}

// What they share

/** A register holds no undefined and no null: what is absent is absent. */
function entry(fields: Readonly<Record<string, unknown>>): Y.Map<unknown> {
  return new Y.Map(Object.entries(fields).filter(([, value]) => value !== undefined && value !== null))
}

function setFields(doc: Y.Doc, map: Entries, id: string, change: Readonly<Record<string, unknown>>): void {
  const target = map.get(id)
  if (!target) return
  edit(doc, () => {
    for (const [field, value] of Object.entries(change)) {
      if (value === null || value === undefined) target.delete(field)
      else if (target.get(field) !== value) target.set(field, value)
    }
  })
}

function move(doc: Y.Doc, map: Entries, id: string, place: Place): void {
  const target = map.get(id)
  if (!target || place.after === id) return
  edit(doc, () => target.set('order', orderAt(map, place, id)))
}

/** A key between the two neighbours of the place, so that inserting rewrites nobody else's order. */
function orderAt(map: Entries, place: Place, except?: string): string {
  const orders: { id: string; order: string }[] = []
  map.forEach((item, id) => {
    if (id !== except) orders.push({ id, order: String(item.get('order') ?? '') })
  })
  orders.sort((a, b) => (a.order < b.order ? -1 : a.order > b.order ? 1 : a.id < b.id ? -1 : 1))
  const at = place.after === undefined ? orders.length - 1 : orders.findIndex((item) => item.id === place.after)
  const before = orders[at]?.order || null
  // two entries made at the same moment can share a key: step over them to the next greater one
  const next = orders.slice(at + 1).find((item) => item.order && (before === null || item.order > before))
  return generateKeyBetween(before, next?.order ?? null)
}
