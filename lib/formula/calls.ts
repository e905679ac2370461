import { Problem } from '@/lib/errors'
import type { Span } from '@/lib/errors'
import type { Ast, ArgumentAst } from './ast'
import { guarded } from './node'
import type { Compiled, Context, Frame } from './node'
import { parse } from './parse'
import { meaningOf } from './names'
import { suggestion } from './nearest'
import { TEXT, fits, typeWords } from './typing'
import type { FunctionSpec, Parameter, Scope, Type, Value, Vocabulary } from './types'
import { fault, isFault, isList } from './values'

type CallAst = Extract<Ast, { type: 'call' }>

/** A call against the function table: which argument is which, of what type, and which go together. */
export function compileCall(ast: CallAst, context: Context): Compiled {
  const spec = context.vocabulary.functions.get(ast.name.toLowerCase())
  if (!spec) {
    const meant = suggestion(ast.name, context.vocabulary.functions.keys())
    throw new Problem('name', `there is no function ${ast.name}${meant}`, ast.nameSpan)
  }
  const given = assign(spec, ast, context)
  const run = spec.lazy ? lazyRun(spec, given, ast.span) : eagerRun(spec, given, context, ast.span)
  const words = `${spec.name}(…)`
  return { type: resultType(spec, given, ast.span), run, words, span: ast.span }
}

/** Arguments by parameter; one that repeats has them all. */
type Given = ReadonlyMap<Parameter, readonly Compiled[]>

function assign(spec: FunctionSpec, ast: CallAst, context: Context): Given {
  const given = new Map<Parameter, Compiled[]>()
  const inOrder = spec.parameters.filter((parameter) => !parameter.named)
  let next = 0
  for (const argument of ast.args) {
    const parameter = argument.name === null ? inOrder[Math.min(next, inOrder.length - 1)] : named(spec, argument)
    const before = parameter && given.get(parameter)
    if (!parameter || (argument.name === null && next >= inOrder.length && !parameter.repeats))
      throw tooMany(spec, argument)
    if (before && !parameter.repeats) {
      throw new Problem(
        'argument',
        `${spec.name} is given ${parameter.name} twice`,
        argument.nameSpan ?? argument.value.span,
      )
    }
    if (argument.name === null) next++
    given.set(parameter, [
      ...(before ?? []),
      checked(argumentNode(argument, parameter, spec, context), parameter, spec, context.vocabulary),
    ])
  }
  for (const parameter of spec.parameters) {
    if (given.has(parameter)) continue
    if (parameter.default !== undefined) given.set(parameter, [standIn(parameter, context)])
    else if (!parameter.optional)
      throw new Problem('argument', `${spec.name} needs ${parameter.name}: ${parameter.help}`, ast.span)
  }
  const names = [...given.entries()].filter(([, args]) => isWritten(args)).map(([parameter]) => parameter.name)
  together(spec, names, ast.span)
  return given
}

function named(spec: FunctionSpec, { name, nameSpan }: ArgumentAst): Parameter {
  const parameter = spec.parameters.find((candidate) => candidate.name === name)
  if (parameter) return parameter
  const known = spec.parameters.map((candidate) => candidate.name)
  const meant = suggestion(name!, known) || (known.length > 0 ? `; it takes ${known.join(', ')}` : '')
  throw new Problem('argument', `${spec.name} has no argument ${name}${meant}`, nameSpan!)
}

function tooMany(spec: FunctionSpec, argument: ArgumentAst): Problem {
  const byName = spec.parameters.filter((parameter) => parameter.named).map((parameter) => parameter.name)
  const hint = byName.length > 0 ? `: name it, ${byName.slice(0, 6).join(', ')}${byName.length > 6 ? ' …' : ''}` : ''
  return new Problem('argument', `${spec.name} does not take this argument${hint}`, argument.value.span)
}

/** A bare word is a text where the table lists it as a choice: `draw: vapour`. */
function argumentNode(
  { value: ast }: ArgumentAst,
  parameter: Parameter,
  spec: FunctionSpec,
  context: Context,
): Compiled {
  const { choices } = parameter
  const bare = ast.type === 'reference' && ast.target.by === 'name' && !ast.row && !ast.target.bracketed
  const word = bare ? ast.target.name : ast.type === 'text' ? ast.value : null
  if (!choices || word === null) return context.node(ast, context)
  const choice = choices.find((candidate) => candidate.toLowerCase() === word.toLowerCase())
  if (choice !== undefined) return { type: TEXT, run: () => choice, words: choice, span: ast.span }
  if (bare && meaningOf(word, false, context.scope).is !== 'nothing') return context.node(ast, context)
  throw new Problem('argument', notAChoice(spec, parameter, word), ast.span)
}

const notAChoice = (spec: FunctionSpec, { name, choices = [] }: Parameter, word: string) =>
  `${name} of ${spec.name} is one of ${choices.join(', ')}, not “${word}”`

function checked(argument: Compiled, parameter: Parameter, spec: FunctionSpec, vocabulary: Vocabulary): Compiled {
  const wanted: readonly Type[] = Array.isArray(parameter.type) ? parameter.type : [parameter.type as Type]
  const offered = parameter.repeats && argument.type.kind === 'list' ? argument.type.of : argument.type
  if (wanted.some((type) => fits(offered, type))) return argument
  const [is, wants] = [
    typeWords(argument.type, vocabulary),
    wanted.map((type) => typeWords(type, vocabulary)).join(' or '),
  ]
  throw new Problem(
    'dimension',
    `${argument.words} is ${is}, but ${spec.name} takes ${wants} for ${parameter.name}`,
    argument.span,
  )
}

/** The formula that stands in for an argument that was left out. It is the table's own, so a mistake in it is ours. */
function standIn(parameter: Parameter, around: Context): Compiled {
  const text = parameter.default!
  const { ast, problem } = parse(text)
  if (!ast) throw new Error(`the default of ${parameter.name} does not parse: ${problem.reason}`)
  const context: Context = { ...around, text, scope: NO_NAMES, reads: [] }
  return { ...context.node(ast, context), span: NOWHERE }
}

const NO_NAMES: Scope = { columns: [], rows: [], things: [] }
const NOWHERE: Span = { from: 0, to: 0 }
const isWritten = (args: readonly Compiled[]) => args.every((argument) => argument.span !== NOWHERE)

function together(spec: FunctionSpec, given: readonly string[], span: Span): void {
  try {
    spec.together?.(given)
  } catch (mistake) {
    throw mistake instanceof Problem ? new Problem(mistake.code, mistake.reason, span) : mistake
  }
}

function resultType(spec: FunctionSpec, given: Given, span: Span): Type {
  if (typeof spec.result !== 'function') return spec.result
  const types: Record<string, Type | readonly Type[]> = {}
  for (const [parameter, args] of given)
    types[parameter.name] = parameter.repeats ? args.map((argument) => argument.type) : args[0].type
  try {
    return spec.result(types)
  } catch (mistake) {
    throw mistake instanceof Problem ? new Problem(mistake.code, mistake.reason, mistake.span ?? span) : mistake
  }
}

function eagerRun(spec: FunctionSpec, given: Given, context: Context, span: Span): Compiled['run'] {
  const parameters = [...given.entries()].map(([parameter, args]) => ({
    parameter,
    args,
    written: isWritten(args),
    standIn: parameter.default === undefined ? null : standIn(parameter, context),
  }))
  return (frame) => {
    const args: Record<string, Value> = {}
    const present: string[] = []
    const empty: Compiled[] = []
    for (const { parameter, args: compiled, written, standIn } of parameters) {
      let value = parameter.repeats ? gathered(compiled, frame, spec) : single(compiled[0], frame, parameter, spec)
      if (value === null) {
        empty.push(compiled[0])
        value = standIn?.run(frame) ?? null
      } else if (written) present.push(parameter.name)
      if (value === null) continue
      if (isFault(value) && !spec.takesFaults) return value
      args[parameter.name] = value
    }
    return guarded(() => {
      if (empty.length > 0) stillTogether(spec, present, empty)
      return spec.evaluate(args, frame.surroundings)
    }, span)
  }
}

/** An empty cell counts as an argument that was left out; which may be left out depends on the others. */
function stillTogether(spec: FunctionSpec, present: readonly string[], empty: readonly Compiled[]): void {
  try {
    spec.together?.(present)
  } catch (mistake) {
    if (!(mistake instanceof Problem)) throw mistake
    const which = empty.map(({ words }) => words).join(' and ')
    throw new Problem(mistake.code, `${mistake.reason}; ${which} ${empty.length > 1 ? 'are' : 'is'} empty`)
  }
}

function single(argument: Compiled, frame: Frame, parameter: Parameter, spec: FunctionSpec): Value {
  const value = argument.run(frame)
  if (value === null && !parameter.optional && parameter.default === undefined)
    return fault('argument', `${spec.name} needs ${parameter.name}, but ${argument.words} is empty`, argument.span)
  if (typeof value === 'string' && parameter.choices && !parameter.choices.includes(value))
    return fault('argument', notAChoice(spec, parameter, value), argument.span)
  return value
}

/** Whole columns and single values in one list; empty cells are passed over. */
function gathered(args: readonly Compiled[], frame: Frame, spec: FunctionSpec): Value {
  const list: Value[] = []
  for (const argument of args) {
    const value = argument.run(frame)
    for (const item of isList(value) ? value : [value]) {
      if (item === null) continue
      if (isFault(item) && !spec.takesFaults) {
        return item.fault === 'dependency' || !isList(value)
          ? item
          : fault('dependency', `needs ${argument.words}, in which there is an error`, argument.span)
      }
      list.push(item)
    }
  }
  return list
}

/** A lazy function is handed its arguments unworked, and sees for itself which are empty or have an error. */
function lazyRun(spec: FunctionSpec, given: Given, span: Span): Compiled['run'] {
  const parameters = [...given.entries()]
  return (frame) => {
    const args: Record<string, () => Value> = {}
    for (const [parameter, compiled] of parameters) {
      if (parameter.repeats) throw new Error(`${spec.name}: a lazy function repeats no argument`)
      args[parameter.name] = () => compiled[0].run(frame)
    }
    return guarded(() => spec.evaluateLazy!(args), span)
  }
}
