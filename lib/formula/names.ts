import type { Scope, Vocabulary } from './types'

/** What a name stands for in a sheet, or why it stands for nothing. */
export type Meaning =
  | { readonly is: 'column' | 'thing'; readonly id: string }
  | { readonly is: 'word' }
  | { readonly is: 'nothing' }
  | { readonly is: 'ambiguous'; readonly reason: string }

type Named = Extract<Meaning, { is: 'column' | 'thing' }>

/** A sheet's names, looked up from both sides. */
interface ScopeIndex {
  readonly meanings: ReadonlyMap<string, readonly Named[]>
  readonly columns: ReadonlyMap<string, Scope['columns'][number]>
  readonly things: ReadonlyMap<string, Scope['things'][number]>
  /** Row ids by label. */
  readonly labels: ReadonlyMap<string, readonly string[]>
  /** Places by row id, from 0. */
  readonly rows: ReadonlyMap<string, number>
}

const indices = new WeakMap<Scope, ScopeIndex>()

export function indexed(scope: Scope): ScopeIndex {
  let index = indices.get(scope)
  if (!index) indices.set(scope, (index = makeIndex(scope)))
  return index
}

function makeIndex({ columns, rows, things }: Scope): ScopeIndex {
  const named: readonly (readonly [string, Named])[] = [
    ...columns.map(({ id, symbol }) => [tidy(symbol), { is: 'column', id }] as const),
    ...things.map(({ id, name }) => [tidy(name), { is: 'thing', id }] as const),
  ]
  return {
    meanings: grouped(named),
    columns: new Map(columns.map((column) => [column.id, column])),
    things: new Map(things.map((thing) => [thing.id, thing])),
    labels: grouped(rows.map(({ id, label }) => [tidy(label), id] as const)),
    rows: new Map(rows.map(({ id }, place) => [id, place])),
  }
}

function grouped<T>(entries: readonly (readonly [string, T])[]): ReadonlyMap<string, readonly T[]> {
  const groups = new Map<string, T[]>()
  for (const [key, value] of entries) groups.set(key, [...(groups.get(key) ?? []), value])
  return groups
}

/** Two spellings of one letter, and blanks around a name, make no difference. */
const tidy = (name: string) => name.normalize('NFC').trim()

export const rowsLabelled = (label: string, scope: Scope): readonly string[] =>
  indexed(scope).labels.get(tidy(label)) ?? []

/**
 * Columns and rig things share one space of names. A name that two of them carry means neither: it is refused, not
 * guessed. The words of the language go before the sheet's own names, unless the name is in brackets.
 */
export function meaningOf(name: string, bracketed: boolean, scope: Scope): Meaning {
  if (!bracketed && scope.words?.has(name)) return { is: 'word' }
  const key = tidy(name)
  const found = key === '' ? [] : (indexed(scope).meanings.get(key) ?? [])
  if (found.length === 0) return { is: 'nothing' }
  return found.length === 1 ? found[0] : { is: 'ambiguous', reason: sharedName(key, found) }
}

function sharedName(name: string, found: readonly Named[]): string {
  const kinds = new Set(found.map(({ is }) => is))
  const number = found.length === 2 ? 'two' : String(found.length)
  const who =
    kinds.size === 2
      ? 'a column and a thing of the rig are'
      : `${number} ${kinds.has('column') ? 'columns' : 'things of the rig'} are`
  return `${who} called ${name}: rename one of them`
}

/** Every bare word that the language gives a meaning of its own, for `Scope.words`. */
export function reservedWords(vocabulary: Vocabulary): ReadonlySet<string> {
  const choices = [...vocabulary.functions.values()].flatMap((spec) =>
    spec.parameters.flatMap((parameter) => parameter.choices ?? []),
  )
  return new Set([...vocabulary.words.keys(), ...choices])
}

/** What the grammar takes for an identifier: the letters of its token, then letters and digits. */
const LETTERS = String.raw`A-Za-z_\u00aa\u00b5\u00ba\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u02af\u0300-\u036f\u0370-\u1fff\u2126\u2c00-\ud7ff\uf900-\ufdcf\ufdf0-\ufffd`
const PLAIN = new RegExp(`^[${LETTERS}][${LETTERS}0-9]*$`)

/** A name as a formula writes it: in brackets where it is no plain word, or a word of the language. */
export const written = (name: string, words?: ReadonlySet<string>): string =>
  PLAIN.test(name) && !words?.has(name) ? name : bracketed(name)

export const bracketed = (name: string): string => `[${name.replaceAll(']', ']]')}]`
