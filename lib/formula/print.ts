import { formulaOf } from '@/lib/units'
import type { Ast, BinaryOperator, RowAst, Target } from './ast'
import { bracketed } from './names'

/** How tightly operators bind, loosest first, as in the grammar. */
const BINDING: Readonly<Record<BinaryOperator, number>> = {
  '=': 1,
  '<>': 1,
  '<': 1,
  '>': 1,
  '<=': 1,
  '>=': 1,
  '&': 2,
  '+': 3,
  '-': 3,
  '*': 4,
  '/': 4,
  '^': 6,
}
const PREFIX = 5

/** The text of a tree, with no bracket more than it needs. Parsing it gives the same tree. */
export function print(ast: Ast): string {
  switch (ast.type) {
    case 'number':
      return String(ast.value)
    case 'quantity':
      return formulaOf(ast.value, ast.unit)
    case 'text':
      return `"${ast.value.replaceAll('"', '""')}"`
    case 'reference':
      return `${targetText(ast.target)}${ast.row ? rowText(ast.row) : ''}`
    case 'call':
      return `${ast.name}(${ast.args.map(({ name, value }) => (name === null ? print(value) : `${name}: ${print(value)}`)).join(', ')})`
    case 'field':
      return `${operand(ast.of, 8)}.${ast.field}`
    case 'percent':
      // a percent sign right behind a number is part of its reading
      return ast.of.type === 'number' ? `(${print(ast.of)}) %` : `${operand(ast.of, 7)} %`
    case 'negative':
      // a sign right before a number is part of its reading
      return isNumeral(ast.of) ? `-(${print(ast.of)})` : `-${operand(ast.of, PREFIX + 2)}`
    case 'binary': {
      const binding = BINDING[ast.operator]
      const rightward = ast.operator === '^'
      return `${operand(ast.left, rightward ? binding + 1 : binding)} ${ast.operator} ${operand(ast.right, rightward ? binding : binding + 1)}`
    }
  }
}

const isNumeral = (ast: Ast) => ast.type === 'number' || ast.type === 'quantity'

function operand(ast: Ast, needed: number): string {
  return bindingOf(ast) < needed ? `(${print(ast)})` : print(ast)
}

function bindingOf(ast: Ast): number {
  switch (ast.type) {
    case 'binary':
      return BINDING[ast.operator]
    case 'negative':
      return PREFIX
    case 'number':
    case 'quantity':
      // a reading below zero begins with a sign, which a power or a percent sign would take for its own
      return ast.value < 0 ? PREFIX : 9
    case 'percent':
      return 7
    default:
      return 9
  }
}

function targetText(target: Target): string {
  if (target.by === 'name') return target.bracketed ? bracketed(target.name) : target.name
  return `$${target.kind === 'column' ? 'c' : 't'}:${target.id}`
}

function rowText(row: RowAst): string {
  switch (row.at) {
    case 'from':
    case 'all':
      return `@${row.at}`
    case 'number':
      return `@${row.number}`
    case 'label':
      return `@${bracketed(row.label)}`
    case 'identity':
      return `@$r:${row.id}`
  }
}
