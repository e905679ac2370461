import type { Span } from '@/lib/errors'
import { children } from './ast'
import type { Ast, RowAst, Target } from './ast'
import { meaningOf, written } from './names'
import { parse } from './parse'
import type { Scope } from './types'

/*
 * Formulas are kept with identities where people see names: `$c:ID` a column, `$t:ID` a rig thing, `$r:ID` a state behind
 * an @. So renaming, moving and inserting change no formula. All else of the text stays as it was written.
 */

/** From what a person wrote to what is kept. Names that mean nothing, or two things, stay as they are. */
export function bind(text: string, scope: Scope): string {
  return rewrite(
    text,
    (target) => identityOf(target, scope),
    (row) => rowIdentity(row, scope),
  )
}

/** From what is kept to today's names. What was deleted is shown as such, and bound again to the same identity. */
export function show(text: string, scope: Scope): string {
  return rewrite(
    text,
    (target) => nameOf(target, scope),
    (row) => rowName(row, scope),
  )
}

function rewrite(
  text: string,
  forTarget: (target: Target) => string | null,
  forRow: (row: RowAst) => string | null,
): string {
  const { ast } = parse(text)
  if (!ast) return text
  const changes: { span: Span; text: string }[] = []
  const add = (span: Span, replacement: string | null) => {
    if (replacement !== null) changes.push({ span, text: replacement })
  }
  const walk = (node: Ast): void => {
    if (node.type === 'reference') {
      add(node.target.span, forTarget(node.target))
      if (node.row) add(node.row.span, forRow(node.row))
    }
    children(node).forEach(walk)
  }
  walk(ast)
  changes.sort((a, b) => b.span.from - a.span.from)
  return changes.reduce((so, change) => so.slice(0, change.span.from) + change.text + so.slice(change.span.to), text)
}

const DELETED = /^deleted (\$[ctr]:[A-Za-z0-9_-]+)$/

function identityOf(target: Target, scope: Scope): string | null {
  if (target.by === 'identity') return null
  const deleted = DELETED.exec(target.name)
  if (deleted) return deleted[1]
  const meaning = meaningOf(target.name, scope)
  if (meaning.is === 'column') return `$c:${meaning.id}`
  return meaning.is === 'thing' ? `$t:${meaning.id}` : null
}

function nameOf(target: Target, scope: Scope): string | null {
  if (target.by === 'name') return null
  const { kind, id } = target
  const name =
    kind === 'column'
      ? scope.columns.find((column) => column.id === id)?.symbol
      : scope.things.find((thing) => thing.id === id)?.name
  return name ? written(name) : `[deleted $${kind === 'column' ? 'c' : 't'}:${id}]`
}

function rowIdentity(row: RowAst, scope: Scope): string | null {
  if (row.at === 'number') {
    const found = scope.rows[row.number - 1]
    return found ? `@$r:${found.id}` : null
  }
  if (row.at !== 'label') return null
  const deleted = DELETED.exec(row.label)
  if (deleted) return `@${deleted[1]}`
  const named = scope.rows.filter((candidate) => candidate.label === row.label)
  return named.length === 1 ? `@$r:${named[0].id}` : null
}

function rowName(row: RowAst, scope: Scope): string | null {
  if (row.at !== 'identity') return null
  const index = scope.rows.findIndex((candidate) => candidate.id === row.id)
  return index < 0 ? `@[deleted $r:${row.id}]` : `@${index + 1}`
}
