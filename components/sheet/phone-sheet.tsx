import { cellKey } from '@/lib/sheet/doc/definition'
import type { SheetView } from '@/lib/sheet/view'

/** For reading on a small screen: a state is a card, its values stand below one another. */
export function PhoneSheet({ view }: { readonly view: SheetView }) {
  const columns = view.columns.filter((column) => !column.hidden && column.quantity !== 'run')
  return (
    <ol className="flex flex-col gap-3 p-3">
      {view.rows.map((row, i) => {
        const from = view.rows.findIndex((other) => other.id === row.from)
        return (
          <li key={row.id} className="overflow-hidden rounded-lg border border-line bg-white">
            <h2 className="border-b border-line bg-[#F7F9F9] px-3 py-2 font-bold">
              <span className="figures mr-2 text-dim">{i + 1}</span>
              {row.label}
              {from >= 0 && (
                <span className="block text-[12.5px] font-normal text-dim">
                  starts from {from + 1} {view.rows[from].label}
                </span>
              )}
            </h2>
            <dl>
              {columns.map((column) => {
                const cell = view.cells.get(cellKey(row.id, column.id))
                if (!cell?.shown) return null
                const tone =
                  cell.value.kind === 'error' || cell.mark === 'over'
                    ? 'bg-hot-pale text-hot-ink'
                    : cell.mark === 'under'
                      ? 'bg-cold-pale text-cold-ink'
                      : ''
                return (
                  <div
                    key={column.id}
                    className={`flex justify-between gap-4 border-b border-line-light px-3 py-1.5 last:border-0 ${tone}`}
                  >
                    <dt className="text-[13px] opacity-80">{column.label}</dt>
                    <dd className="figures min-w-0 break-words text-right">
                      {cell.mark === 'over' && <span aria-label="over">▲ </span>}
                      {cell.mark === 'under' && <span aria-label="under">▼ </span>}
                      {cell.spoken}
                      {column.display === 'margin' && cell.mark === 'over' && ' (over)'}
                    </dd>
                  </div>
                )
              })}
            </dl>
          </li>
        )
      })}
    </ol>
  )
}
