import { reservedWords } from '@/lib/formula'
import type { Scope } from '@/lib/formula'
import type { SheetDefinition } from './doc/definition'
import { VOCABULARY } from './engine/vocabulary'
import { columnType, sectionType } from './types'

const WORDS = reservedWords(VOCABULARY)

/** What names mean in a sheet as it stands. */
export function scopeOf(definition: SheetDefinition): Scope {
  return {
    columns: definition.columns.map(({ id, symbol, quantity }) => ({ id, symbol, type: columnType(quantity) })),
    rows: definition.rows.map(({ id, label }) => ({ id, label })),
    things: definition.rig.map(({ id, name, section }) => ({ id, name, type: sectionType(section) })),
    words: WORDS,
  }
}
