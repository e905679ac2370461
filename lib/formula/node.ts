import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import type { Ast } from './ast'
import { show } from './bind'
import { typeWords } from './typing'
import type { QuantityType } from './typing'
import type { Read, Scope, Surroundings, Type, Value, Vocabulary } from './types'
import { fault } from './values'

/** What a compiled expression runs on. */
export interface Frame {
  readonly values: readonly Value[]
  readonly surroundings: Surroundings
}

/** An expression that holds: its type, and how to work it out. */
export interface Compiled {
  readonly type: Type
  readonly run: (frame: Frame) => Value
  /** As it stands in the formula, in today's names, for the words of an error. */
  readonly words: string
  readonly span: Span
}

/** What compiling needs to know, and what it gathers. */
export interface Context {
  readonly text: string
  readonly scope: Scope
  readonly vocabulary: Vocabulary
  readonly reads: Read[]
  /** Compiles a part of the formula. */
  readonly node: (ast: Ast, context: Context) => Compiled
}

const LONGEST_PHRASE = 60

/** The words are made when they are first asked for: most expressions never have an error. */
export function compiled({ text, scope }: Context, span: Span, type: Type, run: Compiled['run']): Compiled {
  let phrase: string | undefined
  return {
    type,
    run,
    span,
    get words() {
      phrase ??= show(text.slice(span.from, span.to), scope)
      return phrase.length > LONGEST_PHRASE ? `${phrase.slice(0, LONGEST_PHRASE)}…` : phrase
    },
  }
}

/** The value of an expression where one is needed: an empty cell will not do. */
export function needed(value: Value, of: Compiled): Value {
  return value === null ? fault('argument', `${of.words} is empty`, of.span) : value
}

export function quantityNode(node: Compiled, { vocabulary }: Context): Compiled & { readonly type: QuantityType } {
  if (node.type.kind === 'quantity') return node as Compiled & { readonly type: QuantityType }
  const is = typeWords(node.type, vocabulary)
  throw new Problem('dimension', `${node.words} is ${is}: a number is needed here`, node.span)
}

/** A user's mistake that is thrown in the numerics becomes a value here, with the place of the call. */
export function guarded(work: () => Value, span: Span): Value {
  try {
    const value = work()
    return typeof value === 'number' && !Number.isFinite(value)
      ? fault('range', 'the result is no finite number', span)
      : value
  } catch (mistake) {
    if (!(mistake instanceof Problem)) throw mistake
    return fault(mistake.code, mistake.reason, mistake.span ?? span)
  }
}
