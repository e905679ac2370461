import type { Span } from '@/lib/errors'
import type { Unit } from '@/lib/units'

export type BinaryOperator = '+' | '-' | '*' | '/' | '^' | '&' | '=' | '<>' | '<' | '>' | '<=' | '>='

/** Which row a reference means; none: the row that the formula stands in. */
export type RowAst =
  | { readonly at: 'from'; readonly span: Span }
  | { readonly at: 'all'; readonly span: Span }
  | { readonly at: 'number'; readonly number: number; readonly span: Span }
  | { readonly at: 'label'; readonly label: string; readonly span: Span }
  | { readonly at: 'identity'; readonly id: string; readonly span: Span }

/** What a reference names: a name as people write it, or an identity as the document keeps it. */
export type Target =
  | {
      readonly by: 'name'
      readonly name: string
      /** Written in brackets: then it is a name of the sheet's own, and no word of the language. */
      readonly bracketed: boolean
      readonly span: Span
    }
  | { readonly by: 'identity'; readonly kind: 'column' | 'thing'; readonly id: string; readonly span: Span }

export interface ArgumentAst {
  readonly name: string | null
  readonly nameSpan: Span | null
  readonly value: Ast
}

export type Ast =
  | { readonly type: 'number'; readonly value: number; readonly span: Span }
  | { readonly type: 'quantity'; readonly value: number; readonly unit: Unit; readonly span: Span }
  | { readonly type: 'text'; readonly value: string; readonly span: Span }
  | { readonly type: 'reference'; readonly target: Target; readonly row: RowAst | null; readonly span: Span }
  | {
      readonly type: 'call'
      readonly name: string
      readonly nameSpan: Span
      readonly args: readonly ArgumentAst[]
      readonly span: Span
    }
  | { readonly type: 'field'; readonly of: Ast; readonly field: string; readonly fieldSpan: Span; readonly span: Span }
  | { readonly type: 'negative'; readonly of: Ast; readonly span: Span }
  | { readonly type: 'percent'; readonly of: Ast; readonly span: Span }
  | {
      readonly type: 'binary'
      readonly operator: BinaryOperator
      readonly left: Ast
      readonly right: Ast
      readonly span: Span
    }

/** A mistake in a formula: where, and in a person's words. */
export interface FormulaProblem {
  readonly span: Span
  readonly reason: string
}

/** The nodes right below one, for walking a tree. */
export function children(ast: Ast): readonly Ast[] {
  switch (ast.type) {
    case 'number':
    case 'quantity':
    case 'text':
    case 'reference':
      return []
    case 'call':
      return ast.args.map((argument) => argument.value)
    case 'field':
    case 'negative':
    case 'percent':
      return [ast.of]
    case 'binary':
      return [ast.left, ast.right]
  }
}
