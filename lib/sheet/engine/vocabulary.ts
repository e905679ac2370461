import { STANDARD_FUNCTIONS, STANDARD_WORDS } from '@/lib/formula'
import type { FunctionSpec, Vocabulary } from '@/lib/formula'
import { RIG_SECTIONS } from '../doc/definition'
import type { RigSection } from '../doc/definition'
import { thingType } from '../types'
import { THINGS } from './fields'
import { GAS_WORDS, gasConstantFunctions, gasFunctions, gasThing } from './functions/gases'
import { operationFunctions } from './functions/operations'
import { pathFunctions } from './functions/paths'
import { propertyFunctions } from './functions/properties'
import { MATERIALS, materialThing, shellFunctions } from './functions/shells'
import { sizingFunctions } from './functions/sizing'
import { supplyFunctions } from './functions/supplies'
import { transferFunctions } from './functions/transfers'
import { vesselFunctions } from './functions/vessels'

/** The function table: the one place where the formula language meets fluids and vessels. */
export const FUNCTIONS: readonly FunctionSpec[] = [
  ...propertyFunctions,
  ...gasFunctions,
  ...gasConstantFunctions,
  ...operationFunctions,
  ...transferFunctions,
  ...sizingFunctions,
  ...vesselFunctions,
  ...shellFunctions,
  ...supplyFunctions,
  ...pathFunctions,
  ...STANDARD_FUNCTIONS,
]

export const VOCABULARY: Vocabulary = {
  functions: new Map(FUNCTIONS.map((spec) => [spec.name.toLowerCase(), spec])),
  things: new Map(THINGS.map((spec) => [spec.thing, spec])),
  words: new Map([
    ...STANDARD_WORDS,
    ...GAS_WORDS.map(
      ({ word, fluid }) => [word, { type: thingType('gas'), value: gasThing(fluid), help: fluid.name }] as const,
    ),
    ...MATERIALS.map(
      (material) =>
        [
          material.word,
          { type: thingType('material'), value: materialThing(material), help: material.table.source },
        ] as const,
    ),
  ]),
}

/** Where a thing stands in the rig panel, by what its constructor makes. */
export function sectionOf(make: string): RigSection {
  const result = VOCABULARY.functions.get(make.toLowerCase())?.result
  const kind = typeof result === 'object' && result.kind === 'thing' ? result.thing : 'vessel'
  return RIG_SECTIONS.find((section) => section === kind) ?? 'vessel'
}
