import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import * as commands from '@/lib/sheet/doc/commands'
import { cellKey } from '@/lib/sheet/doc/definition'
import { sheetParts } from '@/lib/sheet/doc/document'
import { readSheet } from '@/lib/sheet/doc/read'

const pressure = { symbol: 'p', label: 'Pressure', quantity: 'pressure', unit: 'bar' }

function sheetWithRows(...labels: string[]) {
  const doc = new Y.Doc()
  const ids = labels.map((label) => commands.addRow(doc, { label }))
  return { doc, ids }
}

const labels = (doc: Y.Doc) => readSheet(doc).rows.map((row) => row.label)

describe('the order of states', () => {
  it('should put a new state last, first, or after the one that is named', () => {
    const { doc, ids } = sheetWithRows('a', 'b')
    commands.addRow(doc, { label: 'c' })
    commands.addRow(doc, { label: 'first', after: null })
    commands.addRow(doc, { label: 'after a', after: ids[0] })
    expect(labels(doc)).toEqual(['first', 'a', 'after a', 'b', 'c'])
  })

  it('should move a state without touching the others', () => {
    const { doc, ids } = sheetWithRows('a', 'b', 'c')
    commands.moveRow(doc, ids[2], { after: null })
    commands.moveRow(doc, ids[0], { after: ids[1] })
    expect(labels(doc)).toEqual(['c', 'b', 'a'])
  })

  it('should keep to a list that is moved about in the same way', () => {
    fc.assert(
      fc.property(fc.array(fc.tuple(fc.nat(6), fc.nat(6)), { maxLength: 40 }), (moves) => {
        const { doc, ids } = sheetWithRows('0', '1', '2', '3', '4', '5', '6')
        const model = [...ids]
        for (const [what, where] of moves) {
          const id = ids[what]
          const rest = model.filter((other) => other !== id)
          const after = where === 0 ? null : rest[Math.min(where, rest.length) - 1]
          commands.moveRow(doc, id, { after })
          model.splice(0, model.length, ...rest)
          model.splice(after === null ? 0 : rest.indexOf(after) + 1, 0, id)
        }
        expect(readSheet(doc).rows.map((row) => row.id)).toEqual(model)
      }),
    )
  })

  it('should agree between two people who inserted at the same place at the same moment', () => {
    const { doc, ids } = sheetWithRows('a', 'b')
    const other = new Y.Doc()
    Y.applyUpdate(other, Y.encodeStateAsUpdate(doc))
    commands.addRow(doc, { label: 'mine', after: ids[0] })
    commands.addRow(other, { label: 'yours', after: ids[0] })
    Y.applyUpdate(other, Y.encodeStateAsUpdate(doc))
    Y.applyUpdate(doc, Y.encodeStateAsUpdate(other))
    expect(labels(doc)).toEqual(labels(other))
    expect(new Set(labels(doc))).toEqual(new Set(['a', 'mine', 'yours', 'b']))
    // and the next one still finds a place between them
    commands.addRow(doc, { label: 'later', after: readSheet(doc).rows[1].id })
    expect(labels(doc)).toHaveLength(5)
  })
})

describe('cells, states and columns', () => {
  it('should take a removed state out with its cells, and leave those that started from it on their own', () => {
    const { doc, ids } = sheetWithRows('start', 'fill')
    commands.setRow(doc, ids[1], { from: ids[0] })
    const column = commands.addColumn(doc, pressure)
    commands.setCell(doc, ids[0], column, '5 bar')
    commands.removeRow(doc, ids[0])
    expect(readSheet(doc).rows).toEqual([{ id: ids[1], label: 'fill', from: null }])
    expect(sheetParts(doc).cells.size).toBe(0)
  })

  it('should branch a state into a sibling that says the same', () => {
    const { doc, ids } = sheetWithRows('start', 'fill')
    commands.setRow(doc, ids[1], { from: ids[0] })
    const column = commands.addColumn(doc, pressure)
    commands.setCell(doc, ids[1], column, '200 bar')
    const twin = commands.branchRow(doc, ids[1], 'fill, smaller orifice')
    const sheet = readSheet(doc)
    expect(sheet.rows.map((row) => row.label)).toEqual(['start', 'fill', 'fill, smaller orifice'])
    expect(sheet.rows[2].from).toBe(ids[0])
    expect(sheet.cells.get(cellKey(twin, column))).toBe('200 bar')
  })

  it('should keep what two people did to different fields of one thing', () => {
    const doc = new Y.Doc()
    const id = commands.addThing(doc, { section: 'vessel', name: 'A1', make: 'vessel', arguments: { volume: '50 L' } })
    const other = new Y.Doc()
    Y.applyUpdate(other, Y.encodeStateAsUpdate(doc))
    commands.updateThing(doc, id, { arguments: { volume: '55 L' } })
    commands.updateThing(other, id, { name: 'A1 north', arguments: { volume: '50 L', p_high: '250 bar' } })
    Y.applyUpdate(doc, Y.encodeStateAsUpdate(other))
    expect(readSheet(doc).rig[0]).toMatchObject({ name: 'A1 north', arguments: { volume: '55 L', p_high: '250 bar' } })
  })
})

describe('what others may have written', () => {
  it('should start neither of two states that start from one another', () => {
    const { doc, ids } = sheetWithRows('a', 'b', 'c')
    commands.setRow(doc, ids[0], { from: ids[1] })
    commands.setRow(doc, ids[1], { from: ids[0] })
    commands.setRow(doc, ids[2], { from: ids[1] })
    expect(readSheet(doc).rows.map((row) => row.from)).toEqual([null, null, ids[1]])
  })

  it('should read any content without a throw, and nothing foreign into the sheet', () => {
    const value = fc.oneof(
      fc.string(),
      fc.integer(),
      fc.boolean(),
      fc.constant(null),
      fc.array(fc.string()),
      fc.dictionary(fc.string(), fc.string(), { noNullPrototype: true }),
    )
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.constantFrom('rig', 'columns', 'rows', 'cells'), fc.string(), value)),
        (writes) => {
          const doc = new Y.Doc()
          for (const [map, key, content] of writes) doc.getMap(map).set(key, content)
          expect(readSheet(doc)).toEqual({ rig: [], columns: [], rows: [], cells: new Map() })
        },
      ),
    )
  })
})
