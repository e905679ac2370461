'use client'

import { useState } from 'react'
import { signature } from '@/lib/formula'
import type { CallAt, Scope } from '@/lib/formula'
import { columnType, columnWords, kindWords } from '@/lib/sheet/types'
import { FormulaEditor } from './formula-editor'
import type { SelectedCell } from './selection'

interface FormulaLineProps {
  readonly selected: SelectedCell | null
  readonly scope: Scope
  readonly canEdit: boolean
  readonly onCell: (typed: string) => void
  readonly onColumn: (formula: string) => void
}

/** What stands in the selected cell, in words of the formula language, to be read and to be changed. */
export function FormulaLine({ selected, scope, canEdit, onCell, onColumn }: FormulaLineProps) {
  if (!selected) {
    return <div className="flex min-h-[46px] items-center px-3 text-dim">Select a cell to see its formula.</div>
  }
  const { column, cell, row } = selected
  const key = `${row.id}/${column.id}/${cell.origin}`
  return <Line key={key} selected={selected} scope={scope} canEdit={canEdit} onCell={onCell} onColumn={onColumn} />
}

function Line({ selected, scope, canEdit, onCell, onColumn }: FormulaLineProps & { readonly selected: SelectedCell }) {
  const { column, cell, number } = selected
  const [call, setCall] = useState<CallAt | null>(null)
  const isFormula = cell.edit.startsWith('=')
  const followsColumn = cell.origin === 'formula' && column.formula !== null
  const text = isFormula ? cell.edit.slice(1) : cell.edit
  const checks = isFormula || !['text'].includes(column.quantity)
  const commit = (typed: string) => {
    if (typed === text) return
    if (followsColumn) onColumn(typed)
    else onCell(isFormula && typed.trim() !== '' ? `=${typed}` : typed)
  }
  const wrong = cell.value.kind === 'error'
  return (
    <div className="flex min-h-[46px] flex-wrap items-center gap-x-2 px-2.5 py-1.5">
      <span className="figures rounded bg-steel px-2 py-0.5 font-bold">
        {column.symbol} @ {number}
      </span>
      {isFormula && <span className="figures text-dim">=</span>}
      <FormulaEditor
        text={text}
        readOnly={!canEdit}
        label={`Formula of ${column.label || column.symbol} in state ${number}`}
        scope={scope}
        expectation={checks ? { expected: columnType(column.quantity), expectedWords: columnWords(column) } : null}
        onCommit={commit}
        onCancel={() => setCall(null)}
        onCall={setCall}
      />
      <span className={`text-[13px] ${wrong ? 'font-semibold text-hot' : 'text-dim'}`}>
        {kindWords(column.quantity)}
        {column.unit && column.unit !== '1' ? `, ${column.unit}` : ''}{' '}
        {wrong ? '✕' : cell.value.kind === 'empty' ? '' : '✓'}
      </span>
      {followsColumn && canEdit && (
        <span className="rounded bg-mark-soft px-2 py-0.5 text-[12px] text-mark-ink">whole column</span>
      )}
      {cell.value.kind === 'error' && (
        <p className="w-full text-[13px] font-semibold text-hot xl:hidden">{cell.value.reason}</p>
      )}
      {call && <Signature call={call} />}
    </div>
  )
}

function Signature({ call }: { readonly call: CallAt }) {
  return (
    <p className="figures w-full pt-1 text-[12.5px] text-dim">
      {call.spec.name}(
      {signature(call.spec).map((part, i) => (
        <span key={part.name} title={part.help}>
          {i > 0 && ', '}
          <span
            className={
              part.name === call.parameter ? 'bg-mark-soft font-bold text-ink' : part.optional ? 'opacity-70' : ''
            }
          >
            {part.text}
          </span>
        </span>
      ))}
      ) <span className="font-sans">{call.spec.help}</span>
    </p>
  )
}
