import type { SyntaxNode } from '@lezer/common'
import { QUANTITIES, unitInFormula } from '@/lib/units'
import type { FormulaProblem } from './ast'
import { compile } from './compile'
import type { Expectation } from './compile'
import { bracketed, written } from './names'
import { tooMuch } from './parse'
import { parser } from './parser'
import { fits } from './typing'
import type { FunctionSpec, Parameter, Scope, ThingKind, Type, Vocabulary } from './types'

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
  if (tooMuch(text) !== null || openText(before)) return { from: position, options: [] }
  const bracket = /(@|\d\s*)?\[[^\]]*$/u.exec(before)
  if (bracket) return { from: before.lastIndexOf('['), options: bracketOptions(bracket[1], scope) }
  const word = /[\p{L}_°][\p{L}_°0-9]*$/u.exec(before)?.[0] ?? ''
  const from = position - word.length
  const lead = before.slice(0, from)
  if (/@\s*\d*$/.test(lead)) return { from: lead.search(/\d*$/), options: rowOptions(scope) }
  if (NUMBER_AT_END.test(lead) && (word !== '' || /\s$/.test(lead))) return { from, options: UNIT_OPTIONS }
  if (/[^\d\s]\d*\.$/.test(lead)) return { from, options: fieldOptions(lead.slice(0, -1), scope, vocabulary) }
  const call = callAt(text, position, vocabulary)
  const wanted = call?.spec.parameters.find(({ name }) => name === call.parameter)
  return {
    from,
    options: [
      ...choiceOptions(wanted),
      ...argumentOptions(call),
      ...nameOptions(scope, typesOf(wanted)),
      ...functionOptions(vocabulary),
      ...wordOptions(vocabulary),
    ],
  }
}

/** Whether a text in quotes is still open at the end. */
const openText = (before: string) => (before.match(/"/g)?.length ?? 0) % 2 === 1

/** A number that is none of a name's own digits. */
const NUMBER_AT_END = /(?:^|[^\p{L}\p{N}_@.$:])(?:\d+(?:\.\d+)?|\.\d+)(?:[eE][+-]?\d+)?\s*$/u

const typesOf = (parameter: Parameter | undefined): readonly Type[] =>
  parameter === undefined ? [] : Array.isArray(parameter.type) ? parameter.type : [parameter.type as Type]

const UNIT_OPTIONS: readonly Completion[] = [...new Set(QUANTITIES.flatMap((quantity) => quantity.units))]
  .filter((unit) => unit !== '1')
  .map((unit) => ({
    label: unit,
    apply: unitInFormula(unit),
    kind: 'unit',
    detail: QUANTITIES.find((quantity) => quantity.units.includes(unit))!.label,
  }))

/** What an opened square bracket may become: a unit behind a number, a label behind an @, or else a name. */
function bracketOptions(lead: string | undefined, scope: Scope): readonly Completion[] {
  if (lead === undefined) return nameOptions(scope, []).map((name) => ({ ...name, apply: bracketed(name.label) }))
  if (lead !== '@') return UNIT_OPTIONS.map((unit) => ({ ...unit, apply: `[${unit.label}]` }))
  const rows = scope.rows.map(({ label }, i) => ({ label, apply: bracketed(label), detail: `state ${i + 1}` }))
  return rows.filter(({ label }) => label.trim() !== '').map((row) => ({ ...row, kind: 'row' }))
}

const rowOptions = (scope: Scope): Completion[] => [
  { label: 'from', apply: 'from', kind: 'row', detail: 'the state this one starts from' },
  { label: 'all', apply: 'all', kind: 'row', detail: 'the whole column' },
  ...scope.rows.map((row, i): Completion => ({ label: `${i + 1}`, apply: `${i + 1}`, kind: 'row', detail: row.label })),
]

/** Names of what fits the argument that the cursor is in come first. */
function nameOptions({ columns, things, words }: Scope, wanted: readonly Type[]): readonly Completion[] {
  const names = [
    ...columns.map(({ symbol, type }) => ({ name: symbol, type, kind: 'column' as const, detail: 'column' })),
    ...things.map(({ name, type }) => ({ name, type, kind: 'thing' as const, detail: 'in the rig' })),
  ].filter(({ name }) => name.trim() !== '')
  const suits = ({ type }: { readonly type: Type }) => wanted.some((want) => fits(type, want))
  return [...names.filter(suits), ...names.filter((name) => !suits(name))].map(({ name, kind, detail }) => ({
    label: name,
    apply: written(name, words),
    kind,
    detail,
  }))
}

const choiceOptions = (parameter: Parameter | undefined): readonly Completion[] =>
  (parameter?.choices ?? []).map((choice) => ({ label: choice, apply: choice, kind: 'word', detail: parameter!.help }))

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
  let inOrder = 0
  let current: string | null = null
  for (let at = call.firstChild?.nextSibling ?? null; at; at = at.nextSibling) {
    if (at.name === ',' && at.to <= position) {
      if (current === null) inOrder++
      current = null
    }
    if (at.name !== 'NamedArgument') continue
    const name = text.slice(at.firstChild!.from, at.firstChild!.to)
    given.push(name)
    if (at.from <= position) current = name
  }
  const unnamed = spec.parameters.filter((parameter) => !parameter.named)
  const next = unnamed[inOrder] ?? unnamed.find((parameter) => parameter.repeats)
  return { given, parameter: current ?? next?.name ?? null }
}

/** `charge(from:, supply:, through:, …)` in parts, for the line under the cursor. */
export const signature = (spec: FunctionSpec) =>
  spec.parameters.map((parameter) => ({
    name: parameter.name,
    text: `${parameter.named ? `${parameter.name}:` : parameter.name}${parameter.repeats ? ' …' : ''}`,
    optional: parameter.optional === true || parameter.default !== undefined,
    help: parameter.help,
  }))
