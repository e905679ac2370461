import type { CellView, ColumnView, RowView } from '@/lib/sheet/view'

/** Somebody else's place in the grid. */
export interface PeerMark {
  readonly initials: string
  readonly name: string
  readonly colour: string
}

/** The state's label behind the lines that hang it from the state it starts from. */
export function drawLabel(td: HTMLTableCellElement, row: RowView | undefined): void {
  td.replaceChildren()
  td.className = row ? 'cell-label' : 'cell-label cell-empty'
  if (!row) {
    td.append(span('cell-hint', 'Type a state, or press Enter'))
    return
  }
  if (row.depth > 0) {
    const branch = span('cell-branch', '└')
    branch.style.marginInlineStart = `${Math.min(row.depth - 1, 8) * 14}px`
    branch.setAttribute('aria-hidden', 'true')
    td.append(branch)
  }
  td.append(document.createTextNode(row.label || 'unnamed state'))
}

export function drawCell(
  td: HTMLTableCellElement,
  cell: CellView | undefined,
  column: ColumnView,
  peer: PeerMark | undefined,
): void {
  td.replaceChildren()
  const classes = ['cell', `cell-${cell?.origin ?? 'empty'}`]
  td.removeAttribute('title')
  if (cell) drawContent(td, cell, column, classes)
  if (cell?.origin === 'override') {
    const corner = span('cell-corner', '')
    corner.title = 'This cell overrides its column’s formula'
    td.append(corner)
  }
  if (peer) {
    classes.push('cell-peer')
    td.style.setProperty('--peer', peer.colour)
    const flag = span('cell-peer-flag', peer.initials)
    flag.title = peer.name
    td.append(flag)
  } else td.style.removeProperty('--peer')
  td.className = classes.join(' ')
}

function drawContent(td: HTMLTableCellElement, cell: CellView, column: ColumnView, classes: string[]): void {
  const { value } = cell
  if (value.kind === 'error') {
    classes.push('cell-error')
    td.title = value.reason
    td.append(span('cell-error-sign', '!'), span('cell-error-words', value.reason))
    return
  }
  if (column.display === 'margin' && value.kind === 'number') return drawMargin(td, cell, column)
  if (value.kind === 'number') classes.push('cell-number')
  if (cell.mark) {
    classes.push(cell.mark === 'over' ? 'cell-over' : 'cell-under')
    const sign = span('cell-sign', cell.mark === 'over' ? '▲' : '▼')
    sign.title = cell.mark === 'over' ? 'above its limit' : 'below its limit'
    td.append(sign)
  }
  td.append(document.createTextNode(cell.shown.split('\n')[0]))
  if (cell.shown.includes('\n')) td.title = cell.shown
}

/** How much of the allowance is used, as a bar, with the number and the word. */
function drawMargin(td: HTMLTableCellElement, cell: CellView, column: ColumnView): void {
  const over = cell.mark === 'over'
  const box = span(over ? 'margin margin-over' : 'margin', '')
  if (cell.used !== undefined) {
    const bar = span('margin-bar', '')
    const fill = span('margin-fill', '')
    fill.style.width = `${Math.round(cell.used * 100)}%`
    bar.append(fill)
    box.append(bar)
  }
  const number = over ? cell.shown.replace('\u2212', '') : cell.shown
  box.append(span('margin-words', `${number} ${column.unit}${over ? ' over' : ''}`))
  td.append(box)
}

function span(className: string, text: string): HTMLSpanElement {
  const element = document.createElement('span')
  element.className = className
  element.textContent = text
  return element
}

/** Label, and below it symbol and unit. */
export function drawHeader(th: HTMLTableCellElement, column: ColumnView | undefined): void {
  const box = th.querySelector('.colHeader')
  if (!box) return
  box.replaceChildren()
  if (!column) {
    box.append(span('head-label', 'State'))
    return
  }
  const unit = column.unit && column.unit !== '1' ? `, ${column.unit}` : ''
  box.append(span('head-label', column.label || column.symbol), span('head-symbol', `${column.symbol}${unit}`))
  th.title = column.formula === null ? `${column.label}: typed in` : `${column.label} = ${column.formula}`
}
