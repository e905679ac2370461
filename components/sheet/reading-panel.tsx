import type { TraceOfCell } from '@/lib/sheet/trace'
import { kindWords } from '@/lib/sheet/types'
import type { SelectedCell } from './selection'

interface ReadingPanelProps {
  readonly selected: SelectedCell | null
  readonly trace: TraceOfCell | null
}

const ORIGINS = {
  empty: 'empty',
  typed: 'typed in',
  formula: 'worked out',
  override: 'overridden in this cell',
} as const

/** The selected cell explained: its value, where it comes from, and what hangs on it. */
export function ReadingPanel({ selected, trace }: ReadingPanelProps) {
  if (!selected) {
    return (
      <div className="text-dim">
        <h2 className="mb-2 text-[12px] font-bold">Reading</h2>
        <p>
          Select a cell, and it is explained here: its value and unit, the formula behind it, and what is wrong where
          something is.
        </p>
      </div>
    )
  }
  const { cell, column, row, number } = selected
  const error = cell.value.kind === 'error' ? cell.value : null
  return (
    <div aria-live="polite">
      <h2 className="mb-1 text-[12px] font-bold text-dim">Reading</h2>
      <p
        className={`figures break-words font-bold ${error ? 'text-[15px] leading-snug text-hot' : cell.spoken.length > 14 ? 'text-[18px]' : 'text-[26px]'}`}
      >
        {error ? error.reason : cell.spoken || 'empty'}
      </p>
      <p className="mb-3 text-dim">
        {row.label || `state ${number}`}, {(column.label || column.symbol).toLowerCase()}
      </p>
      {cell.mark && (
        <p
          className={`mb-3 rounded-md px-2.5 py-1.5 font-semibold ${cell.mark === 'over' ? 'bg-hot-pale text-hot-ink' : 'bg-cold-pale text-cold-ink'}`}
        >
          {cell.mark === 'over' ? '▲ above its limit' : '▼ below its limit'}
        </p>
      )}
      <dl>
        <Line name="Quantity">{kindWords(column.quantity)}</Line>
        <Line name="This cell">
          {cell.origin === 'formula' && column.formula !== null ? 'follows its column' : ORIGINS[cell.origin]}
        </Line>
        {trace && trace.reads.length > 0 && (
          <Line name="Reads">
            {trace.reads.map(({ name, shown }) => (
              <span key={name} className="block">
                <span className="text-reference">{name}</span> {shown || '–'}
              </span>
            ))}
          </Line>
        )}
        {trace && <Line name="Read by">{trace.readBy.length > 0 ? trace.readBy.join(', ') : 'nothing'}</Line>}
      </dl>
    </div>
  )
}

function Line({ name, children }: { readonly name: string; readonly children: React.ReactNode }) {
  return (
    <div className="flex justify-between gap-4 border-t border-line-light py-1.5 text-[13px]">
      <dt className="shrink-0 text-dim">{name}</dt>
      <dd className="min-w-0 break-words text-right">{children}</dd>
    </div>
  )
}
