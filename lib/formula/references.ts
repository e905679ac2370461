import { Problem } from '@/lib/errors'
import { readUnit } from '@/lib/units'
import type { RowAst, Target } from './ast'
import { show } from './bind'
import { compiled } from './node'
import type { Compiled, Context } from './node'
import { indexed, meaningOf, rowsLabelled } from './names'
import { suggestion } from './nearest'
import type { ReferenceAst } from './reference-syntax'
import type { Read, RowRef, Scope, Type, Value, Vocabulary } from './types'
import { STARTS_FROM_NONE, fault, isFault } from './values'

/** A name: a column (of this row or another), a thing of the rig, or a word of the language. */
export function compileReference(ast: ReferenceAst, context: Context): Compiled {
  const found = resolve(ast.target, context)
  if (found.is !== 'column') {
    refuseRow(ast, context)
    return found.is === 'thing'
      ? reading({ kind: 'thing', thing: found.id }, found.type, ast, context)
      : compiled(context, ast.span, found.type, () => found.value)
  }
  const row = rowRef(ast.row, context)
  const type: Type = row.at === 'all' ? { kind: 'list', of: found.type } : found.type
  return reading({ kind: 'cell', column: found.id, row }, type, ast, context)
}

function refuseRow({ row, target }: ReferenceAst, { text, scope }: Context): void {
  if (!row) return
  const name = show(text.slice(target.span.from, target.span.to), scope)
  throw new Problem('name', `${name} is no column: only a column can be asked for another state`, row.span)
}

function reading(read: Read, type: Type, { span }: ReferenceAst, context: Context): Compiled {
  const { reads } = context
  const known = reads.findIndex((other) => JSON.stringify(other) === JSON.stringify(read))
  const index = known >= 0 ? known : reads.push(read) - 1
  const made: Compiled = compiled(context, span, type, ({ values }) => {
    const value = values[index]
    if (!isFault(value)) return value
    // a state that starts from none has no @from: that is said here, where it is asked for
    if (value === STARTS_FROM_NONE) return fault('state', `${made.words}: ${value.reason}`, span)
    return fault('dependency', `needs ${made.words}, which has an error`, span)
  })
  return made
}

type Resolved =
  | { readonly is: 'column'; readonly id: string; readonly type: Type }
  | { readonly is: 'thing'; readonly id: string; readonly type: Type }
  | { readonly is: 'word'; readonly type: Type; readonly value: Value }

function resolve(target: Target, context: Context): Resolved {
  return target.by === 'identity' ? byIdentity(target, context.scope) : byName(target, context)
}

/** An identity is never in doubt, but a name that two share is shown to whoever checks the formula: it is refused too. */
function byIdentity({ kind, id, span }: Extract<Target, { by: 'identity' }>, scope: Scope): Resolved {
  const { columns, things } = indexed(scope)
  const [type, name] =
    kind === 'column' ? [columns.get(id)?.type, columns.get(id)?.symbol] : [things.get(id)?.type, things.get(id)?.name]
  if (type === undefined || name === undefined) {
    const what = kind === 'column' ? 'the column' : 'the thing of the rig'
    throw new Problem('deleted', `${what} this formula read was deleted`, span)
  }
  const meaning = meaningOf(name, true, scope)
  if (meaning.is === 'ambiguous') throw new Problem('name', meaning.reason, span)
  return { is: kind, id, type }
}

function byName(target: Extract<Target, { by: 'name' }>, { scope, vocabulary }: Context): Resolved {
  const { name, bracketed, span } = target
  const meaning = meaningOf(name, bracketed, scope)
  const { columns, things } = indexed(scope)
  switch (meaning.is) {
    case 'column':
      return { is: 'column', id: meaning.id, type: columns.get(meaning.id)!.type }
    case 'thing':
      return { is: 'thing', id: meaning.id, type: things.get(meaning.id)!.type }
    case 'ambiguous':
      throw new Problem('name', meaning.reason, span)
    default: {
      const word = bracketed ? undefined : (vocabulary.words.get(name) ?? vocabulary.words.get(name.toLowerCase()))
      if (word) return { is: 'word', type: word.type, value: word.value }
      throw new Problem('name', unknownName(name, scope, vocabulary), span)
    }
  }
}

function unknownName(name: string, scope: Scope, vocabulary: Vocabulary): string {
  const unknown = `${name} is not known here`
  if (vocabulary.functions.has(name.toLowerCase())) return `${unknown} without arguments: write ${name}(…)`
  const known = [
    ...scope.columns.map(({ symbol }) => symbol),
    ...scope.things.map((thing) => thing.name),
    ...vocabulary.words.keys(),
  ]
  const meant = suggestion(name, known)
  if (!meant && readUnit(name)) return `${unknown}; a unit stands behind a number: 5 ${name}`
  return `${unknown}: no column, no thing of the rig and no word of the language is called so${meant}`
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
      const named = rowsLabelled(row.label, scope)
      if (named.length > 1)
        throw new Problem('name', `${named.length} states are called “${row.label}”: name it by its number`, row.span)
      if (named.length === 0) throw new Problem('name', `no state is called “${row.label}”`, row.span)
      return { at: 'row', row: named[0] }
    }
    case 'identity':
      if (!indexed(scope).rows.has(row.id)) {
        throw new Problem('deleted', 'the state this formula read was deleted', row.span)
      }
      return { at: 'row', row: row.id }
  }
}
