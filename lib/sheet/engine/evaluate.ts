import { bind } from '@/lib/formula'
import { formatQuantity, quantityOf } from '@/lib/units'
import { cellKey } from '../doc/definition'
import type { SheetDefinition } from '../doc/definition'
import { rigDefinition } from '../file'
import type { RigFile } from '../file'
import { scopeOf } from '../scope'
import { SheetEngine } from './engine'
import { VOCABULARY } from './vocabulary'

/** What one formula gives: a quantity in SI and as people read it, words, or an error with its reason. */
export type Evaluation =
  | { readonly si: number; readonly quantity: string; readonly shown: string }
  | { readonly text: string }
  | { readonly error: string }

const COLUMN = 'result'

/** Works out formulas that stand alone or name things of a rig, with the engine of the sheet. One result a formula. */
export function evaluateFormulas(formulas: readonly string[], rig: RigFile, licenseKey: string): Evaluation[] {
  const base = rigDefinition(rig)
  const scope = scopeOf(base)
  const rows = formulas.map((_, i) => ({ id: `r${i}`, label: '', from: null }))
  const definition: SheetDefinition = {
    ...base,
    columns: [
      {
        id: COLUMN,
        symbol: '',
        label: 'Result',
        quantity: 'any',
        unit: '',
        decimals: 0,
        formula: null,
        high: null,
        low: null,
        display: 'number',
        width: null,
        hidden: false,
      },
    ],
    rows,
    cells: new Map(
      formulas.map((formula, i) => [cellKey(rows[i].id, COLUMN), bind(formula.trim().replace(/^=/, ''), scope)]),
    ),
  }
  const engine = new SheetEngine(VOCABULARY, licenseKey)
  const { cells, ambient_Pa } = engine.update(definition)
  const results = rows.map((row): Evaluation => {
    const value = cells.get(cellKey(row.id, COLUMN)) ?? { kind: 'empty' }
    switch (value.kind) {
      case 'empty':
        return { error: 'there is no formula' }
      case 'error':
        return { error: value.reason }
      case 'number': {
        const type = engine.typeOf(row.id, COLUMN)
        const quantity =
          type?.kind === 'quantity' ? (quantityOf(type.dimension, type.scale)?.id ?? '') : 'dimensionless'
        return { si: value.si, quantity, shown: formatQuantity(value.si, { quantity, ambient_Pa }) }
      }
      case 'text':
        return { text: value.text }
      case 'logical':
        return { text: value.value ? 'yes' : 'no' }
      case 'thing':
        return { text: value.shown }
    }
  })
  engine.dispose()
  return results
}
