import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { buildDemoSheet } from '@/lib/sheet/demo'
import { readSheet } from '@/lib/sheet/doc/read'
import { evaluateFormulas } from '@/lib/sheet/engine/evaluate'
import { fillDocument, sheetFile } from '@/lib/sheet/file'

function demo() {
  const doc = new Y.Doc()
  Y.applyUpdate(doc, buildDemoSheet())
  return sheetFile(readSheet(doc))
}

describe('a sheet as a file', () => {
  it('should come out of a document as it went in', () => {
    const file = demo()
    const copy = new Y.Doc()
    fillDocument(copy, file)
    expect(sheetFile(readSheet(copy))).toEqual(file)
    expect(file.rows[2]).toMatchObject({ label: 'Fill quick', from: 1, cells: { s: '[Header H]', p_to: '200 bar' } })
  })

  it('should hold no identity of the document, and survive JSON', () => {
    const text = JSON.stringify(demo())
    expect(text).not.toMatch(/\$[ctr]:/)
    const copy = new Y.Doc()
    fillDocument(copy, JSON.parse(text))
    expect(sheetFile(readSheet(copy))).toEqual(demo())
  })

  it('should lend its rig to formulas that are tried without the sheet', () => {
    const [peak, missing] = evaluateFormulas(
      [
        'charge(from: start(A1, N2, p: 5 bar, T: 18 °C), supply: [Header H], through: [Orifice O], until_p: 200 bar).T_peak > A1.shell_high',
        '[Header K].p',
      ],
      demo().rig,
      'gpl-v3',
    )
    expect(peak).toEqual({ text: 'yes' })
    expect(missing).toHaveProperty('error')
  })

  it('should refuse a file that is none, with the place of the mistake', () => {
    expect(() => fillDocument(new Y.Doc(), { ...demo(), version: 2 } as never)).toThrow(/version/)
  })
})
