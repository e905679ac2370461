import { Problem } from '@/lib/errors'
import type { Ast, RowAst, Target } from './ast'
import type { Compiled, Context } from './compile'
import { show } from './bind'
import { meaningOf } from './names'
import type { Read, RowRef, Type, Value } from './types'
import { STARTS_FROM_NONE, fault, isFault } from './values'

type ReferenceAst = Extract<Ast, { type: 'reference' }>

/** A name: a column (of this row or another), a thing of the rig, or a word of the language. */
export function compileReference(ast: ReferenceAst, context: Context): Compiled {
  const found = resolve(ast.target, context)
  const { span } = ast
  const words = show(context.text.slice(span.from, span.to), context.scope)
  if (found.is === 'word') {
    refuseRow(ast.row, words)
    return { type: found.type, run: () => found.value, words, span }
  }
  if (found.is === 'thing') {
    refuseRow(ast.row, words)
    return reading({ kind: 'thing', thing: found.id }, found.type, words, ast, context)
  }
  const row = rowRef(ast.row, context)
  const type: Type = row.at === 'all' ? { kind: 'list', of: found.type } : found.type
  return reading({ kind: 'cell', column: found.id, row }, type, words, ast, context)
}

function reading(read: Read, type: Type, words: string, { span }: ReferenceAst, { reads }: Context): Compiled {
  const known = reads.findIndex((other) => JSON.stringify(other) === JSON.stringify(read))
  const index = known >= 0 ? known : reads.push(read) - 1
  const run = ({ values }: { readonly values: readonly Value[] }): Value => {
    const value = values[index]
    if (value === null || !isFault(value)) return value
    // a state that starts from none has no @from: that is said here, where it is asked for
    if (value === STARTS_FROM_NONE) return fault('state', `${words}: ${value.reason}`, span)
    return fault('dependency', `needs ${words}, which has an error`, span)
  }
  return { type, run, words, span }
}

function refuseRow(row: RowAst | null, words: string): void {
  if (row) throw new Problem('name', `${words}: only a column can be asked for another state`, row.span)
}

type Resolved =
  | { readonly is: 'column' | 'thing'; readonly id: string; readonly type: Type }
  | { readonly is: 'word'; readonly type: Type; readonly value: Value }

function resolve(target: Target, { scope, vocabulary }: Context): Resolved {
  if (target.by === 'identity') {
    const { kind, id, span } = target
    const list: readonly { id: string; type: Type }[] = kind === 'column' ? scope.columns : scope.things
    const item = list.find((candidate) => candidate.id === id)
    if (!item)
      throw new Problem(
        'deleted',
        `the ${kind === 'column' ? 'column' : 'thing of the rig'} this formula read was deleted`,
        span,
      )
    const name =
      kind === 'column'
        ? scope.columns.find((column) => column.id === id)!.symbol
        : scope.things.find((thing) => thing.id === id)!.name
    const meaning = meaningOf(name, scope)
    if (meaning.is === 'ambiguous') throw new Problem('name', meaning.reason, span)
    return { is: kind, id, type: item.type }
  }
  const meaning = meaningOf(target.name, scope)
  switch (meaning.is) {
    case 'column':
      return { is: 'column', id: meaning.id, type: scope.columns.find((column) => column.id === meaning.id)!.type }
    case 'thing':
      return { is: 'thing', id: meaning.id, type: scope.things.find((thing) => thing.id === meaning.id)!.type }
    case 'ambiguous':
      throw new Problem('name', meaning.reason, target.span)
    case 'nothing': {
      const word = vocabulary.words.get(target.name) ?? vocabulary.words.get(target.name.toLowerCase())
      if (word) return { is: 'word', type: word.type, value: word.value }
      if (/^deleted \$/.test(target.name))
        throw new Problem('deleted', 'what this formula read was deleted', target.span)
      throw new Problem(
        'name',
        `${target.name} is not known here: no column, no thing of the rig and no word of the language is called so`,
        target.span,
      )
    }
  }
}

function rowRef(row: RowAst | null, { scope }: Context): RowRef {
  if (!row) return { at: 'self' }
  switch (row.at) {
    case 'from':
    case 'all':
      return { at: row.at }
    case 'number': {
      const found = scope.rows[row.number - 1]
      if (!found) throw new Problem('name', `there is no state ${row.number}`, row.span)
      return { at: 'row', row: found.id }
    }
    case 'label': {
      const named = scope.rows.filter((candidate) => candidate.label === row.label)
      if (named.length > 1)
        throw new Problem('name', `${named.length} states are called “${row.label}”: name it by its number`, row.span)
      if (named.length === 0) throw new Problem('name', `no state is called “${row.label}”`, row.span)
      return { at: 'row', row: named[0].id }
    }
    case 'identity':
      if (!scope.rows.some((candidate) => candidate.id === row.id)) {
        throw new Problem('deleted', 'the state this formula read was deleted', row.span)
      }
      return { at: 'row', row: row.id }
  }
}
