import type { CellValue, LimitMark } from './values'

/** One cell as the grid draws it. */
export interface CellView {
  /** What stands in the cell: "88.3", "Header H", the first words of an error. No unit: that is in the header. */
  readonly shown: string
  /** Value with its unit, for the side panel and screen readers. */
  readonly spoken: string
  /** What editing starts with, in people's names: `200 bar`, `=charge(...)`, `Header H`. */
  readonly edit: string
  readonly origin: 'empty' | 'typed' | 'formula' | 'override'
  readonly value: CellValue
  readonly mark?: LimitMark
  /** 0 to 1 for a margin column: how much of the allowance is used. */
  readonly used?: number
}

export interface ColumnView {
  readonly id: string
  readonly symbol: string
  readonly label: string
  readonly quantity: string
  readonly unit: string
  readonly decimals: number
  readonly display: 'number' | 'margin'
  readonly width: number | null
  readonly hidden: boolean
  /** In people's names; null for an input. */
  readonly formula: string | null
  readonly high: string | null
  readonly low: string | null
}

export interface RowView {
  readonly id: string
  readonly label: string
  readonly from: string | null
  /** How deep it hangs in the tree of states. */
  readonly depth: number
}

export interface ThingView {
  readonly id: string
  readonly section: 'gas' | 'vessel' | 'supply' | 'path' | 'surroundings'
  readonly name: string
  readonly make: string
  /** In people's names: { volume: "50 L", shell: "lumped(mass: 52 kg, …)" }. */
  readonly arguments: Readonly<Record<string, string>>
  /** A line or two: "50 L, steel shell 52 kg". Empty while an error stands. */
  readonly lines: readonly string[]
  readonly error?: string
}

/** All that React reads of a sheet. Immutable; unchanged parts keep their identity between versions. */
export interface SheetView {
  readonly columns: readonly ColumnView[]
  readonly rows: readonly RowView[]
  readonly things: readonly ThingView[]
  /** By cellKey. */
  readonly cells: ReadonlyMap<string, CellView>
  /** True while the engine is at work on a change. */
  readonly working: boolean
}
