import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import { belowZero, power, toSI } from '@/lib/units'
import type { Ast, BinaryOperator } from './ast'
import { compileCall } from './calls'
import { compareValues, numericOperation } from './operators'
import { parse } from './parse'
import { compileReference } from './references'
import { bareCompoundUnit } from './syntax-reason'
import { LOGICAL, NUMBER, TEXT, binaryType, derived, fits, literalType, typeWords } from './typing'
import type { QuantityType } from './typing'
import type { Compilation, Fault, Read, Scope, Surroundings, Type, Value, Vocabulary } from './types'
import { fault, isFault, isThing } from './values'

/** What a compiled expression runs on. */
export interface Frame {
  readonly values: readonly Value[]
  readonly surroundings: Surroundings
}

/** An expression that holds: its type, and how to work it out. */
export interface Compiled {
  readonly type: Type
  readonly run: (frame: Frame) => Value
  /** As it stands in the formula, for the words of an error. */
  readonly words: string
  readonly span: Span
}

/** What compiling needs to know, and what it gathers. */
export interface Context {
  readonly text: string
  readonly scope: Scope
  readonly vocabulary: Vocabulary
  readonly reads: Read[]
}

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
  const context: Context = { text, scope, vocabulary, reads: [] }
  try {
    const compiled = compileNode(ast, context)
    expect(compiled, expectation, vocabulary)
    return {
      ok: true,
      type: compiled.type,
      reads: context.reads,
      literal: isLiteral(ast),
      run: (values, surroundings) => finished(compiled.run({ values, surroundings }), ast.span),
    }
  } catch (mistake) {
    if (!(mistake instanceof Problem)) throw mistake
    const { code, reason, span = ast.span } = mistake
    // 5 W/(m^2 K) can be read, as watts over something, but was hardly meant so
    const unit = bareCompoundUnit(text, span.from)
    return { ok: false, fault: unit ? fault('syntax', unit.reason, unit.span) : fault(code, reason, span) }
  }
}

function expect(
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

export function compileNode(ast: Ast, context: Context): Compiled {
  const { span } = ast
  const words = context.text.slice(span.from, span.to)
  switch (ast.type) {
    case 'number':
      return { type: NUMBER, run: () => ast.value, words, span }
    case 'quantity':
      return { ...reading(ast), words, span }
    case 'text':
      return { type: TEXT, run: () => ast.value, words, span }
    case 'reference':
      return compileReference(ast, context)
    case 'call':
      return compileCall(ast, context)
    case 'field':
      return compileField(ast, context, words)
    case 'negative': {
      const of = quantityNode(compileNode(ast.of, context), context)
      if (of.type.scale === 'point')
        throw new Problem('dimension', `${of.words} is a reading on a scale: it has no negative`, span)
      return { type: of.type, run: unary(of, (x) => -x), words, span }
    }
    case 'percent': {
      const of = quantityNode(compileNode(ast.of, context), context)
      if (!fits(of.type, NUMBER))
        throw new Problem('dimension', `${of.words} is no plain number: it cannot be a percentage`, span)
      return { type: NUMBER, run: unary(of, (x) => x / 100), words, span }
    }
    case 'binary':
      return compileBinary(ast, context, words)
  }
}

/** A number with a unit. What a gauge reading comes to, and whether that can be, is known only where it is run. */
function reading({ value, unit, span }: Extract<Ast, { type: 'quantity' }>): Pick<Compiled, 'type' | 'run'> {
  const type = literalType(unit)
  const at = (ambient_Pa: number): Value => {
    const si = toSI(value, unit, ambient_Pa)
    const below = belowZero(si, value, unit)
    return below ? fault('range', below, span) : si
  }
  if (unit.gauge) return { type, run: ({ surroundings }) => at(surroundings.p_Pa) }
  const si = at(0)
  if (isFault(si)) throw new Problem(si.fault, si.reason, span)
  return { type, run: () => si }
}

/** The value of an expression where one is needed: an empty cell will not do. */
export function needed(value: Value, of: Compiled): Value {
  return value === null ? fault('argument', `${of.words} is empty`, of.span) : value
}

function quantityNode(node: Compiled, { vocabulary }: Context): Compiled & { readonly type: QuantityType } {
  if (node.type.kind === 'quantity') return node as Compiled & { readonly type: QuantityType }
  const is = typeWords(node.type, vocabulary)
  throw new Problem('dimension', `${node.words} is ${is}: a number is needed here`, node.span)
}

function unary(of: Compiled, f: (x: number) => number): Compiled['run'] {
  return (frame) => {
    const value = needed(of.run(frame), of)
    return isFault(value) ? value : f(value as number)
  }
}

function compileField(ast: Extract<Ast, { type: 'field' }>, context: Context, words: string): Compiled {
  const of = compileNode(ast.of, context)
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
    const known = spec?.fields.map((candidate) => candidate.name).join(', ')
    throw new Problem(
      'name',
      `${spec?.words ?? type.thing} has no ${ast.field}${known ? `; it has ${known}` : ''}`,
      ast.fieldSpan,
    )
  }
  const run = (frame: Frame): Value => {
    const value = needed(of.run(frame), of)
    if (isFault(value)) return value
    if (!isThing(value)) throw new Error(`${of.words} passed the check as a thing, but is none`)
    return guarded(() => field.get(value.value as never), ast.span)
  }
  return { type: field.type, run, words, span: ast.span }
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

function compileBinary(ast: Extract<Ast, { type: 'binary' }>, context: Context, words: string): Compiled {
  const left = compileNode(ast.left, context)
  const right = compileNode(ast.right, context)
  const type = typeOfBinary(ast, left, right, context)
  const operate = operationFor(ast.operator, ast.span)
  const run = (frame: Frame): Value => {
    const a = needed(left.run(frame), left)
    if (isFault(a)) return a
    const b = needed(right.run(frame), right)
    return isFault(b) ? b : operate(a, b)
  }
  return { type, run, words, span: ast.span }
}

function operationFor(operator: BinaryOperator, span: Span): (a: Value, b: Value) => Value | Fault {
  switch (operator) {
    case '&':
      return (a, b) => `${String(a)}${String(b)}`
    case '=':
    case '<>':
    case '<':
    case '>':
    case '<=':
    case '>=':
      return (a, b) => compareValues(operator, a, b)
    default:
      return (a, b) => numericOperation(operator, a as number, b as number, span)
  }
}

function typeOfBinary(
  { operator, span, right: rightAst }: Extract<Ast, { type: 'binary' }>,
  left: Compiled,
  right: Compiled,
  context: Context,
): Type {
  const equality = operator === '=' || operator === '<>'
  if (operator === '&') {
    for (const side of [left, right]) {
      if (side.type.kind !== 'text') {
        throw new Problem(
          'dimension',
          `${side.words} is ${typeWords(side.type, context.vocabulary)}: & joins texts`,
          side.span,
        )
      }
    }
    return TEXT
  }
  const plain = left.type.kind === 'text' || left.type.kind === 'logical'
  if (plain && right.type.kind === left.type.kind && (equality || left.type.kind === 'text')) {
    if (['=', '<>', '<', '>', '<=', '>='].includes(operator)) return LOGICAL
  }
  if (left.type.kind === 'thing' && right.type.kind === 'thing' && left.type.thing === right.type.thing && equality)
    return LOGICAL
  const [a, b] = [quantityNode(left, context), quantityNode(right, context)]
  if (operator === '^') return powerType(a, rightAst, b)
  try {
    return binaryType(operator, a.type, b.type, { left: a.words, right: b.words })
  } catch (mistake) {
    throw mistake instanceof Problem ? new Problem(mistake.code, mistake.reason, span) : mistake
  }
}

const HIGHEST_POWER = 99

function powerType(base: Compiled & { readonly type: QuantityType }, exponentAst: Ast, exponent: Compiled): Type {
  if (!fits(exponent.type, NUMBER))
    throw new Problem('dimension', `${exponent.words} is no plain number: it cannot be an exponent`, exponent.span)
  if (fits(base.type, NUMBER)) return NUMBER
  const value = constantOf(exponentAst)
  if (value === null) {
    throw new Problem(
      'dimension',
      `${base.words} has a unit, so its exponent has to be a number that stands in the formula`,
      exponent.span,
    )
  }
  const dimension = power(base.type.dimension, value)
  if (dimension.some((exponent) => Math.abs(exponent) > HIGHEST_POWER))
    throw new Problem('dimension', `nothing is measured in such a power of ${base.words}`, exponent.span)
  return derived(dimension)
}

function constantOf(ast: Ast): number | null {
  if (ast.type === 'number') return ast.value
  if (ast.type === 'negative') {
    const of = constantOf(ast.of)
    return of === null ? null : -of
  }
  if (ast.type !== 'binary' || ast.operator !== '/') return null
  const [over, under] = [constantOf(ast.left), constantOf(ast.right)]
  return over === null || under === null || under === 0 ? null : over / under
}
