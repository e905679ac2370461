import type * as Y from 'yjs'
import { bind } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import * as commands from './doc/commands'
import type { Place } from './doc/commands'
import type { ColumnDefinition, RigSection, SheetDefinition } from './doc/definition'
import { storedFromTyped } from './entry'

/** How the sheet stands when an edit is made: names are bound to identities by it. */
export interface EditContext {
  readonly definition: SheetDefinition
  readonly scope: Scope
  readonly ambient_Pa: number
}

/** A column as people write it: formulas in today's names. */
export type TypedColumn = Omit<ColumnDefinition, 'id'>
/** A thing as a form gives it: each argument as typed; null takes an argument out. */
export interface TypedThing {
  readonly section: RigSection
  readonly name: string
  readonly make: string
  readonly arguments: Readonly<Record<string, string>>
}

/** All that a person can do to a sheet, in what they typed. Each call is one step of undo and reaches the others whole. */
export class SheetEdits {
  constructor(
    private readonly doc: Y.Doc,
    private readonly context: () => EditContext,
  ) {}

  /** Empty text clears the cell: it then follows its column's formula again, or is empty. */
  setCell(row: string, column: string, typed: string): void {
    this.setCells([{ row, column, typed }])
  }

  /** Many cells in one step, as a paste or a fill does. */
  setCells(cells: readonly { readonly row: string; readonly column: string; readonly typed: string }[]): void {
    const { definition, scope, ambient_Pa } = this.context()
    const columns = new Map(definition.columns.map((column) => [column.id, column]))
    commands.edit(this.doc, () => {
      for (const { row, column, typed } of cells) {
        const target = columns.get(column)
        if (!target) continue
        if (typed.trim() === '') commands.clearCell(this.doc, row, column)
        else commands.setCell(this.doc, row, column, storedFromTyped(typed, target, scope, ambient_Pa))
      }
    })
  }

  addRow(row: { label: string; from: string | null } & Place): string {
    return commands.addRow(this.doc, row)
  }

  setRow(id: string, change: { label?: string; from?: string | null }): void {
    commands.setRow(this.doc, id, change)
  }

  moveRow(id: string, place: Place): void {
    commands.moveRow(this.doc, id, place)
  }

  branchRow(id: string, label: string): string {
    return commands.branchRow(this.doc, id, label)
  }

  removeRow(id: string): void {
    commands.removeRow(this.doc, id)
  }

  addColumn(column: TypedColumn & Place): string {
    return commands.addColumn(this.doc, this.bindColumn(column))
  }

  updateColumn(id: string, change: Partial<TypedColumn>): void {
    commands.updateColumn(this.doc, id, this.bindColumn(change))
  }

  moveColumn(id: string, place: Place): void {
    commands.moveColumn(this.doc, id, place)
  }

  removeColumn(id: string): void {
    commands.removeColumn(this.doc, id)
  }

  addThing(thing: TypedThing): string {
    return commands.addThing(this.doc, { ...thing, arguments: this.bindArguments(thing.arguments) })
  }

  updateThing(id: string, change: Omit<TypedThing, 'section'>): void {
    const before = this.context().definition.rig.find((thing) => thing.id === id)
    const left = Object.keys(before?.arguments ?? {}).filter((name) => !(name in change.arguments))
    commands.updateThing(this.doc, id, {
      name: change.name,
      make: change.make,
      arguments: { ...this.bindArguments(change.arguments), ...Object.fromEntries(left.map((name) => [name, null])) },
    })
  }

  duplicateThing(id: string, name: string): string | null {
    const thing = this.context().definition.rig.find((candidate) => candidate.id === id)
    return thing ? commands.addThing(this.doc, { ...thing, id: undefined, name, after: id }) : null
  }

  removeThing(id: string): void {
    commands.removeThing(this.doc, id)
  }

  private bindColumn<T extends Partial<TypedColumn>>(column: T): T {
    const { scope } = this.context()
    const bound: Partial<TypedColumn> = {}
    for (const field of ['formula', 'high', 'low'] as const) {
      const typed = column[field]?.trim().replace(/^=/, '')
      if (field in column) Object.assign(bound, { [field]: typed ? bind(typed, scope) : null })
    }
    return { ...column, ...bound }
  }

  private bindArguments(given: Readonly<Record<string, string>>): Record<string, string> {
    const { scope } = this.context()
    return Object.fromEntries(
      Object.entries(given)
        .filter(([, typed]) => typed.trim() !== '')
        .map(([name, typed]) => [name, bind(typed.trim().replace(/^=/, ''), scope)]),
    )
  }
}
