'use client'

import { useState } from 'react'
import { analyse } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import type { TypedColumn } from '@/lib/sheet/edits'
import { VOCABULARY } from '@/lib/sheet/engine/vocabulary'
import { COLUMN_KINDS, columnType } from '@/lib/sheet/types'
import { QUANTITIES, isQuantity, quantity as quantityById } from '@/lib/units'
import { Button } from '../ui/button'
import { Dialog } from '../ui/dialog'
import { SelectField, TextField } from '../ui/field'

export const NEW_COLUMN: TypedColumn = {
  symbol: '',
  label: '',
  quantity: 'pressure',
  unit: 'bar',
  decimals: 1,
  formula: null,
  high: null,
  low: null,
  display: 'number',
  width: null,
  hidden: false,
}

interface ColumnDialogProps {
  readonly title: string
  readonly column: TypedColumn
  readonly scope: Scope
  readonly taken: readonly string[]
  readonly onSave: (column: TypedColumn) => void
  readonly onRemove?: () => void
  readonly onClose: () => void
}

const KINDS = [
  ...QUANTITIES.map(({ id, label }) => ({ value: id, label })),
  ...Object.entries(COLUMN_KINDS).map(([value, label]) => ({ value, label })),
]
const SYMBOL = /^[\p{L}_][\p{L}_0-9]*$/u

export function ColumnDialog({ title, column, scope, taken, onSave, onRemove, onClose }: ColumnDialogProps) {
  const [draft, setDraft] = useState(column)
  const [tried, setTried] = useState(false)
  const set = (change: Partial<TypedColumn>) => setDraft({ ...draft, ...change })
  const units = isQuantity(draft.quantity) ? quantityById(draft.quantity).units : []
  const numeric = units.length > 0

  const symbolMistake = !SYMBOL.test(draft.symbol)
    ? 'one word of letters, digits and _, by which formulas call the column'
    : taken.includes(draft.symbol)
      ? `${draft.symbol} is taken: a name means one thing`
      : null
  const mistake = (formula: string | null) =>
    formula?.trim()
      ? (analyse(formula.replace(/^=/, ''), scope, VOCABULARY, {
          expected: columnType(draft.quantity),
          expectedWords: 'this column',
        })[0]?.reason ?? null)
      : null

  function save(event: React.FormEvent) {
    event.preventDefault()
    setTried(true)
    if (symbolMistake || !draft.label.trim()) return
    onSave({ ...draft, label: draft.label.trim() })
  }

  return (
    <Dialog open onClose={onClose} title={title} wide>
      <form onSubmit={save} className="flex flex-col gap-4" noValidate>
        <div className="grid gap-4 sm:grid-cols-2">
          <TextField
            label="Label *"
            autoFocus
            maxLength={120}
            value={draft.label}
            error={tried && !draft.label.trim() ? 'a column needs a label' : null}
            onChange={(event) => set({ label: event.target.value })}
          />
          <TextField
            label="Symbol *"
            mono
            maxLength={60}
            value={draft.symbol}
            error={tried ? symbolMistake : null}
            hint="as formulas call it: p_to"
            onChange={(event) => set({ symbol: event.target.value })}
          />
          <SelectField
            label="Quantity"
            value={draft.quantity}
            options={KINDS}
            onChange={(event) => {
              const id = event.target.value
              set({ quantity: id, unit: isQuantity(id) ? quantityById(id).units[0] : '' })
            }}
          />
          {numeric && (
            <div className="grid grid-cols-2 gap-3">
              <SelectField
                label="Unit"
                value={draft.unit}
                options={units.map((unit) => ({
                  value: unit,
                  label: unit === '1' ? 'plain number' : unit.endsWith('(g)') ? `${unit} gauge` : unit,
                }))}
                onChange={(event) => set({ unit: event.target.value })}
              />
              <TextField
                label="Decimals"
                type="number"
                min={0}
                max={12}
                value={draft.decimals}
                onChange={(event) =>
                  set({ decimals: Math.min(12, Math.max(0, Math.round(Number(event.target.value)))) })
                }
              />
            </div>
          )}
        </div>
        <TextField
          label="Formula for every state"
          mono
          value={draft.formula ?? ''}
          error={mistake(draft.formula)}
          hint="left empty, values are typed in"
          onChange={(event) => set({ formula: event.target.value || null })}
        />
        {numeric && (
          <div className="grid gap-4 sm:grid-cols-2">
            <TextField
              label="Upper limit"
              mono
              value={draft.high ?? ''}
              error={mistake(draft.high)}
              hint="a value or a formula; above it a cell is marked"
              onChange={(event) => set({ high: event.target.value || null })}
            />
            <TextField
              label="Lower limit"
              mono
              value={draft.low ?? ''}
              error={mistake(draft.low)}
              hint="below it a cell is marked"
              onChange={(event) => set({ low: event.target.value || null })}
            />
            <SelectField
              label="Shown as"
              value={draft.display}
              options={[
                { value: 'number', label: 'a number' },
                { value: 'margin', label: 'a margin: negative is over, the upper limit is the whole allowance' },
              ]}
              onChange={(event) => set({ display: event.target.value === 'margin' ? 'margin' : 'number' })}
            />
          </div>
        )}
        <div className="flex flex-wrap justify-end gap-2 border-t border-line pt-3">
          {onRemove && (
            <Button look="text" className="mr-auto text-hot" onClick={onRemove}>
              Remove this column
            </Button>
          )}
          <Button onClick={onClose}>Cancel</Button>
          <Button look="primary" type="submit">
            Save
          </Button>
        </div>
      </form>
    </Dialog>
  )
}
