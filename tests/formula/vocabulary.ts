import { Problem } from '@/lib/errors'
import { STANDARD_FUNCTIONS, STANDARD_WORDS, compile, isFault, reservedWords } from '@/lib/formula'
import type { Expectation, Fault, FunctionSpec, Scope, Thing, Type, Value, Vocabulary } from '@/lib/formula'
import { quantity } from '@/lib/units'

/** A small vocabulary of its own: the language is tested without fluids or vessels. */

export const quantityType = (id: string): Type => {
  const { dimension, scale } = quantity(id)
  return { kind: 'quantity', dimension, scale }
}
const thingType = (thing: string): Type => ({ kind: 'thing', thing })

export const AROUND = { p_Pa: 100_000, T_K: 290 }

let calls = 0
export const callsOfCostly = () => calls

export const tankOf = (volume: number): Thing => ({
  thing: 'tank',
  key: `tank ${volume}`,
  shown: 'a tank',
  value: { volume, mode: 'still' },
})
const ARGON: Thing = { thing: 'gas', key: 'argon', shown: 'argon', value: 0.04 }

const tank: FunctionSpec = {
  name: 'tank',
  group: 'Test',
  parameters: [
    { name: 'volume', type: quantityType('volume'), help: 'its volume' },
    { name: 'p', type: quantityType('pressure'), named: true, optional: true, help: 'its pressure' },
    {
      name: 'mode',
      type: { kind: 'text' },
      named: true,
      optional: true,
      default: '"still"',
      choices: ['still', 'stirred'],
      help: 'how it is',
    },
  ],
  result: thingType('tank'),
  help: 'a tank',
  example: { formula: 'tank(5 L).volume', shown: '5 L' },
  evaluate: (args) => {
    if ((args.volume as number) <= 0) throw new Problem('range', 'a tank has to have a volume')
    return { thing: 'tank', key: JSON.stringify(args), shown: 'tank', value: args }
  },
}

/** Needs two of three, as a state of a fluid does. */
const pairOf = (given: readonly string[]) => {
  if (given.length !== 3) throw new Problem('argument', 'state takes two of p, T and rho')
}
const state: FunctionSpec = {
  name: 'state',
  group: 'Test',
  parameters: [
    { name: 'gas', type: [thingType('gas'), { kind: 'text' }], help: 'a gas' },
    { name: 'p', type: quantityType('pressure'), named: true, optional: true, help: 'pressure' },
    { name: 'T', type: quantityType('temperature'), named: true, optional: true, help: 'temperature' },
    { name: 'rho', type: quantityType('density'), named: true, optional: true, help: 'density' },
  ],
  together: pairOf,
  result: quantityType('dimensionless'),
  help: 'how many arguments it was given',
  example: { formula: 'state(argon, p: 1 bar, T: 20 °C)', shown: '3' },
  evaluate: (args) => Object.keys(args).length,
}

const costly: FunctionSpec = {
  name: 'costly',
  group: 'Test',
  parameters: [],
  result: quantityType('dimensionless'),
  help: 'counts how often it is worked out',
  example: { formula: 'costly()', shown: '1' },
  evaluate: () => ++calls,
}

interface Inside {
  readonly volume: number
  readonly mode: string
}
const getter = (get: (inside: Inside) => Value) => get as (value: never) => Value

export const VOCABULARY: Vocabulary = {
  functions: new Map([...STANDARD_FUNCTIONS, tank, state, costly].map((spec) => [spec.name, spec])),
  things: new Map([
    [
      'tank',
      {
        thing: 'tank',
        words: 'a tank',
        fields: [
          { name: 'volume', type: quantityType('volume'), help: 'volume', get: getter(({ volume }) => volume) },
          { name: 'mode', type: { kind: 'text' }, help: 'mode', get: getter(({ mode }) => mode) },
        ],
      },
    ],
    ['gas', { thing: 'gas', words: 'a gas', fields: [] }],
  ]),
  words: new Map([...STANDARD_WORDS, ['argon', { type: thingType('gas'), value: ARGON, help: 'argon' }]]),
}

export const SCOPE: Scope = {
  columns: [
    { id: 'cp', symbol: 'p', type: quantityType('pressure') },
    { id: 'cT', symbol: 'T', type: quantityType('temperature') },
    { id: 'cd', symbol: 'dT', type: quantityType('temperature_difference') },
    { id: 'cr', symbol: 'rise', type: quantityType('pressure_difference') },
    { id: 'cm', symbol: 'm', type: quantityType('mass') },
    { id: 'cs', symbol: 'step', type: { kind: 'text' } },
    { id: 'cv', symbol: 'vessel', type: thingType('tank') },
  ],
  rows: [
    { id: 'r1', label: 'as received' },
    { id: 'r2', label: 'Fill quick' },
    { id: 'r3', label: 'stand' },
  ],
  things: [{ id: 'tA', name: 'Tank A', type: thingType('tank') }],
  words: reservedWords(VOCABULARY),
}

/** What a formula gives when each column or thing that it reads holds what `cells` says, by id. */
export function valueOf(text: string, cells: Readonly<Record<string, Value>> = {}, expectation?: Expectation): Value {
  const compilation = compile(text, SCOPE, VOCABULARY, expectation)
  if (!compilation.ok) return compilation.fault
  const values = compilation.reads.map((read) => cells[read.kind === 'cell' ? read.column : read.thing] ?? null)
  return compilation.run(values, AROUND)
}

/** The fault that a formula gives; throws where it gives a value. */
export function faultOf(text: string, cells: Readonly<Record<string, Value>> = {}, expectation?: Expectation): Fault {
  const value = valueOf(text, cells, expectation)
  if (!isFault(value)) throw new Error(`${text} gives ${JSON.stringify(value)}, and no fault`)
  return value
}
