import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import { belowZero, toSI } from '@/lib/units'
import type { Ast } from './ast'
import { compileBinary } from './binary'
import { compileCall } from './calls'
import { suggestion } from './nearest'
import { compiled, guarded, needed, quantityNode } from './node'
import type { Compiled, Context, Frame } from './node'
import { parse } from './parse'
import { compileReference } from './references'
import { bareCompoundUnit } from './syntax-reason'
import { NUMBER, TEXT, fits, literalType, typeWords } from './typing'
import type { Compilation, Scope, Type, Value, Vocabulary } from './types'
import { fault, isFault, isThing } from './values'

export interface Expectation {
  readonly expected?: Type
  /** "the column Pressure". */
  readonly expectedWords?: string
}

/**
 * Checks a formula, in people's names or as it is kept, and makes it ready to run. All dimensions are worked out here,
 * before anything runs; what cannot hold comes back as a fault with its place and its reason.
 */
export function compile(
  text: string,
  scope: Scope,
  vocabulary: Vocabulary,
  expectation: Expectation = {},
): Compilation {
  const { ast, problem } = parse(text)
  if (!ast) return { ok: false, fault: fault('syntax', problem.reason, problem.span) }
  const context: Context = { text, scope, vocabulary, reads: [], node: compileNode }
  try {
    const whole = compileNode(ast, context)
    checkExpected(whole, expectation, vocabulary)
    return {
      ok: true,
      type: whole.type,
      reads: context.reads,
      literal: isLiteral(ast),
      run: (values, surroundings) => finished(whole.run({ values, surroundings }), ast.span),
    }
  } catch (mistake) {
    if (!(mistake instanceof Problem)) throw mistake
    const { code, reason, span = ast.span } = mistake
    // 5 W/(m^2 K) can be read, as watts over something, but was hardly meant so
    const unit = bareCompoundUnit(text, span.from)
    return { ok: false, fault: unit ? fault('syntax', unit.reason, unit.span) : fault(code, reason, span) }
  }
}

function checkExpected(
  { type, span }: Compiled,
  { expected, expectedWords = 'this place' }: Expectation,
  vocabulary: Vocabulary,
) {
  if (type.kind === 'list') throw new Problem('dimension', 'a whole column is no value: sum, min or max it', span)
  if (!expected || fits(type, expected)) return
  const [is, wants] = [typeWords(type, vocabulary), typeWords(expected, vocabulary)]
  throw new Problem('dimension', `this is ${is}, but ${expectedWords} takes ${wants}`, span)
}

const isLiteral = (ast: Ast) =>
  ast.type === 'number' ||
  ast.type === 'quantity' ||
  ast.type === 'text' ||
  (ast.type === 'reference' && ast.row === null)

/** A cell may be empty or hold a fault, but no number that is none. */
function finished(value: Value, span: Span): Value {
  if (typeof value === 'number' && !Number.isFinite(value))
    return fault('range', 'the result is no finite number', span)
  return value
}

function compileNode(ast: Ast, context: Context): Compiled {
  const { span } = ast
  switch (ast.type) {
    case 'number':
      return compiled(context, span, NUMBER, () => ast.value)
    case 'quantity':
      return compileQuantity(ast, context)
    case 'text':
      return compiled(context, span, TEXT, () => ast.value)
    case 'reference':
      return compileReference(ast, context)
    case 'call':
      return compileCall(ast, context)
    case 'field':
      return compileField(ast, context)
    case 'negative': {
      const of = quantityNode(context.node(ast.of, context), context)
      if (of.type.scale === 'point')
        throw new Problem('dimension', `${of.words} is a reading on a scale: it has no negative`, span)
      return compiled(
        context,
        span,
        of.type,
        unary(of, (x) => -x),
      )
    }
    case 'percent': {
      const of = quantityNode(context.node(ast.of, context), context)
      if (!fits(of.type, NUMBER))
        throw new Problem('dimension', `${of.words} is no plain number: it cannot be a percentage`, span)
      return compiled(
        context,
        span,
        NUMBER,
        unary(of, (x) => x / 100),
      )
    }
    case 'binary':
      return compileBinary(ast, context)
  }
}

/** A number with a unit. What a gauge reading comes to, and whether that can be, is known only where it is run. */
function compileQuantity({ value, unit, span }: Extract<Ast, { type: 'quantity' }>, context: Context): Compiled {
  const type = literalType(unit)
  const at = (ambient_Pa: number): Value => {
    const si = toSI(value, unit, ambient_Pa)
    const below = belowZero(si, value, unit)
    return below ? fault('range', below, span) : si
  }
  if (unit.gauge) return compiled(context, span, type, ({ surroundings }) => at(surroundings.p_Pa))
  const si = at(0)
  if (isFault(si)) throw new Problem(si.fault, si.reason, span)
  return compiled(context, span, type, () => si)
}

function unary(of: Compiled, f: (x: number) => number): Compiled['run'] {
  return (frame) => {
    const value = needed(of.run(frame), of)
    return isFault(value) ? value : f(value as number)
  }
}

function compileField(ast: Extract<Ast, { type: 'field' }>, context: Context): Compiled {
  const of = context.node(ast.of, context)
  const { type } = of
  if (type.kind !== 'thing') {
    throw new Problem(
      'dimension',
      `${of.words} is ${typeWords(type, context.vocabulary)}: it has no fields`,
      ast.fieldSpan,
    )
  }
  const spec = context.vocabulary.things.get(type.thing)
  const field = spec?.fields.find((candidate) => candidate.name === ast.field)
  if (!spec || !field) {
    const known = spec?.fields.map((candidate) => candidate.name) ?? []
    const meant = suggestion(ast.field, known) || (known.length > 0 ? `; it has ${known.join(', ')}` : '')
    throw new Problem('name', `${spec?.words ?? type.thing} has no ${ast.field}${meant}`, ast.fieldSpan)
  }
  const run = (frame: Frame): Value => {
    const value = needed(of.run(frame), of)
    if (isFault(value)) return value
    if (!isThing(value)) throw new Error(`${of.words} passed the check as a thing, but is none`)
    return guarded(() => field.get(value.value as never), ast.span)
  }
  return compiled(context, ast.span, field.type, run)
}
