import { cellKey } from '@/lib/sheet/doc/definition'
import type { CellView, SheetView } from '@/lib/sheet/view'

/** A line of the grid: a state, or the empty one at the end where the next is typed. */
export interface GridRow {
  readonly id: string | null
}

/** Column 0 holds the states' labels; the others are the sheet's visible columns in their order. */
export const LABEL_COLUMN = 0

export const gridRows = (view: SheetView, canEdit: boolean): GridRow[] => [
  ...view.rows.map((row) => ({ id: row.id })),
  ...(canEdit ? [{ id: null }] : []),
]

export const visibleColumns = (view: SheetView) => view.columns.filter((column) => !column.hidden)

export function cellAt(view: SheetView, row: number, column: number): CellView | undefined {
  const rowView = view.rows[row]
  const columnView = visibleColumns(view)[column - 1]
  return rowView && columnView && view.cells.get(cellKey(rowView.id, columnView.id))
}

/** What editing starts with. */
export function editText(view: SheetView, row: number, column: number): string {
  if (column === LABEL_COLUMN) return view.rows[row]?.label ?? ''
  return cellAt(view, row, column)?.edit ?? ''
}

/** What is copied: values as they are shown, so that they paste into any spreadsheet. */
export function copyText(view: SheetView, row: number, column: number): string {
  if (column === LABEL_COLUMN) return view.rows[row]?.label ?? ''
  return (cellAt(view, row, column)?.shown ?? '').replace('\u2212', '-').replaceAll('\n', ', ')
}
