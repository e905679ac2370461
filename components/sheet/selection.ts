import type { CellView, ColumnView, RowView, SheetView } from '@/lib/sheet/view'
import { cellKey } from '@/lib/sheet/doc/definition'

/** The cell one stands on, by identity: it stays the same cell when rows move. */
export interface Selection {
  readonly row: string
  readonly column: string
}

/** The selection as it was, where the next one is the same place. */
export function sameSelection(before: Selection | null, next: Selection | null): Selection | null {
  return before && next && before.row === next.row && before.column === next.column ? before : next
}

export interface SelectedCell {
  readonly row: RowView
  /** Counted from 1, as people see it. */
  readonly number: number
  readonly column: ColumnView
  readonly cell: CellView
}

/** What the selection means in the sheet as it now stands; null where its row or column is gone. */
export function selectedCell(view: SheetView, selection: Selection | null): SelectedCell | null {
  if (!selection) return null
  const index = view.rows.findIndex((row) => row.id === selection.row)
  const column = view.columns.find((candidate) => candidate.id === selection.column)
  const cell = view.cells.get(cellKey(selection.row, selection.column))
  return index >= 0 && column && cell ? { row: view.rows[index], number: index + 1, column, cell } : null
}
