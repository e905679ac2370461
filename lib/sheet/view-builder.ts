import { show } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import { cellKey } from './doc/definition'
import type { ColumnDefinition, RowDefinition, SheetDefinition, ThingDefinition } from './doc/definition'
import { Cell } from './cell'
import { STANDARD_SURROUNDINGS } from './engine/surroundings'
import { scopeOf } from './scope'
import type { CellView, ColumnView, RowView, SheetView, ThingView } from './view'
import type { CellValue, Limits, ValueChanges } from './values'

const EMPTY: CellValue = { kind: 'empty' }
const NO_LIMITS: Limits = {}

/** Joins what stands in the document with what the engine worked out. What did not change keeps its identity. */
export class ViewBuilder {
  ambient_Pa = STANDARD_SURROUNDINGS.p_Pa
  private readonly values = new Map<string, CellValue>()
  private readonly limits = new Map<string, Limits>()
  private readonly thingValues = new Map<string, CellValue>()
  private cells = new Map<string, Cell>()
  private columns = new Map<string, ColumnView>()
  private rows = new Map<string, RowView>()
  private scope: Scope = { columns: [], rows: [], things: [] }
  private scopeText = ''

  take(changes: ValueChanges): void {
    for (const [key, value] of changes.cells) this.values.set(key, value)
    for (const [key, limits] of changes.limits) this.limits.set(key, limits)
    for (const [id, value] of changes.things) this.thingValues.set(id, value)
    this.ambient_Pa = changes.ambient_Pa
  }

  build(definition: SheetDefinition, working: boolean): SheetView {
    this.takeScope(definition)
    const columns = this.buildColumns(definition.columns)
    const rows = this.buildRows(definition.rows)
    return {
      columns,
      rows,
      things: definition.rig.map((thing) => this.thing(thing)),
      cells: this.buildCells(definition, columns),
      working,
    }
  }

  /** Formulas are shown in today's names, so a changed name makes every shown formula new. */
  private takeScope(definition: SheetDefinition): void {
    const scope = scopeOf(definition)
    const text = JSON.stringify(scope)
    if (text === this.scopeText) return
    this.scopeText = text
    this.scope = scope
  }

  private buildColumns(definitions: readonly ColumnDefinition[]): ColumnView[] {
    const shown = (formula: string | null) => (formula === null ? null : show(formula, this.scope))
    const views = definitions.map((column): ColumnView => {
      const view = { ...column, formula: shown(column.formula), high: shown(column.high), low: shown(column.low) }
      return keepIfSame(this.columns.get(column.id), view)
    })
    this.columns = new Map(views.map((view) => [view.id, view]))
    return views
  }

  private buildRows(definitions: readonly RowDefinition[]): RowView[] {
    const fromOf = new Map(definitions.map((row) => [row.id, row.from]))
    const depthOf = (id: string) => {
      let depth = 0
      for (let from = fromOf.get(id); from; from = fromOf.get(from)) depth++
      return depth
    }
    const views = definitions.map((row) => keepIfSame(this.rows.get(row.id), { ...row, depth: depthOf(row.id) }))
    this.rows = new Map(views.map((view) => [view.id, view]))
    return views
  }

  private buildCells(definition: SheetDefinition, columns: readonly ColumnView[]): ReadonlyMap<string, CellView> {
    const cells = new Map<string, Cell>()
    definition.columns.forEach((column, i) => {
      for (const row of definition.rows) {
        const key = cellKey(row.id, column.id)
        const parts = {
          stored: definition.cells.get(key) ?? null,
          column: columns[i],
          value: this.values.get(key) ?? EMPTY,
          limits: this.limits.get(key) ?? NO_LIMITS,
          scope: this.scope,
          ambient_Pa: this.ambient_Pa,
        }
        const before = this.cells.get(key)
        cells.set(key, before?.isMadeOf(parts) ? before : new Cell(parts))
      }
    })
    this.cells = cells
    return cells
  }

  private thing(thing: ThingDefinition): ThingView {
    const value = this.thingValues.get(thing.id) ?? EMPTY
    const shownArguments = Object.entries(thing.arguments).map(([name, stored]) => [name, show(stored, this.scope)])
    return {
      id: thing.id,
      section: thing.section,
      name: thing.name,
      make: thing.make,
      arguments: Object.fromEntries(shownArguments) as Record<string, string>,
      lines: value.kind === 'thing' ? value.shown.split('\n') : [],
      ...(value.kind === 'error' && { error: value.reason }),
    }
  }
}

function keepIfSame<T extends object>(before: T | undefined, after: T): T {
  if (!before) return after
  const fields = Object.keys(after) as (keyof T)[]
  return fields.every((field) => before[field] === after[field]) ? before : after
}
