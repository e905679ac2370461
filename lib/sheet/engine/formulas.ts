import { compile, show } from '@/lib/formula'
import type { Compilation, Scope, Type, Vocabulary } from '@/lib/formula'

/** What a formula has to give, and the words for it in an error: "the column Pressure". */
export interface Wanted {
  readonly type: Type
  readonly words: string
}

export interface NumberedFormula {
  /** Changes when what the formula means or says changes; then its cells are worked out anew. */
  readonly k: number
  readonly compilation: Compilation
}

interface Entry extends NumberedFormula {
  readonly signature: string
}

interface Shelf {
  readonly wanted: Wanted
  /** By formula text. */
  readonly entries: Map<string, Entry>
}

/** Compiled formulas, one for each text and wish however many cells share it, under the numbers the graph knows. */
export class Formulas {
  private readonly shelves = new Map<string, Shelf>()
  private readonly byNumber = new Map<number, Compilation>()
  private next = 1
  private scope: Scope = { columns: [], rows: [], things: [] }

  constructor(private readonly vocabulary: Vocabulary) {}

  /** Names or types changed: what was compiled is compiled again, and numbered anew where that makes a difference. */
  setScope(scope: Scope): void {
    this.scope = scope
    for (const { wanted, entries } of this.shelves.values()) {
      for (const [source, entry] of entries) {
        const { compilation } = entry
        if (compilation.ok && compilation.literal && compilation.reads.length === 0) continue
        const fresh = this.compile(source, wanted)
        if (signature(fresh, scope) === entry.signature) {
          this.byNumber.set(entry.k, fresh)
          entries.set(source, { ...entry, compilation: fresh })
        } else {
          this.byNumber.delete(entry.k)
          entries.set(source, this.enter(fresh))
        }
      }
    }
  }

  /** Numbers everything anew, so that everything is worked out again. */
  renumber(): void {
    this.byNumber.clear()
    for (const { entries } of this.shelves.values()) {
      for (const [source, entry] of entries) entries.set(source, this.enter(entry.compilation))
    }
  }

  /** The formulas that have one wish in common, by their text: asked once for a column, then once for each cell. */
  wanting(wanted: Wanted): (source: string) => NumberedFormula {
    const id = `${wanted.words}\n${JSON.stringify(wanted.type)}`
    let shelf = this.shelves.get(id)
    if (!shelf) this.shelves.set(id, (shelf = { wanted, entries: new Map() }))
    const { entries } = shelf
    return (source) => {
      let entry = entries.get(source)
      if (!entry) entries.set(source, (entry = this.enter(this.compile(source, wanted))))
      return entry
    }
  }

  numbered(k: number): Compilation {
    const compilation = this.byNumber.get(k)
    if (!compilation) throw new Error(`no formula has the number ${k}`)
    return compilation
  }

  /** Forgets formulas that no cell uses any more. */
  keepOnly(used: ReadonlySet<number>): void {
    for (const { entries } of this.shelves.values()) {
      for (const [source, entry] of entries) {
        if (used.has(entry.k)) continue
        entries.delete(source)
        this.byNumber.delete(entry.k)
      }
    }
  }

  get size(): number {
    return this.byNumber.size
  }

  private compile(source: string, wanted: Wanted): Compilation {
    return compile(source, this.scope, this.vocabulary, { expected: wanted.type, expectedWords: wanted.words })
  }

  private enter(compilation: Compilation): Entry {
    const k = this.next++
    this.byNumber.set(k, compilation)
    return { k, compilation, signature: signature(compilation, this.scope) }
  }
}

/** All that can make the same text work out differently, or word its errors differently, under another scope. */
function signature(compilation: Compilation, scope: Scope): string {
  if (!compilation.ok) return JSON.stringify(compilation.fault)
  const reads = compilation.reads.map((read) => {
    if (read.kind === 'thing') return [read, scope.things.find((thing) => thing.id === read.thing)]
    // an error names the state it came from by its label, or by its number where another one has that label
    const named = read.row.at === 'row' && show(`$c:${read.column}@$r:${read.row.row}`, scope)
    return [read, scope.columns.find((column) => column.id === read.column), named]
  })
  return JSON.stringify([compilation.type, reads])
}
