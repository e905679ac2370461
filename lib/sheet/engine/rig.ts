import { compile, isThing } from '@/lib/formula'
import type { Scope, Surroundings, Vocabulary } from '@/lib/formula'
import type { ThingDefinition } from '../doc/definition'
import { thingType } from '../types'
import { STANDARD_SURROUNDINGS } from './surroundings'

export const EMPTY_SCOPE: Scope = { columns: [], rows: [], things: [] }

/** A rig thing is its constructor, called with the arguments of its form: one mechanism for the panel and for a formula. */
export function constructorCall(thing: ThingDefinition): string {
  const given = Object.entries(thing.arguments).map(([name, source]) => `${name}: ${source}`)
  return `${thing.make}(${given.join(', ')})`
}

/** The surroundings hold for the whole sheet (gauge pressures, ambient temperature), so they read nothing of it. */
export function surroundingsOf(rig: readonly ThingDefinition[], vocabulary: Vocabulary): Surroundings {
  const thing = rig.find((candidate) => candidate.section === 'surroundings')
  if (!thing) return STANDARD_SURROUNDINGS
  const compilation = compile(constructorCall(thing), EMPTY_SCOPE, vocabulary, { expected: thingType('surroundings') })
  const value = compilation.ok ? compilation.run([], STANDARD_SURROUNDINGS) : null
  return isThing(value) ? (value.value as Surroundings) : STANDARD_SURROUNDINGS
}
