import { parse, print } from '@/lib/formula'
import type { FunctionSpec, Parameter, Type } from '@/lib/formula'
import type { RigSection } from '@/lib/sheet/doc/definition'
import { FUNCTIONS, VOCABULARY } from '@/lib/sheet/engine/vocabulary'

/** Constructors of the function table that make one kind of thing, in the order of the table. */
export const constructorsOf = (kind: string): readonly FunctionSpec[] =>
  FUNCTIONS.filter(
    (spec) => typeof spec.result === 'object' && spec.result.kind === 'thing' && spec.result.thing === kind,
  )

/** What can be added to a section of the rig. Gases there are always by name; ideal ones have a constructor of their own. */
export const addable = (section: RigSection): readonly FunctionSpec[] => constructorsOf(section)

export const constructorNamed = (make: string): FunctionSpec | undefined => VOCABULARY.functions.get(make.toLowerCase())

export const typesOf = (parameter: Parameter): readonly Type[] =>
  Array.isArray(parameter.type) ? (parameter.type as readonly Type[]) : [parameter.type as Type]

/** The kind of thing a parameter takes, where that has constructors of its own to be filled in. */
export function nestedKind(parameter: Parameter): string | null {
  const thing = typesOf(parameter).find((type) => type.kind === 'thing')
  const kind = thing?.kind === 'thing' ? thing.thing : null
  return kind !== null && kind !== 'gas' && kind !== 'vessel' && constructorsOf(kind).length > 0 ? kind : null
}

export interface CallParts {
  readonly make: string
  /** One text for each parameter; those of one that repeats are in order. */
  readonly arguments: Readonly<Record<string, string>>
  readonly repeated: readonly string[]
}

/** A constructor call in parts; null where the text is something else. */
export function partsOfCall(text: string): CallParts | null {
  const { ast } = parse(text)
  if (ast?.type !== 'call') return null
  const spec = constructorNamed(ast.name)
  if (!spec) return null
  const inOrder = spec.parameters.filter((parameter) => !parameter.named)
  const given: Record<string, string> = {}
  const repeated: string[] = []
  let next = 0
  for (const argument of ast.args) {
    const parameter = argument.name === null ? inOrder[Math.min(next++, inOrder.length - 1)] : undefined
    if (parameter?.repeats) repeated.push(print(argument.value))
    else given[argument.name ?? parameter?.name ?? ''] = print(argument.value)
  }
  return { make: spec.name, arguments: given, repeated }
}

/** The call again, arguments in the order of the table. */
export function callText({ make, arguments: given, repeated }: CallParts): string {
  const spec = constructorNamed(make)
  const named = (spec?.parameters ?? [])
    .filter((parameter) => !parameter.repeats && given[parameter.name]?.trim())
    .map((parameter) => `${parameter.name}: ${given[parameter.name].trim()}`)
  return `${make}(${[...repeated.filter((text) => text.trim()), ...named].join(', ')})`
}
