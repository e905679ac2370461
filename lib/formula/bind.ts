import type { SyntaxNode } from '@lezer/common'
import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import type { RowAst, Target } from './ast'
import { bracketed, indexed, meaningOf, rowsLabelled, written } from './names'
import { parser } from './parser'
import { tooMuch } from './parse'
import { referenceAst } from './reference-syntax'
import type { ReferenceAst } from './reference-syntax'
import type { Scope } from './types'

/*
 * Formulas are kept with identities where people see names: `$c:ID` a column, `$t:ID` a rig thing, `$r:ID` a state behind
 * an @. So renaming, moving and inserting change no formula. All else of the text stays as it was written.
 */

/** From what a person wrote to what is kept. Names that mean nothing, or two things, stay as they are. */
export function bind(text: string, scope: Scope): string {
  const { changes, broken } = rewriting(text, binding(scope))
  const bound = applied(text, changes)
  return !broken || changed(changed(bound, showing(scope)), binding(scope)) === bound ? bound : text
}

/** From what is kept to today's names, such that binding them gives the same again. */
export function show(text: string, scope: Scope): string {
  const { changes, broken } = rewriting(text, showing(scope))
  const shown = applied(text, changes)
  return !broken || changed(shown, binding(scope)) === text ? shown : text
}

/** Where a stretch of a kept formula stands when that is shown. */
export function shownSpan(text: string, span: Span, scope: Scope): Span {
  const made = rewriting(text, showing(scope)).changes
  const moved = (place: number, end: boolean) =>
    made.reduce((so, { span: { from, to }, text: put }) => {
      if (place >= to) return so + put.length - (to - from)
      return place > from ? so + (end ? put.length : 0) - (place - from) : so
    }, place)
  return { from: moved(span.from, false), to: moved(span.to, true) }
}

interface Renaming {
  readonly target: (target: Target) => string | null
  readonly row: (row: RowAst) => string | null
}

interface Change {
  readonly span: Span
  readonly text: string
}

/**
 * What would be put where, in the order of the text. Names are followed in a broken formula too, but there whoever
 * rewrites it has to see to it that it comes back as the same text.
 */
function rewriting(
  text: string,
  renaming: Renaming,
): { readonly changes: readonly Change[]; readonly broken: boolean } {
  const changes: Change[] = []
  const put = (span: Span, replacement: string | null) => {
    if (replacement !== null && replacement !== text.slice(span.from, span.to))
      changes.push({ span, text: replacement })
  }
  const { references, broken } = referencesIn(text)
  for (const { target, row } of references) {
    put(target.span, renaming.target(target))
    if (row) put(row.span, renaming.row(row))
  }
  return { changes, broken }
}

function referencesIn(text: string): { readonly references: readonly ReferenceAst[]; readonly broken: boolean } {
  const references: ReferenceAst[] = []
  if (tooMuch(text)) return { references, broken: true }
  let broken = false
  parser.parse(text).iterate({
    enter: ({ name, type, node }) => {
      broken ||= type.isError
      if (name !== 'Reference' || hasError(node)) return
      try {
        references.push(referenceAst(node, text))
      } catch (mistake) {
        if (!(mistake instanceof Problem)) throw mistake
      }
    },
  })
  return { references, broken }
}

function hasError(node: SyntaxNode): boolean {
  for (let child = node.firstChild; child; child = child.nextSibling)
    if (child.type.isError || hasError(child)) return true
  return false
}

const changed = (text: string, renaming: Renaming) => applied(text, rewriting(text, renaming).changes)

function applied(text: string, made: readonly Change[]): string {
  let done = ''
  let from = 0
  for (const change of made) {
    done += text.slice(from, change.span.from) + change.text
    from = change.span.to
  }
  return done + text.slice(from)
}

const isToken = (id: string) => /^[A-Za-z0-9_]+$/.test(id)

const binding = (scope: Scope): Renaming => ({
  target: (target) => {
    if (target.by === 'identity') return token(target)
    const meaning = meaningOf(target.name, target.bracketed, scope)
    if (meaning.is !== 'column' && meaning.is !== 'thing') return null
    return isToken(meaning.id) ? token({ kind: meaning.is, id: meaning.id }) : null
  },
  row: (row) => {
    const id = rowIdentity(row, scope)
    return id !== undefined && isToken(id) ? `@$r:${id}` : null
  },
})

const token = ({ kind, id }: { readonly kind: 'column' | 'thing'; readonly id: string }) =>
  `$${kind === 'column' ? 'c' : 't'}:${id}`

function rowIdentity(row: RowAst, scope: Scope): string | undefined {
  switch (row.at) {
    case 'identity':
      return row.id
    case 'number':
      return scope.rows[row.number - 1]?.id
    case 'label': {
      const labelled = rowsLabelled(row.label, scope)
      return labelled.length === 1 ? labelled[0] : undefined
    }
    default:
      return undefined
  }
}

const showing = (scope: Scope): Renaming => ({
  target: (target) => {
    if (target.by === 'name') return null
    const { columns, things } = indexed(scope)
    const name = target.kind === 'column' ? columns.get(target.id)?.symbol : things.get(target.id)?.name
    if (name === undefined) return `[deleted ${token(target)}]`
    const meaning = meaningOf(name, true, scope)
    const leadsBack = meaning.is === target.kind && meaning.id === target.id && !HAS_TOKEN.test(name)
    return leadsBack ? written(name, scope.words) : bracketed(`${name.trim() || 'unnamed'} ${token(target)}`)
  },
  row: (row) => {
    if (row.at !== 'identity') return null
    const place = indexed(scope).rows.get(row.id)
    if (place === undefined) return `@[deleted $r:${row.id}]`
    const { label } = scope.rows[place]
    return isTelling(label, scope) ? `@${bracketed(label)}` : `@${place + 1}`
  },
})

const HAS_TOKEN = /\$[ctr]:/
const LONGEST_LABEL = 40

/** A label that leads to one row, and reads well within a formula. Any other row is shown by its number. */
const isTelling = (label: string, scope: Scope) =>
  rowsLabelled(label, scope).length === 1 &&
  label.length <= LONGEST_LABEL &&
  !/^\s*$|[\n\r]/.test(label) &&
  !HAS_TOKEN.test(label)
