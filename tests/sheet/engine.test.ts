import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { buildDemoSheet } from '@/lib/sheet/demo'
import * as commands from '@/lib/sheet/doc/commands'
import { cellKey } from '@/lib/sheet/doc/definition'
import type { SheetDefinition } from '@/lib/sheet/doc/definition'
import { readSheet } from '@/lib/sheet/doc/read'
import { SheetEngine } from '@/lib/sheet/engine/engine'
import { VOCABULARY } from '@/lib/sheet/engine/vocabulary'
import type { CellValue, ValueChanges } from '@/lib/sheet/values'

const LICENSE = 'gpl-v3'

/** What an engine has said so far about the cells and things that are still there. */
class Heard {
  private readonly cells = new Map<string, CellValue>()
  private readonly things = new Map<string, CellValue>()

  take({ cells, things }: ValueChanges) {
    for (const [key, value] of cells) this.cells.set(key, value)
    for (const [id, value] of things) this.things.set(id, value)
  }

  of(definition: SheetDefinition): Record<string, CellValue> {
    const empty: CellValue = { kind: 'empty' }
    const keys = definition.rows.flatMap((row) => definition.columns.map((column) => cellKey(row.id, column.id)))
    return Object.fromEntries([
      ...keys.map((key) => [key, this.cells.get(key) ?? empty] as const),
      ...definition.rig.map((thing) => [thing.id, this.things.get(thing.id) ?? empty] as const),
    ])
  }
}

function fromScratch(definition: SheetDefinition) {
  const engine = new SheetEngine(VOCABULARY, LICENSE)
  const heard = new Heard()
  heard.take(engine.update(definition))
  engine.dispose()
  return heard.of(definition)
}

/** A small sheet whose formulas are cheap: the point is what reads what. */
function cheapSheet() {
  const doc = new Y.Doc()
  const gas = commands.addThing(doc, { section: 'gas', name: 'G', make: 'gas', arguments: { fluid: 'nitrogen' } })
  const a = commands.addColumn(doc, { symbol: 'a', label: 'a', quantity: 'pressure', unit: 'bar' })
  const b = commands.addColumn(doc, {
    symbol: 'b',
    label: 'b',
    quantity: 'pressure',
    unit: 'bar',
    formula: `$c:${a} * 2 + $c:${a}@from`,
  })
  const c = commands.addColumn(doc, {
    symbol: 'c',
    label: 'c',
    quantity: 'density',
    unit: 'kg/m³',
    formula: `density($t:${gas}, p: $c:${b}, T: 300 K)`,
  })
  const d = commands.addColumn(doc, {
    symbol: 'd',
    label: 'd',
    quantity: 'pressure',
    unit: 'bar',
    formula: `sum($c:${a}@all)`,
  })
  const rows = ['one', 'two', 'three'].map((label) => commands.addRow(doc, { label }))
  rows.forEach((row, i) => {
    commands.setCell(doc, row, a, `${i + 1} bar`)
    if (i > 0) commands.setRow(doc, row, { from: rows[i - 1] })
  })
  return { doc, gas, columns: [a, b, c, d], rows }
}

type Sheet = ReturnType<typeof cheapSheet>

/** Edits by number, so that a failing sequence shrinks: which, where, what. */
const step = fc.tuple(fc.nat(13), fc.nat(20), fc.nat(20))

function apply({ doc, gas, columns }: Sheet, [which, where, what]: readonly [number, number, number]) {
  const definition = readSheet(doc)
  const pick = <T>(list: readonly T[], n: number): T | undefined => list[n % Math.max(1, list.length)]
  const row = pick(definition.rows, where)?.id
  const other = pick(definition.rows, what)?.id ?? null
  const column = pick(definition.columns, what)
  switch (which) {
    case 0:
      return row && commands.setCell(doc, row, columns[0], `${what} bar`)
    case 1:
      return row && column && commands.clearCell(doc, row, column.id)
    case 2:
      return commands.addRow(doc, { label: `row ${what}`, from: other, after: row ?? null })
    case 3:
      return row && definition.rows.length > 1 && commands.removeRow(doc, row)
    case 4:
      return row && commands.setRow(doc, row, { from: what % 3 === 0 ? null : other })
    case 5:
      return row && commands.moveRow(doc, row, { after: other })
    case 6:
      return row && commands.branchRow(doc, row, 'twin')
    case 7:
      return column && commands.updateColumn(doc, column.id, { symbol: ['a', 'x', 'b', 'y2'][where % 4] })
    case 8:
      return commands.updateColumn(doc, columns[1], {
        formula: [`$c:${columns[0]}`, `$c:${columns[0]}@from`, `$c:${columns[3]}`, `$c:${columns[1]}`][where % 4],
      })
    case 9:
      return row && commands.setCell(doc, row, columns[1], other ? `$c:${columns[1]}@$r:${other}` : '1 bar')
    case 10:
      return commands.updateThing(doc, gas, {
        arguments: { fluid: ['nitrogen', 'helium', 'nothing', '"CO2"'][where % 4] },
      })
    case 11:
      return where % 5 === 0 ? commands.removeThing(doc, gas) : commands.updateThing(doc, gas, { name: `G${what % 2}` })
    case 12:
      return where % 4 === 0 && column && commands.removeColumn(doc, column.id)
    default:
      return commands.updateColumn(doc, columns[0], { quantity: where % 2 === 0 ? 'pressure' : 'mass' })
  }
}

describe('a sheet that is edited', () => {
  it('should equal one that is built from scratch, whatever was done to it', () => {
    fc.assert(
      fc.property(fc.array(step, { minLength: 1, maxLength: 12 }), (steps) => {
        const sheet = cheapSheet()
        const engine = new SheetEngine(VOCABULARY, LICENSE)
        const heard = new Heard()
        heard.take(engine.update(readSheet(sheet.doc)))
        for (const one of steps) {
          apply(sheet, one)
          heard.take(engine.update(readSheet(sheet.doc)))
        }
        const definition = readSheet(sheet.doc)
        expect(heard.of(definition)).toEqual(fromScratch(definition))
        engine.dispose()
      }),
      { numRuns: process.env.SOAK ? 5_000 : 150 },
    )
  })

  it('should say nothing of cells that a change does not touch', () => {
    const { doc, columns, rows } = cheapSheet()
    const engine = new SheetEngine(VOCABULARY, LICENSE)
    engine.update(readSheet(doc))
    commands.setCell(doc, rows[2], columns[0], '9 bar')
    const touched = [...engine.update(readSheet(doc)).cells.keys()]
    // its own formulas, and the sum over the column in every state; no state starts from the last
    const expected = [
      ...[0, 1, 2].map((i) => cellKey(rows[2], columns[i])),
      ...rows.map((row) => cellKey(row, columns[3])),
    ]
    expect(touched.sort()).toEqual(expected.sort())
    commands.moveRow(doc, rows[2], { after: null })
    expect(engine.update(readSheet(doc)).cells.size).toBe(0)
  })

  it('should name the ring where cells need one another', () => {
    const { doc, columns, rows } = cheapSheet()
    commands.setCell(doc, rows[0], columns[0], `$c:${columns[1]}`)
    const values = fromScratch(readSheet(doc))
    expect(values[cellKey(rows[0], columns[0])]).toMatchObject({
      kind: 'error',
      code: 'cycle',
      reason: 'cycle: a needs b, b needs a',
    })
    expect(values[cellKey(rows[2], columns[0])]).toEqual({ kind: 'number', si: 3e5 })
  })

  it('should say that what a formula read was deleted', () => {
    const { doc, columns, rows } = cheapSheet()
    commands.setCell(doc, rows[2], columns[0], `$c:${columns[0]}@$r:${rows[0]}`)
    commands.removeRow(doc, rows[0])
    expect(fromScratch(readSheet(doc))[cellKey(rows[2], columns[0])]).toMatchObject({
      code: 'deleted',
      reason: 'the state this formula read was deleted',
    })
  })
})

describe('the demo', () => {
  it('should work out without an error, a quick fill hotter than a slow one', () => {
    const doc = new Y.Doc()
    Y.applyUpdate(doc, buildDemoSheet())
    const definition = readSheet(doc)
    const values = fromScratch(definition)
    expect(Object.values(values).filter((value) => value.kind === 'error')).toEqual([])
    const at = (label: string, symbol: string) => {
      const row = definition.rows.find((each) => each.label === label)!.id
      const value = values[cellKey(row, definition.columns.find((each) => each.symbol === symbol)!.id)]
      return value.kind === 'number' ? value.si : NaN
    }
    expect(at('Fill quick', 'T_peak')).toBeGreaterThan(at('Fill slow', 'T_peak'))
    expect(at('Fill quick', 'm')).toBeLessThan(at('Fill slow', 'm'))
    expect(at('Let down', 'T_low')).toBeLessThan(273.15)
    expect(at('Fill quick', 'p')).toBeCloseTo(200e5, 0)
  })
})

describe('a mistake of ours in one function', () => {
  it('should leave the rest of the sheet working, and be heard of', () => {
    const broken = new Map(VOCABULARY.functions)
    broken.set('density', {
      ...VOCABULARY.functions.get('density')!,
      evaluate: () => {
        throw new TypeError('undefined is no fluid')
      },
    })
    const heard: unknown[] = []
    const { doc, columns, rows } = cheapSheet()
    const engine = new SheetEngine({ ...VOCABULARY, functions: broken }, LICENSE, (mistake) => heard.push(mistake))
    const { cells } = engine.update(readSheet(doc))
    expect(cells.get(cellKey(rows[1], columns[2]))).toMatchObject({
      kind: 'error',
      reason: expect.stringContaining('our mistake') as string,
    })
    expect(cells.get(cellKey(rows[1], columns[1]))).toEqual({ kind: 'number', si: 5e5 })
    expect(heard[0]).toBeInstanceOf(TypeError)
  })
})
