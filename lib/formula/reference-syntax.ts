import type { SyntaxNode } from '@lezer/common'
import { Problem } from '@/lib/errors'
import type { Ast, RowAst, Target } from './ast'

export type ReferenceAst = Extract<Ast, { type: 'reference' }>

/** The references of the grammar as a tree has them: a name or an identity, and which row of it. */
export function referenceAst(node: SyntaxNode, text: string): ReferenceAst {
  const rowNode = node.getChild('RowReference')
  return {
    type: 'reference',
    target: target(node.firstChild!, text),
    row: rowNode && row(rowNode, text),
    span: { from: node.from, to: node.to },
  }
}

/** `[p $c:ID]`: how a name is shown that would not lead back to what it stands for; the identity decides. */
const WITH_IDENTITY = /(?:^|\s)\$([ctr]):([A-Za-z0-9_]+)\s*$/

const unbracketed = (written: string) => written.slice(1, -1).replaceAll(']]', ']')

function target(node: SyntaxNode, text: string): Target {
  const span = { from: node.from, to: node.to }
  const written = text.slice(node.from, node.to)
  if (node.name === 'Name') return { by: 'name', name: written, bracketed: false, span }
  const bracketed = node.name === 'Bracketed'
  const [, kind, id] = WITH_IDENTITY.exec(bracketed ? unbracketed(written) : written) ?? []
  if (id === undefined) return { by: 'name', name: unbracketed(written), bracketed: true, span }
  if (kind === 'r') throw new Problem('syntax', 'a state cannot stand alone: it follows an @', span)
  return { by: 'identity', kind: kind === 'c' ? 'column' : 'thing', id, span }
}

function row(node: SyntaxNode, text: string): RowAst {
  const what = node.lastChild!
  const span = { from: node.from, to: node.to }
  const written = text.slice(what.from, what.to)
  if (what.name === 'Number') return { at: 'number', number: Number(written), span }
  if (what.name === 'RowWord') {
    if (written === 'from' || written === 'all') return { at: written, span }
    const label = `@[${written}]`
    throw new Problem('syntax', `after @ stands from, all, a state’s number, or its label in brackets: ${label}`, span)
  }
  const bracketed = what.name === 'Bracketed'
  const [, kind, id] = WITH_IDENTITY.exec(bracketed ? unbracketed(written) : written) ?? []
  if (id === undefined) return { at: 'label', label: unbracketed(written), span }
  if (kind !== 'r') throw new Problem('syntax', 'only a state can follow an @', span)
  return { at: 'identity', id, span }
}
