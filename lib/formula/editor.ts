import type { SyntaxNode } from '@lezer/common'
import { QUANTITIES } from '@/lib/units'
import type { FormulaProblem } from './ast'
import { compile } from './compile'
import type { Expectation } from './compile'
import { written } from './names'
import { parser } from './parser'
import type { FunctionSpec, Scope, ThingKind, Vocabulary } from './types'

/*
 * What an editor asks of the language, as plain data: what is wrong where, what may stand here, and which argument of
 * which function the cursor is in. All from the one grammar and the one function table.
 */

/** The first mistake of a formula, with its place; none where it holds. */
export function analyse(
  text: string,
  scope: Scope,
  vocabulary: Vocabulary,
  expectation?: Expectation,
): FormulaProblem[] {
  const compilation = compile(text, scope, vocabulary, expectation)
  if (compilation.ok) return []
  const { reason, span } = compilation.fault
  return [{ reason, span: span ?? { from: 0, to: text.length } }]
}

export interface Completion {
  readonly label: string
  /** What is put into the text. */
  readonly apply: string
  readonly kind: 'column' | 'thing' | 'function' | 'word' | 'argument' | 'field' | 'row' | 'unit'
  readonly detail: string
}

export interface Completions {
  /** Where the word that is being typed begins. */
  readonly from: number
  readonly options: readonly Completion[]
}

/** What may stand at a place, in the order of likelihood: arguments, the sheet's own names, functions, words. */
export function complete(text: string, position: number, scope: Scope, vocabulary: Vocabulary): Completions {
  const before = text.slice(0, position)
  const word = /[\p{L}_][\p{L}_0-9]*$/u.exec(before)?.[0] ?? ''
  const from = position - word.length
  const lead = before.slice(0, from)
  if (/@\s*$/.test(lead)) return { from, options: rowOptions(scope) }
  if (/\d\s+$/.test(lead) || (/\d$/.test(lead) && word)) return { from, options: UNIT_OPTIONS }
  if (lead.endsWith('.') && !/\d\.$/.test(lead))
    return { from, options: fieldOptions(lead.slice(0, -1), scope, vocabulary) }
  const call = callAt(text, position, vocabulary)
  return {
    from,
    options: [
      ...argumentOptions(call),
      ...nameOptions(scope),
      ...functionOptions(vocabulary),
      ...wordOptions(vocabulary),
    ],
  }
}

const UNIT_OPTIONS: readonly Completion[] = [...new Set(QUANTITIES.flatMap((quantity) => quantity.units))]
  .filter((unit) => unit !== '1')
  .map((unit) => ({
    label: unit,
    apply: /^[\p{L}°µ]+(\(g\))?$|^%$/u.test(unit) ? unit : `[${unit}]`,
    kind: 'unit',
    detail: QUANTITIES.find((quantity) => quantity.units.includes(unit))!.label,
  }))

const rowOptions = (scope: Scope): Completion[] => [
  { label: 'from', apply: 'from', kind: 'row', detail: 'the state this one starts from' },
  { label: 'all', apply: 'all', kind: 'row', detail: 'the whole column' },
  ...scope.rows.map((row, i): Completion => ({ label: `${i + 1}`, apply: `${i + 1}`, kind: 'row', detail: row.label })),
]

const nameOptions = (scope: Scope): Completion[] => [
  ...scope.columns
    .filter((column) => column.symbol)
    .map((column): Completion => ({
      label: column.symbol,
      apply: written(column.symbol),
      kind: 'column',
      detail: 'column',
    })),
  ...scope.things
    .filter((thing) => thing.name)
    .map((thing): Completion => ({
      label: thing.name,
      apply: written(thing.name),
      kind: 'thing',
      detail: thing.type.kind === 'thing' ? thing.type.thing : '',
    })),
]

const functionOptions = (vocabulary: Vocabulary): Completion[] =>
  [...vocabulary.functions.values()].map((spec) => ({
    label: spec.name,
    apply: `${spec.name}(`,
    kind: 'function',
    detail: spec.help,
  }))

const wordOptions = (vocabulary: Vocabulary): Completion[] =>
  [...vocabulary.words.entries()].map(([word, { help }]) => ({ label: word, apply: word, kind: 'word', detail: help }))

function argumentOptions(call: CallAt | null): Completion[] {
  const left =
    call?.spec.parameters.filter((parameter) => parameter.named && !call.given.includes(parameter.name)) ?? []
  return left.map((parameter) => ({
    label: `${parameter.name}:`,
    apply: `${parameter.name}: `,
    kind: 'argument',
    detail: parameter.help,
  }))
}

/** Fields of what stands before the point: worked out from its type, as the checker sees it. */
function fieldOptions(lead: string, scope: Scope, vocabulary: Vocabulary): Completion[] {
  const operand = lastOperand(lead)
  const compilation = compile(operand, scope, vocabulary)
  const kind: ThingKind | null = compilation.ok && compilation.type.kind === 'thing' ? compilation.type.thing : null
  const fields = kind === null ? [] : (vocabulary.things.get(kind)?.fields ?? [])
  return fields.map((field) => ({ label: field.name, apply: field.name, kind: 'field', detail: field.help }))
}

function lastOperand(lead: string): string {
  let node: SyntaxNode | null = parser.parse(lead).resolveInner(lead.length, -1)
  let widest: SyntaxNode | null = null
  for (; node; node = node.parent) {
    if (node.to !== lead.length || node.type.isError) continue
    if (['Reference', 'Call', 'Field', 'Group'].includes(node.name)) widest = node
  }
  return widest ? lead.slice(widest.from) : lead
}

export interface CallAt {
  readonly spec: FunctionSpec
  /** Names of the arguments that stand there already. */
  readonly given: readonly string[]
  /** The parameter that the cursor is in; null where none is known. */
  readonly parameter: string | null
}

/** The innermost call around a place. */
export function callAt(text: string, position: number, vocabulary: Vocabulary): CallAt | null {
  for (let node: SyntaxNode | null = parser.parse(text).resolveInner(position, -1); node; node = node.parent) {
    if (node.name !== 'Call') continue
    const name = node.firstChild
    const inside = name && position > name.to && (position < node.to || text[node.to - 1] !== ')')
    const spec = inside ? vocabulary.functions.get(text.slice(name.from, name.to).toLowerCase()) : undefined
    if (spec) return { spec, ...argumentsBefore(node, position, text, spec) }
  }
  return null
}

function argumentsBefore(call: SyntaxNode, position: number, text: string, spec: FunctionSpec): Omit<CallAt, 'spec'> {
  const given: string[] = []
  let commas = 0
  let current: string | null = null
  for (let at = call.firstChild?.nextSibling ?? null; at; at = at.nextSibling) {
    if (at.name === ',' && at.to <= position) {
      commas++
      current = null
    }
    if (at.name !== 'NamedArgument') continue
    const name = text.slice(at.firstChild!.from, at.firstChild!.to)
    given.push(name)
    if (at.from <= position) current = name
  }
  const inOrder = spec.parameters.filter((parameter) => !parameter.named)
  return { given, parameter: current ?? inOrder[Math.min(commas, inOrder.length - 1)]?.name ?? null }
}

/** `charge(from:, supply:, through:, …)` in parts, for the line under the cursor. */
export const signature = (spec: FunctionSpec) =>
  spec.parameters.map((parameter) => ({
    name: parameter.name,
    text: `${parameter.named ? `${parameter.name}:` : parameter.name}${parameter.repeats ? ' …' : ''}`,
    optional: parameter.optional === true || parameter.default !== undefined,
    help: parameter.help,
  }))
