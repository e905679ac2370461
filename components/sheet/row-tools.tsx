'use client'

import type { SheetEdits } from '@/lib/sheet/edits'
import type { RowView, SheetView } from '@/lib/sheet/view'
import { Button } from '../ui/button'
import { Menu } from '../ui/menu'

interface RowToolsProps {
  readonly view: SheetView
  /** The state one stands on. */
  readonly rowId: string | null
  readonly edits: SheetEdits
  readonly onSelectRow: (id: string) => void
}

/** What can be done to the state one stands on. */
export function RowTools({ view, rowId, edits, onSelectRow }: RowToolsProps) {
  const index = view.rows.findIndex((row) => row.id === rowId)
  const row = view.rows[index] as RowView | undefined
  const last = view.rows.at(-1)
  return (
    <div className="flex flex-wrap items-center gap-1.5" role="group" aria-label="States">
      <Button
        small
        onClick={() =>
          onSelectRow(
            edits.addRow({ label: 'New state', from: row?.id ?? last?.id ?? null, after: row?.id ?? last?.id ?? null }),
          )
        }
      >
        + State
      </Button>
      <Button
        small
        disabled={!row}
        title="A what-if beside this state: it starts from the same one, to change one thing in"
        onClick={() => row && onSelectRow(edits.branchRow(row.id, `${row.label}, what if`))}
      >
        Branch
      </Button>
      {row && (
        <>
          <label className="ml-1 flex items-center gap-1.5 text-[13px] text-dim">
            starts from
            <select
              className="max-w-44 rounded-md border border-line bg-white px-1.5 py-1 text-ink"
              value={row.from ?? ''}
              onChange={(event) => edits.setRow(row.id, { from: event.target.value || null })}
            >
              <option value="">none</option>
              {view.rows.map((other, i) => (
                <option key={other.id} value={other.id} disabled={hangsFrom(view, other, row.id)}>
                  {i + 1} {other.label}
                </option>
              ))}
            </select>
          </label>
          <Menu
            label="More for this state"
            trigger={
              <Button small aria-label={`More for ${row.label}`}>
                ⋯
              </Button>
            }
            items={[
              {
                label: 'Move up',
                disabled: index === 0,
                onSelect: () => edits.moveRow(row.id, { after: view.rows[index - 2]?.id ?? null }),
              },
              {
                label: 'Move down',
                disabled: index === view.rows.length - 1,
                onSelect: () => edits.moveRow(row.id, { after: view.rows[index + 1].id }),
              },
              { label: 'Delete state', danger: true, onSelect: () => edits.removeRow(row.id) },
            ]}
          />
        </>
      )}
    </div>
  )
}

/** A state cannot start from itself, nor from one that hangs from it. */
function hangsFrom(view: SheetView, row: RowView, ancestor: string): boolean {
  const byId = new Map(view.rows.map((each) => [each.id, each]))
  for (let at: RowView | undefined = row; at; at = at.from ? byId.get(at.from) : undefined)
    if (at.id === ancestor) return true
  return false
}
