/**
 * A sheet as plain data: what the shared document holds, read in one go. Formulas are in their stored form, in which
 * every reference is an identity (see lib/formula: bind and show).
 */
export interface SheetDefinition {
  /** In the order of the panel. */
  readonly rig: readonly ThingDefinition[]
  /** In the order of the grid. */
  readonly columns: readonly ColumnDefinition[]
  /** In the order of the grid. */
  readonly rows: readonly RowDefinition[]
  /** By cellKey. A cell that is absent follows its column's formula, or is empty. */
  readonly cells: ReadonlyMap<string, string>
}

/** Where a thing stands in the rig panel. */
export const RIG_SECTIONS = ['gas', 'vessel', 'supply', 'path', 'surroundings'] as const
export type RigSection = (typeof RIG_SECTIONS)[number]

/** A thing that formulas name: a name and a constructor with its arguments, each argument a stored formula (`50 L`). */
export interface ThingDefinition {
  readonly id: string
  readonly section: RigSection
  readonly name: string
  /** The constructor in the function table: vessel, header, bank, orifice, gas, surroundings … */
  readonly make: string
  readonly arguments: Readonly<Record<string, string>>
}

export interface ColumnDefinition {
  readonly id: string
  readonly symbol: string
  readonly label: string
  /** A quantity's id (lib/units), or text, logical, gas, vessel, supply, path, run. */
  readonly quantity: string
  /** How numbers are read and shown; empty for what has no unit. */
  readonly unit: string
  readonly decimals: number
  /** One formula for all rows; null for an input column. */
  readonly formula: string | null
  /** Above `high` a value is marked over, below `low` under; formulas of the column's quantity, or null. */
  readonly high: string | null
  readonly low: string | null
  /** `margin` draws a bar: how far a value is inside its limit, negative when it is over. */
  readonly display: 'number' | 'margin'
  readonly width: number | null
  readonly hidden: boolean
}

export interface RowDefinition {
  readonly id: string
  readonly label: string
  /** The state it starts from. */
  readonly from: string | null
}

export const cellKey = (row: string, column: string) => `${row}/${column}`
