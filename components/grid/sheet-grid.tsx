'use client'

import { HotTable } from '@handsontable/react-wrapper'
import type { HotTableProps, HotTableRef } from '@handsontable/react-wrapper'
import type Handsontable from 'handsontable/base'
import { registerCellType, TextCellType } from 'handsontable/cellTypes'
import { AutoColumnSize, Autofill, CopyPaste, ManualColumnResize, registerPlugin } from 'handsontable/plugins'
import 'handsontable/styles/handsontable.css'
import 'handsontable/styles/ht-theme-main.css'
import { useEffect, useLayoutEffect, useMemo, useRef } from 'react'
import type { SheetView } from '@/lib/sheet/view'
import { LABEL_COLUMN, cellAt, copyText, editText, gridRows, visibleColumns } from './model'
import './grid.css'
import { drawCell, drawHeader, drawLabel } from './renderers'
import type { PeerMark } from './renderers'

registerCellType(TextCellType)
for (const plugin of [AutoColumnSize, Autofill, CopyPaste, ManualColumnResize]) registerPlugin(plugin)

/** What was typed, pasted or filled in: places by identity; a row that is null is the new one at the end. */
export interface GridEdit {
  readonly row: string | null
  /** Null: the state's label. */
  readonly column: string | null
  readonly typed: string
}

interface SheetGridProps {
  readonly view: SheetView
  readonly canEdit: boolean
  readonly licenseKey: string
  /** By cellKey. */
  readonly peers: ReadonlyMap<string, PeerMark>
  readonly onEdit: (edits: readonly GridEdit[]) => void
  readonly onSelect: (row: string | null, column: string | null) => void
  readonly onResize: (column: string, width: number) => void
  readonly onUndo: () => void
  readonly onRedo: () => void
}

const STATE_WIDTH = 164

/**
 * The grid draws the view and reports what is typed. It keeps no value of its own: an edit goes to the document, and
 * what comes back from the engine is what is drawn.
 */
export function SheetGrid(props: SheetGridProps) {
  const table = useRef<HotTableRef>(null)
  const latest = useRef(props)
  useLayoutEffect(() => {
    latest.current = props
  })

  const { view, canEdit, licenseKey, peers } = props
  const rowIds = view.rows.map((row) => row.id).join()
  const columnIds = visibleColumns(view)
    .map(
      (column) =>
        `${column.id}:${column.width ?? ''}:${column.unit}:${column.label}:${column.symbol}:${column.display}`,
    )
    .join()

  const settings = useMemo(
    // the grid's hooks are set once and read what is newest through `latest`, when they are called; what is read now
    // changes with the number and order of rows and columns alone
    // eslint-disable-next-line react-hooks/refs
    () => settingsFor(latest, view, canEdit),
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [rowIds, columnIds, canEdit],
  )

  useEffect(() => {
    table.current?.hotInstance?.render()
  }, [view, peers])

  return (
    <div className="sheet-grid h-full" onKeyDownCapture={(event) => undoKeys(event, latest.current)}>
      <HotTable ref={table} licenseKey={licenseKey} {...(settings as HotTableProps)} />
    </div>
  )
}

function undoKeys(event: React.KeyboardEvent, { onUndo, onRedo }: SheetGridProps): void {
  if (!(event.ctrlKey || event.metaKey) || (event.target as HTMLElement).tagName === 'TEXTAREA') return
  const key = event.key.toLowerCase()
  const redo = key === 'y' || (key === 'z' && event.shiftKey)
  if (!redo && key !== 'z') return
  event.preventDefault()
  event.stopPropagation()
  if (redo) onRedo()
  else onUndo()
}

function settingsFor(
  latest: { readonly current: SheetGridProps },
  now: SheetView,
  canEdit: boolean,
): Handsontable.GridSettings {
  const view = () => latest.current.view
  const columns = visibleColumns(now)
  const rows = gridRows(now, canEdit)
  // the editor and the clipboard ask for the text; nothing is ever stored here
  const accessors = [LABEL_COLUMN, ...columns.map((_, i) => i + 1)].map(
    (column) => (record: unknown, value?: unknown) =>
      value === undefined ? editText(view(), (record as [number])[0], column) : undefined,
  )
  const renderer: Handsontable.GridSettings['renderer'] = (_table, td, row, column) => {
    if (column === LABEL_COLUMN) return drawLabel(td, view().rows[row])
    const columnView = columns[column - 1]
    const rowView = view().rows[row]
    const peer = rowView && latest.current.peers.get(`${rowView.id}/${columnView.id}`)
    drawCell(td, cellAt(view(), row, column), columnView, peer)
  }

  return {
    data: rows.map((_, row) => [row]),
    columns: accessors.map((data) => ({ data, renderer, readOnly: !canEdit })),
    colWidths: (column: number) =>
      column === LABEL_COLUMN ? STATE_WIDTH : (columns[column - 1].width ?? defaultWidth(columns[column - 1].display)),
    rowHeaders: true,
    rowHeaderWidth: 38,
    colHeaders: true,
    columnHeaderHeight: 62,
    fixedColumnsStart: 1,
    height: '100%',
    width: '100%',
    themeName: 'ht-theme-main',
    rowHeights: 33,
    autoColumnSize: false,
    manualColumnResize: canEdit,
    fillHandle: canEdit ? { direction: 'vertical', autoInsertRow: false } : false,
    copyPaste: true,
    outsideClickDeselects: false,
    wordWrap: false,
    enterBeginsEditing: true,
    autoWrapRow: false,
    autoWrapCol: false,
    afterGetColHeader: (column, th) => {
      if (column < 0) return
      const columnView = columns[column - 1]
      th.classList.toggle(
        'head-number',
        columnView !== undefined && columnView.unit !== '' && columnView.display === 'number',
      )
      drawHeader(th, columnView)
    },
    beforeChange: (changes, source) => {
      if (source === 'loadData' || source === 'updateData') return
      const edits = changes.flatMap((change): GridEdit[] => {
        if (!change) return []
        const [row, prop, before, after] = change
        // a change names its column by the accessor
        const column = accessors.indexOf(prop as unknown as (typeof accessors)[number])
        if (column < 0 || before === after || (row >= view().rows.length && !String(after ?? '').trim())) return []
        const id = rows[row]?.id ?? null
        return [
          { row: id, column: column === LABEL_COLUMN ? null : columns[column - 1].id, typed: String(after ?? '') },
        ]
      })
      if (edits.length > 0) latest.current.onEdit(edits)
      return false
    },
    beforeCopy: (data, ranges) => {
      data.splice(
        0,
        data.length,
        ...ranges.flatMap(({ startRow, endRow, startCol, endCol }) =>
          range(startRow, endRow).map((row) => range(startCol, endCol).map((column) => copyText(view(), row, column))),
        ),
      )
    },
    afterSelectionEnd: function (this: Handsontable, row, column) {
      nameForReaders(this.rootElement)
      latest.current.onSelect(view().rows[row]?.id ?? null, column <= LABEL_COLUMN ? null : columns[column - 1].id)
    },
    afterColumnResize: (width, column) => {
      if (column > LABEL_COLUMN) latest.current.onResize(columns[column - 1].id, width)
    },
  }
}

/** What the component leaves unnamed: its editor, made when it is first needed, and the part that scrolls. */
function nameForReaders(root: HTMLElement): void {
  for (const editor of root.ownerDocument.querySelectorAll('textarea.handsontableInput'))
    editor.setAttribute('aria-label', 'Cell')
  root.querySelector('.ht_master .wtHolder')?.setAttribute('tabindex', '0')
}

const range = (from: number, to: number) => Array.from({ length: to - from + 1 }, (_, i) => from + i)

const defaultWidth = (display: 'number' | 'margin') => (display === 'margin' ? 150 : 86)
