import type { Scope } from './types'

/** What a name stands for in a sheet, or why it stands for nothing. */
export type Meaning =
  | { readonly is: 'column' | 'thing'; readonly id: string }
  | { readonly is: 'nothing' }
  | { readonly is: 'ambiguous'; readonly reason: string }

/**
 * Columns and rig things share one space of names, and the sheet's own names go before the words of the language. A name
 * that two of them carry means neither: it is refused, not guessed.
 */
export function meaningOf(name: string, scope: Scope): Meaning {
  const columns = scope.columns.filter((column) => column.symbol === name)
  const things = scope.things.filter((thing) => thing.name === name)
  const found = [
    ...columns.map(({ id }) => ({ is: 'column' as const, id })),
    ...things.map(({ id }) => ({ is: 'thing' as const, id })),
  ]
  if (found.length === 0) return { is: 'nothing' }
  if (found.length === 1) return found[0]
  return { is: 'ambiguous', reason: sharedName(name, columns.length, things.length) }
}

function sharedName(name: string, columns: number, things: number): string {
  const who =
    things === 0
      ? 'two columns are'
      : columns === 0
        ? 'two things of the rig are'
        : 'a column and a thing of the rig are'
  return `${who} called ${name}: rename one of them`
}

const PLAIN = /^[\p{L}_][\p{L}_0-9]*$/u

/** A name as a formula writes it: in brackets where it is no plain word. */
export const written = (name: string): string => (PLAIN.test(name) ? name : `[${name}]`)
