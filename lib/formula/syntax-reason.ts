import type { SyntaxNode } from '@lezer/common'
import type { FormulaProblem } from './ast'

/** Says what is wrong where the grammar found no way on. */
export function syntaxReason(text: string, error: SyntaxNode): FormulaProblem {
  const span = { from: error.from, to: Math.max(error.to, Math.min(error.from + 1, text.length)) }
  const before = text.slice(0, error.from).trimEnd()
  const here = text.slice(error.from).trimStart()
  const reason = reasonFor(before, here)
  return { span, reason }
}

function reasonFor(before: string, here: string): string {
  const last = before.at(-1) ?? ''
  const next = here[0] ?? ''
  if (next === '"') return 'a text is not closed: a quotation mark is missing'
  if (next === '[') return 'a square bracket is not closed'
  if (next === '' || next === ')') {
    if (last === ':') return 'a value is missing after the colon'
    if (last === ',') return 'a value is missing after the comma'
    if (/[+\-−–*×·/÷^&=<>≤≥≠]$/.test(last)) return `a value is missing after ${last}`
    if (last === '@') return 'after @ stands from, all, a state’s number, or its label in brackets'
    if (last === '.') return 'the name of a field is missing after the point'
    if (last === '(' && next === '') return 'a closing bracket is missing'
  }
  if (next === '') return 'a closing bracket is missing'
  if (next === ')') return 'there is a closing bracket too many'
  if (next === ',')
    return last === '(' || last === ','
      ? 'a value is missing before the comma'
      : 'a comma stands only between the arguments of a function'
  if (next === '@') return '@ follows the name of a column: T@3'
  if (next === ':') return 'a colon follows only the name of an argument: p: 1 bar'
  if (/^[+*×·/÷^&=<>≤≥≠%.]/.test(next)) return `a value is missing before ${next}`
  const word = /^[^\s,()+\-*/^&=<>]+/.exec(here)?.[0] ?? next
  return `“${shorten(word)}” cannot stand here: something is missing before it`
}

const shorten = (word: string) => (word.length > 20 ? `${word.slice(0, 20)}…` : word)
