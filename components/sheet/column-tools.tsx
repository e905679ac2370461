'use client'

import { useState } from 'react'
import type { Scope } from '@/lib/formula'
import type { SheetEdits } from '@/lib/sheet/edits'
import type { SheetView } from '@/lib/sheet/view'
import { Button } from '../ui/button'
import { Menu } from '../ui/menu'
import { ColumnDialog, NEW_COLUMN } from './column-dialog'

interface ColumnToolsProps {
  readonly view: SheetView
  readonly columnId: string | null
  readonly scope: Scope
  readonly edits: SheetEdits
}

/** What can be done to the column one stands on. */
export function ColumnTools({ view, columnId, scope, edits }: ColumnToolsProps) {
  const [open, setOpen] = useState<'new' | 'edit' | null>(null)
  const index = view.columns.findIndex((column) => column.id === columnId)
  const column = view.columns[index]
  const hidden = view.columns.filter((one) => one.hidden)
  const taken = [...scope.columns.map((one) => one.symbol), ...scope.things.map((thing) => thing.name)]
  return (
    <div className="flex flex-wrap items-center gap-1.5" role="group" aria-label="Columns">
      <Button small onClick={() => setOpen('new')}>
        + Column
      </Button>
      {column && (
        <>
          <Button small onClick={() => setOpen('edit')}>
            Edit {column.symbol}
          </Button>
          <Menu
            label="More for this column"
            trigger={
              <Button small aria-label={`More for column ${column.symbol}`}>
                ⋯
              </Button>
            }
            items={[
              {
                label: 'Move left',
                disabled: index === 0,
                onSelect: () => edits.moveColumn(column.id, { after: view.columns[index - 2]?.id ?? null }),
              },
              {
                label: 'Move right',
                disabled: index === view.columns.length - 1,
                onSelect: () => edits.moveColumn(column.id, { after: view.columns[index + 1].id }),
              },
              { label: 'Hide', onSelect: () => edits.updateColumn(column.id, { hidden: true }) },
              ...hidden.map((one) => ({
                label: `Show ${one.label || one.symbol}`,
                onSelect: () => edits.updateColumn(one.id, { hidden: false }),
              })),
              { label: 'Delete column', danger: true, onSelect: () => edits.removeColumn(column.id) },
            ]}
          />
        </>
      )}
      {open && (
        <ColumnDialog
          title={open === 'edit' && column ? `Column ${column.label}` : 'New column'}
          column={open === 'edit' && column ? column : NEW_COLUMN}
          scope={scope}
          taken={taken.filter((name) => open === 'new' || name !== column?.symbol)}
          onClose={() => setOpen(null)}
          onSave={({
            symbol,
            label,
            quantity,
            unit,
            decimals,
            formula,
            high,
            low,
            display,
            width,
            hidden: isHidden,
          }) => {
            const fields = {
              symbol,
              label,
              quantity,
              unit,
              decimals,
              formula,
              high,
              low,
              display,
              width,
              hidden: isHidden,
            }
            if (open === 'edit' && column) edits.updateColumn(column.id, fields)
            else edits.addColumn({ ...fields, ...(column && { after: column.id }) })
            setOpen(null)
          }}
          {...(open === 'edit' &&
            column && {
              onRemove: () => {
                edits.removeColumn(column.id)
                setOpen(null)
              },
            })}
        />
      )}
    </div>
  )
}
