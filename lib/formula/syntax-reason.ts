import type { SyntaxNode } from '@lezer/common'
import { readUnit } from '@/lib/units'
import type { FormulaProblem } from './ast'

/** Says what is wrong where the grammar found no way on. */
export function syntaxReason(text: string, error: SyntaxNode): FormulaProblem {
  const unit = bareCompoundUnit(text, error.from)
  if (unit) return unit
  const span = { from: error.from, to: Math.max(error.to, Math.min(error.from + 1, text.length)) }
  const before = text.slice(0, error.from).trimEnd()
  const here = text.slice(error.from).trimStart()
  return { span, reason: missingValue(before, here) ?? strayPart(before, here) }
}

const OPERATOR_AT_END = /[+\-−–*×·/÷^&=<>≤≥≠]$/

/** What ends too soon; null where something else is wrong. */
function missingValue(before: string, here: string): string | null {
  const last = before.at(-1) ?? ''
  const next = here[0] ?? ''
  if (next === '"' && !/^"[^"]*"/.test(here)) return 'a text is not closed: a quotation mark is missing'
  if (next === '[' && !here.includes(']')) return 'a square bracket is not closed'
  if (next !== '' && next !== ')' && next !== ',') return null
  if (last === ':') return 'a value is missing after the colon'
  if (last === ',') return 'a value is missing after the comma'
  if (last === '@') return 'after @ stands from, all, a state’s number, or its label in brackets'
  if (last === '.') return `${/\d\.$/.test(before) ? 'a digit' : 'the name of a field'} is missing after the point`
  if (OPERATOR_AT_END.test(last)) return `a value is missing after ${last}`
  if (next === ')')
    return last === '(' ? 'a value is missing between the brackets' : 'there is a closing bracket too many'
  if (next === ',') return strayComma(before, here)
  return openBrackets(before) > 0 ? 'a closing bracket is missing' : 'something is missing at the end'
}

function strayComma(before: string, here: string): string {
  if (before.endsWith('(')) return 'a value is missing before the comma'
  const decimals = /\d$/.test(before) && /^,\d/.test(here)
  return `a comma stands only between the arguments of a function${decimals ? '; decimals are written with a point' : ''}`
}

function strayPart(before: string, here: string): string {
  const next = here[0] ?? ''
  if (next === '@') return '@ follows the name of a column: T@3'
  if (next === ':') return 'a colon follows only the name of an argument: p: 1 bar'
  if (/[+*×·/÷^&=<>≤≥≠%.]/.test(next)) return `a value is missing before ${next}`
  const word = shorten(/^[^\s,()+\-*/^&=<>]+/.exec(here)?.[0] ?? next)
  if (/\d$/.test(before) && /^\d/.test(word)) return 'a number is written without blanks'
  if (before === '') return `“${word}” cannot stand here`
  return openBrackets(before) > 0
    ? `“${word}” cannot stand here: an operator, a comma or a closing bracket is missing before it`
    : `“${word}” cannot stand here: an operator is missing before it`
}

function openBrackets(text: string): number {
  const signs = text.replace(/"[^"]*"|\[[^\]]*\]/g, '').match(/[()]/g) ?? []
  return signs.reduce((open, sign) => open + (sign === '(' ? 1 : -1), 0)
}

const LONGEST_UNIT = 60

/** A unit like W/(m² K) that was written behind a number without its square brackets, around the place of the mistake. */
export function bareCompoundUnit(text: string, place: number): FormulaProblem | null {
  for (const match of text.matchAll(/([\d.]+) ?([\p{L}°%][\p{L}\d°%²³⁻^/·* ()-]{2,})/gu)) {
    const from = match.index + match[0].length - match[2].length
    if (from > place || from + LONGEST_UNIT < place) continue
    for (let to = Math.min(match[2].length, LONGEST_UNIT); from + to > place; to--) {
      const unit = readUnit(match[2].slice(0, to))
      if (unit && /[/ ]/.test(unit.text))
        return {
          span: { from, to: from + to },
          reason: `a compound unit is written in brackets: ${match[1]} [${unit.text}]`,
        }
    }
  }
  return null
}

const shorten = (word: string) => (word.length > 20 ? `${word.slice(0, 20)}…` : word)
