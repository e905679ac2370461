import { children, parse, show } from '@/lib/formula'
import type { Ast } from '@/lib/formula'
import { cellKey } from './doc/definition'
import type { SheetDefinition } from './doc/definition'
import { scopeOf } from './scope'
import type { SheetView } from './view'

/** What a cell's formula reads, with today's values, and what reads the cell. */
export interface TraceOfCell {
  readonly reads: readonly { readonly name: string; readonly shown: string }[]
  /** Symbols of this row's columns, and other states by number. */
  readonly readBy: readonly string[]
}

type Reference = Extract<Ast, { type: 'reference' }>

export function traceOf(definition: SheetDefinition, view: SheetView, row: string, column: string): TraceOfCell {
  const formulaOf = (r: string, c: string) =>
    definition.cells.get(cellKey(r, c)) ?? definition.columns.find((one) => one.id === c)?.formula ?? null
  const scope = scopeOf(definition)
  const own = formulaOf(row, column)
  const byName = new Map(
    references(own).map((reference) => [
      show(textOf(own!, reference), scope),
      shownAt(reference, row, definition, view),
    ]),
  )
  const reads = [...byName].map(([name, shown]) => ({ name, shown }))
  const readBy: string[] = []
  definition.rows.forEach((other, i) => {
    for (const candidate of definition.columns) {
      const formula = formulaOf(other.id, candidate.id)
      if (!references(formula).some((reference) => meansCell(reference, other.id, definition, row, column))) continue
      readBy.push(other.id === row ? candidate.symbol : `${candidate.symbol}@${i + 1}`)
    }
  })
  return {
    reads,
    readBy:
      readBy.length > MOST_SHOWN ? [...readBy.slice(0, MOST_SHOWN), `${readBy.length - MOST_SHOWN} more`] : readBy,
  }
}

const MOST_SHOWN = 12

/** How many formulas of the sheet name a rig thing. */
export function usesOfThing(definition: SheetDefinition, id: string): number {
  const token = `$t:${id}`
  const formulas = [
    ...definition.cells.values(),
    ...definition.columns.flatMap((column) => [column.formula, column.high, column.low]),
    ...definition.rig.flatMap((thing) => Object.values(thing.arguments)),
  ]
  return formulas.filter(
    (formula) =>
      formula !== null && references(formula).some((reference) => textOf(formula, reference).startsWith(token)),
  ).length
}

const known = new Map<string, readonly Reference[]>()

/** The references of a formula; the same few formulas are asked for again and again. */
function references(formula: string | null): readonly Reference[] {
  if (formula === null) return []
  let found = known.get(formula)
  if (!found) {
    const { ast } = parse(formula)
    found = ast ? collect(ast) : []
    if (known.size > 5_000) known.clear()
    known.set(formula, found)
  }
  return found
}

const collect = (ast: Ast): readonly Reference[] => (ast.type === 'reference' ? [ast] : children(ast).flatMap(collect))

const textOf = (formula: string, { span }: Reference) => formula.slice(span.from, span.to)

/** Which row a reference of a formula in `home` means; null for the whole column. */
function rowOf(reference: Reference, home: string, definition: SheetDefinition): string | null | undefined {
  if (!reference.row) return home
  if (reference.row.at === 'all') return null
  if (reference.row.at === 'identity') return reference.row.id
  return reference.row.at === 'from' ? definition.rows.find((row) => row.id === home)?.from : undefined
}

function meansCell(
  reference: Reference,
  home: string,
  definition: SheetDefinition,
  row: string,
  column: string,
): boolean {
  const { target } = reference
  if (target.by !== 'identity' || target.kind !== 'column' || target.id !== column) return false
  const means = rowOf(reference, home, definition)
  return means === row || means === null
}

function shownAt(reference: Reference, home: string, definition: SheetDefinition, view: SheetView): string {
  const { target } = reference
  if (target.by !== 'identity') return ''
  if (target.kind === 'thing') return view.things.find((thing) => thing.id === target.id)?.lines[0] ?? ''
  const row = rowOf(reference, home, definition)
  return row ? (view.cells.get(cellKey(row, target.id))?.spoken.split('\n')[0] ?? '') : ''
}
