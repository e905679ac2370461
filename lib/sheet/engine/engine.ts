import { DetailedCellError } from 'hyperformula'
import type { ExportedChange, HyperFormula } from 'hyperformula'
import { isFault, isThing } from '@/lib/formula'
import type { Fault, Read, Surroundings, Type, Value, Vocabulary } from '@/lib/formula'
import { cellKey } from '../doc/definition'
import type { ColumnDefinition, RowDefinition, SheetDefinition } from '../doc/definition'
import { scopeOf } from '../scope'
import { columnType, columnWords, sectionType } from '../types'
import type { CellValue, Limits, ValueChanges } from '../values'
import { cycleReason } from './cycle'
import { Formulas } from './formulas'
import type { NumberedFormula, Wanted } from './formulas'
import { createGraph } from './graph'
import type { GraphSheet } from './graph'
import { Interned, NO_START, graphFault } from './intern'
import type { GraphScalar, GraphValue } from './intern'
import { Places, letters } from './layout'
import { constructorCall, surroundingsOf } from './rig'

/** Places that lost their owner. */
interface Gone {
  readonly rows: ReadonlySet<number>
  readonly columns: ReadonlySet<number>
  readonly things: ReadonlySet<number>
  readonly any: boolean
}

const OUR_MISTAKE: Fault = {
  fault: 'unconverged',
  reason: 'this could not be worked out, and it is our mistake: please report it with the sheet',
}

function rethrow(mistake: unknown): never {
  throw mistake
}

const EMPTY_SHEET: SheetDefinition = { rig: [], columns: [], rows: [], cells: new Map() }

/**
 * Works out a sheet: all of it at first, and what a change touches after that. It holds no document, it is handed what
 * stands in it. The same definition gives the same values whatever came before.
 */
export class SheetEngine {
  private readonly graph: HyperFormula
  private readonly formulas: Formulas
  private readonly interned = new Interned()
  private readonly rows = new Places()
  private readonly columns = new Places()
  private readonly things = new Places()
  /** Formula text last put into the graph, by cell of the graph. */
  private readonly written = new Map<string, string>()
  private readonly formulaOf = new Map<string, NumberedFormula>()
  private definition = EMPTY_SHEET
  private surroundings: Surroundings
  private scopeText = ''

  constructor(
    private readonly vocabulary: Vocabulary,
    licenseKey: string,
    /** Hears of a programmer’s mistake in a cell, which must not take the rest of the sheet with it. By default it is thrown. */
    private readonly onMistake: (mistake: unknown) => void = rethrow,
  ) {
    this.formulas = new Formulas(vocabulary)
    this.surroundings = surroundingsOf([], vocabulary)
    this.graph = createGraph(licenseKey, (k, reads) => this.work(k, reads))
  }

  /** Takes the sheet as it now stands and says what that changed. */
  update(definition: SheetDefinition): ValueChanges {
    this.definition = definition
    this.takeSurroundings()
    this.takeScope()
    const gone = this.settle()
    const changes = this.graph.batch(() => this.write(gone))
    return this.collect(changes)
  }

  /** The value behind a cell: a run with its trace, a thing. */
  valueOf(row: string, column: string): Value {
    const address = { sheet: this.sheetId('states'), row: this.rows.of(row) ?? -1, col: this.columns.of(column) ?? -1 }
    if (address.row < 0 || address.col < 0) return null
    const value = this.graph.getCellValue(address)
    return typeof value === 'string' ? this.interned.fromMark(value) : value instanceof DetailedCellError ? null : value
  }

  /** What kind of result a cell's formula gives; undefined for an empty cell or a formula that does not hold. */
  typeOf(row: string, column: string): Type | undefined {
    const compilation = this.formulaOf.get(cellKey(row, column))?.compilation
    return compilation?.ok ? compilation.type : undefined
  }

  dispose(): void {
    this.graph.destroy()
  }

  private work(k: number, reads: readonly GraphValue[]): GraphScalar {
    const compilation = this.formulas.numbered(k)
    if (!compilation.ok) return this.interned.toGraph(compilation.fault)
    const values = reads.map((read) => this.interned.fromGraph(read))
    try {
      return this.interned.toGraph(compilation.run(values, this.surroundings))
    } catch (mistake) {
      this.onMistake(mistake)
      return this.interned.toGraph(OUR_MISTAKE)
    }
  }

  private takeSurroundings(): void {
    const surroundings = surroundingsOf(this.definition.rig, this.vocabulary)
    if (surroundings.p_Pa === this.surroundings.p_Pa && surroundings.T_K === this.surroundings.T_K) return
    this.surroundings = surroundings
    // any formula may read the surroundings without naming them
    this.formulas.renumber()
  }

  private takeScope(): void {
    const scope = scopeOf(this.definition)
    const text = JSON.stringify(scope)
    if (text === this.scopeText) return
    this.scopeText = text
    this.formulas.setScope(scope)
  }

  private settle(): Gone {
    const rows = this.rows.settle(this.definition.rows.map((row) => row.id))
    const columns = this.columns.settle(this.definition.columns.map((column) => column.id))
    const things = this.things.settle(this.definition.rig.map((thing) => thing.id))
    return { rows, columns, things, any: rows.size + columns.size + things.size > 0 }
  }

  private write(gone: Gone): void {
    if (gone.any) this.clearPlaces(gone)
    for (const thing of this.definition.rig) {
      const wanted: Wanted = { type: sectionType(thing.section), words: thing.name || 'this thing' }
      const formula = this.formulas.wanting(wanted)(constructorCall(thing))
      this.formulaOf.set(thing.id, formula)
      this.put('rig', this.things.of(thing.id)!, 0, this.graphText(formula, null))
    }
    for (const column of this.definition.columns) this.writeColumn(column)
  }

  private writeColumn(column: ColumnDefinition): void {
    const type = columnType(column.quantity)
    const words = columnWords(column)
    const col = this.columns.of(column.id)!
    const formulaFor = this.formulas.wanting({ type, words })
    const highFor = this.formulas.wanting({ type, words: `the upper limit of ${words}` })
    const lowFor = this.formulas.wanting({ type, words: `the lower limit of ${words}` })
    for (const row of this.definition.rows) {
      const key = cellKey(row.id, column.id)
      const place = this.rows.of(row.id)!
      const source = this.definition.cells.get(key) ?? column.formula
      const formula = source === null ? null : formulaFor(source)
      if (formula) this.formulaOf.set(key, formula)
      else this.formulaOf.delete(key)
      this.put('states', place, col, formula && this.graphText(formula, row))
      this.put('limits', place, col * 2, column.high && this.graphText(highFor(column.high), row))
      this.put('limits', place, col * 2 + 1, column.low && this.graphText(lowFor(column.low), row))
    }
  }

  private clearPlaces(gone: Gone): void {
    for (const id of [...this.written.keys()]) {
      const [sheet, row, col] = splitPlace(id)
      const leaves =
        sheet === 'rig'
          ? gone.things.has(row)
          : gone.rows.has(row) || gone.columns.has(sheet === 'limits' ? Math.floor(col / 2) : col)
      if (leaves) this.put(sheet, row, col, null)
    }
  }

  private put(sheet: GraphSheet, row: number, col: number, text: string | null): void {
    const id = `${sheet}/${row}/${col}`
    if ((this.written.get(id) ?? null) === text) return
    if (text === null) this.written.delete(id)
    else this.written.set(id, text)
    this.graph.setCellContents({ sheet: this.sheetId(sheet), row, col }, text)
  }

  /** `=WORK(k, cells…)`: the compiled formula's number and the places of what it reads, as seen from this row. */
  private graphText({ k, compilation }: NumberedFormula, row: RowDefinition | null): string {
    const reads = compilation.ok ? compilation.reads : []
    return `=WORK(${[k, ...reads.map((read) => this.address(read, row))].join(',')})`
  }

  private address(read: Read, row: RowDefinition | null): string {
    if (read.kind === 'thing') return `rig!A${this.things.of(read.thing)! + 1}`
    const column = letters(this.columns.of(read.column)!)
    if (read.row.at === 'all') return `states!${column}1:${column}${this.capacity()}`
    const id = read.row.at === 'row' ? read.row.row : read.row.at === 'from' ? row?.from : row?.id
    const place = id ? this.rows.of(id) : undefined
    return place === undefined ? `"${NO_START}"` : `states!${column}${place + 1}`
  }

  /** Ranges reach to a power of two beyond the last row, so that adding a row seldom rewrites them. */
  private capacity(): number {
    return 2 ** Math.ceil(Math.log2(Math.max(64, this.rows.extent)))
  }

  private sheetId(sheet: GraphSheet): number {
    return this.graph.getSheetId(sheet)!
  }

  private collect(changes: readonly ExportedChange[]): ValueChanges {
    const rowIds = invert(this.rows)
    const columnIds = invert(this.columns)
    const thingIds = invert(this.things)
    const cells = new Map<string, CellValue>()
    const limits = new Map<string, Limits>()
    const things = new Map<string, CellValue>()
    for (const change of changes) {
      if (!('address' in change)) continue
      const { sheet, row, col } = change.address
      if (sheet === this.sheetId('rig')) {
        const id = thingIds.get(row)
        if (id) things.set(id, this.cellValue(id, change.newValue))
        continue
      }
      const ofLimits = sheet === this.sheetId('limits')
      const rowId = rowIds.get(row)
      const columnId = columnIds.get(ofLimits ? Math.floor(col / 2) : col)
      if (!rowId || !columnId) continue
      const key = cellKey(rowId, columnId)
      if (ofLimits) limits.set(key, this.limitsAt(row, col))
      else cells.set(key, this.cellValue(key, change.newValue))
    }
    return { cells, limits, things, ambient_Pa: this.surroundings.p_Pa }
  }

  private limitsAt(row: number, col: number): Limits {
    const first = col - (col % 2)
    const [high, low] = [first, first + 1].map((at) =>
      this.graph.getCellValue({ sheet: this.sheetId('limits'), row, col: at }),
    )
    return { ...(typeof high === 'number' && { high }), ...(typeof low === 'number' && { low }) }
  }

  private cellValue(id: string, value: unknown): CellValue {
    if (value === null || value === undefined) return { kind: 'empty' }
    if (typeof value === 'number') return { kind: 'number', si: value }
    if (typeof value === 'boolean') return { kind: 'logical', value }
    if (value instanceof DetailedCellError) {
      const { fault, reason } = graphFault(value.type)
      return { kind: 'error', code: fault, reason: this.ringOf(id) ?? reason }
    }
    const held = this.interned.fromMark(String(value))
    if (typeof held === 'string') return { kind: 'text', text: held }
    if (isThing(held)) return { kind: 'thing', thing: held.thing, key: held.key, shown: held.shown }
    if (isFault(held)) {
      return { kind: 'error', code: held.fault, reason: held.reason, ...(held.span && { span: held.span }) }
    }
    throw new Error(`the graph holds an unknown mark: ${String(value)}`)
  }

  private ringOf(id: string): string | null {
    const { columns, rows } = this.definition
    const needs = (key: string) => {
      const compilation = this.formulaOf.get(key)?.compilation
      const row = rows.find((candidate) => key.startsWith(`${candidate.id}/`))
      return compilation?.ok ? compilation.reads.flatMap((read) => this.keysOf(read, row)) : []
    }
    const home = id.slice(0, id.indexOf('/'))
    return cycleReason(id, needs, (key) => {
      const [row, column] = key.split('/')
      const symbol = columns.find((candidate) => candidate.id === column)?.symbol ?? key
      return row === home ? symbol : `${symbol}@${rows.findIndex((candidate) => candidate.id === row) + 1}`
    })
  }

  private keysOf(read: Read, row: RowDefinition | undefined): string[] {
    if (read.kind === 'thing') return []
    if (read.row.at === 'all') return this.definition.rows.map((each) => cellKey(each.id, read.column))
    const id = read.row.at === 'row' ? read.row.row : read.row.at === 'from' ? row?.from : row?.id
    return id ? [cellKey(id, read.column)] : []
  }
}

const splitPlace = (id: string): [GraphSheet, number, number] => {
  const [sheet, row, col] = id.split('/')
  return [sheet as GraphSheet, Number(row), Number(col)]
}

const invert = (places: Places) => new Map([...places.entries()].map(([id, place]) => [place, id]))
