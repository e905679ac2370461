import type * as Y from 'yjs'

/** The shape of the shared document, version 1. Bump it when a reader of the old shape would misread the new one. */
export const SHEET_FORMAT = 1

/**
 * The shared document's parts. Everything is keyed by id and every field is a register of its own, so that two people
 * who change different fields of one vessel, or different cells of one row, both keep what they did.
 */
export interface SheetParts {
  /** id -> { section, name, make, order, arguments: Y.Map<stored formula> } */
  readonly rig: Y.Map<Y.Map<unknown>>
  /** id -> { symbol, label, quantity, unit, decimals, formula, high, low, display, width, hidden, order } */
  readonly columns: Y.Map<Y.Map<unknown>>
  /** id -> { label, from, order } */
  readonly rows: Y.Map<Y.Map<unknown>>
  /** cellKey -> stored formula */
  readonly cells: Y.Map<string>
}

export function sheetParts(doc: Y.Doc): SheetParts {
  return {
    rig: doc.getMap('rig'),
    columns: doc.getMap('columns'),
    rows: doc.getMap('rows'),
    cells: doc.getMap('cells'),
  }
}

/** Where a change comes from. Only `local` ones are undone by the person who sits here. */
export const ORIGIN = { local: 'local', seed: 'seed' } as const
export type Origin = (typeof ORIGIN)[keyof typeof ORIGIN]
