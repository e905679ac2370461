import type { SyntaxNode } from '@lezer/common'
import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import { readUnit, unitOf, unknownUnit } from '@/lib/units'
import type { ArgumentAst, Ast, BinaryOperator, FormulaProblem } from './ast'
import { parser } from './parser'
import { referenceAst } from './reference-syntax'
import { syntaxReason } from './syntax-reason'

/** A formula longer than this is refused, so that every text gets its answer in bounded time. */
export const LONGEST_FORMULA = 10_000
const DEEPEST_NESTING = 100
/** The parser's own stack grows with each operator of a long sum. */
const MOST_OPERATORS = 1_000

export type Parsed =
  { readonly ast: Ast; readonly problem: null } | { readonly ast: null; readonly problem: FormulaProblem }

/** Reads a formula. Never throws: what cannot be read is a problem with its place. */
export function parse(text: string): Parsed {
  const whole = { from: 0, to: text.length }
  const reason = tooMuch(text) ?? (text.trim() === '' ? 'there is no formula' : null)
  if (reason) return refused(whole, reason)
  const tree = parser.parse(text)
  let error: SyntaxNode | null = null
  tree.iterate({
    enter: (node) => {
      if (error) return false
      if (node.type.isError) error = node.node
      return undefined
    },
  })
  if (error) {
    const problem = syntaxReason(text, error)
    return refused(problem.span, problem.reason)
  }
  try {
    return { ast: build(tree.topNode.firstChild!, { text, depth: 0 }), problem: null }
  } catch (mistake) {
    if (!(mistake instanceof Problem)) throw mistake
    return refused(mistake.span ?? whole, mistake.reason)
  }
}

/** Why a text is not even tried; null where it is. */
export function tooMuch(text: string): string | null {
  if (text.length > LONGEST_FORMULA)
    return `a formula may be ${LONGEST_FORMULA} characters long, this one has ${text.length}`
  const operators = text.replace(/"[^"]*"/g, '').match(/[+\-−–*×·/÷^&=<>≤≥≠%.@([]/g)?.length ?? 0
  return operators > MOST_OPERATORS ? 'this formula has more parts than anybody can read' : null
}

const refused = (span: Span, reason: string): Parsed => ({ ast: null, problem: { span, reason } })

interface Source {
  readonly text: string
  readonly depth: number
}

const spanOf = ({ from, to }: SyntaxNode): Span => ({ from, to })
const textOf = (node: SyntaxNode, { text }: Source) => text.slice(node.from, node.to)

function build(node: SyntaxNode, source: Source): Ast {
  if (source.depth > DEEPEST_NESTING)
    throw new Problem('syntax', 'this formula is nested too deeply to be read by anybody', spanOf(node))
  const below = { ...source, depth: source.depth + 1 }
  const span = spanOf(node)
  switch (node.name) {
    case 'Quantity':
      return quantity(node, source)
    case 'Text':
      return { type: 'text', value: textOf(node, source).slice(1, -1).replaceAll('""', '"'), span }
    case 'Reference':
      return referenceAst(node, source.text)
    case 'Group':
      return build(node.firstChild!.nextSibling!, below)
    case 'Percent':
      return percent(node, below)
    case 'Prefix':
      return prefix(node, below)
    case 'Binary':
      return binary(node, below)
    case 'Field': {
      const field = node.lastChild!
      return {
        type: 'field',
        of: build(node.firstChild!, below),
        field: textOf(field, source),
        fieldSpan: spanOf(field),
        span,
      }
    }
    case 'Call': {
      const name = node.firstChild!
      return {
        type: 'call',
        name: textOf(name, source),
        nameSpan: spanOf(name),
        args: callArguments(node, below),
        span,
      }
    }
    default:
      throw new Error(`the grammar knows ${node.name}, the syntax tree does not`)
  }
}

function quantity(node: SyntaxNode, source: Source): Ast {
  const span = spanOf(node)
  const number = node.firstChild!
  const value = Number(textOf(number, source))
  if (!Number.isFinite(value)) throw new Problem('syntax', 'this number is too great to be worked with', span)
  const unitNode = number.nextSibling
  if (!unitNode) return { type: 'number', value, span }
  const written = textOf(unitNode, source)
  const inBrackets = unitNode.name === 'Bracketed'
  const unitText = inBrackets ? written.slice(1, -1) : written
  const unit = readUnit(unitText)
  if (!unit) {
    const hint = inBrackets ? '' : `; a product is written with a sign: ${textOf(number, source)} * ${unitText}`
    throw new Problem('syntax', `${unknownUnit(unitText)}${hint}`, spanOf(unitNode))
  }
  return unit.text === '1' ? { type: 'number', value, span } : { type: 'quantity', value, unit, span }
}

const PERCENT = unitOf('%')

/** `5 %` is a reading as `5 bar` is; behind anything else the sign divides by a hundred. */
function percent(node: SyntaxNode, source: Source): Ast {
  const operand = node.firstChild!
  const of = build(operand, source)
  return operand.name === 'Quantity' && of.type === 'number'
    ? { type: 'quantity', value: of.value, unit: PERCENT, span: spanOf(node) }
    : { type: 'percent', of, span: spanOf(node) }
}

function prefix(node: SyntaxNode, source: Source): Ast {
  const sign = textOf(node.firstChild!, source)
  const operand = node.lastChild!
  if (operand.name === 'Binary') {
    throw new Problem('syntax', 'a sign before a power can be read two ways: write (-2)^2 or -(2^2)', spanOf(node))
  }
  const of = build(operand, source)
  if (sign === '+') return of
  // -5 °C is a reading five below zero, not the negative of 278.15 K
  if (operand.name !== 'Group' && (of.type === 'quantity' || of.type === 'number'))
    return { ...of, value: of.value === 0 ? 0 : -of.value, span: spanOf(node) }
  return { type: 'negative', of, span: spanOf(node) }
}

const OPERATORS: Readonly<Record<string, BinaryOperator>> = {
  '−': '-',
  '–': '-',
  '×': '*',
  '·': '*',
  '÷': '/',
  '≤': '<=',
  '≥': '>=',
  '≠': '<>',
}

function binary(node: SyntaxNode, source: Source): Ast {
  // a sum of a thousand terms leans to the left: walked in a loop, it is not deep
  const spine: SyntaxNode[] = []
  let first = node
  while (first.name === 'Binary') {
    spine.push(first)
    first = first.firstChild!
  }
  let left = build(first, source)
  for (const step of spine.reverse()) {
    const written = textOf(step.firstChild!.nextSibling!, source)
    const operator = OPERATORS[written] ?? (written as BinaryOperator)
    left = { type: 'binary', operator, left, right: build(step.lastChild!, source), span: spanOf(step) }
  }
  return left
}

function callArguments(node: SyntaxNode, source: Source): ArgumentAst[] {
  const args: ArgumentAst[] = []
  for (let at = node.firstChild!.nextSibling; at; at = at.nextSibling) {
    if (at.name === 'NamedArgument') {
      const name = at.firstChild!
      args.push({ name: textOf(name, source), nameSpan: spanOf(name), value: build(at.lastChild!, source) })
    } else if (!['(', ')', ','].includes(at.name)) {
      args.push({ name: null, nameSpan: null, value: build(at, source) })
    }
  }
  return args
}
