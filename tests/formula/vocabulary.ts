import { Problem } from '@/lib/errors'
import { STANDARD_FUNCTIONS, STANDARD_WORDS, compile } from '@/lib/formula'
import type { Expectation, FunctionSpec, Scope, Type, Value, Vocabulary } from '@/lib/formula'
import { quantity } from '@/lib/units'

/** A small vocabulary of its own: the language is tested without fluids or vessels. */

export const quantityType = (id: string): Type => {
  const { dimension, scale } = quantity(id)
  return { kind: 'quantity', dimension, scale }
}

export const AROUND = { p_Pa: 100_000, T_K: 290 }

let calls = 0
export const callsOfCostly = () => calls

const tank: FunctionSpec = {
  name: 'tank',
  group: 'Test',
  parameters: [
    { name: 'volume', type: quantityType('volume'), help: 'its volume' },
    { name: 'p', type: quantityType('pressure'), named: true, optional: true, help: 'its pressure' },
    { name: 'mode', type: { kind: 'text' }, named: true, optional: true, default: '"still"', help: 'how it is' },
  ],
  result: { kind: 'thing', thing: 'tank' },
  help: 'a tank',
  example: { formula: 'tank(5 L).volume', shown: '5 L' },
  evaluate: (args) => {
    if ((args.volume as number) <= 0) throw new Problem('range', 'a tank has to have a volume')
    return { thing: 'tank', key: JSON.stringify(args), shown: 'tank', value: args }
  },
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

export const VOCABULARY: Vocabulary = {
  functions: new Map([...STANDARD_FUNCTIONS, tank, costly].map((spec) => [spec.name, spec])),
  things: new Map([
    [
      'tank',
      {
        thing: 'tank',
        words: 'a tank',
        fields: [
          {
            name: 'volume',
            type: quantityType('volume'),
            help: 'volume',
            get: ((args: { volume: number }) => args.volume) as (value: never) => Value,
          },
          {
            name: 'mode',
            type: { kind: 'text' },
            help: 'mode',
            get: ((args: { mode: string }) => args.mode) as (value: never) => Value,
          },
        ],
      },
    ],
  ]),
  words: STANDARD_WORDS,
}

export const SCOPE: Scope = {
  columns: [
    { id: 'cp', symbol: 'p', type: quantityType('pressure') },
    { id: 'cT', symbol: 'T', type: quantityType('temperature') },
    { id: 'cd', symbol: 'dT', type: quantityType('temperature_difference') },
    { id: 'cm', symbol: 'm', type: quantityType('mass') },
    { id: 'cs', symbol: 'step', type: { kind: 'text' } },
  ],
  rows: [
    { id: 'r1', label: 'as received' },
    { id: 'r2', label: 'Fill quick' },
    { id: 'r3', label: 'stand' },
  ],
  things: [{ id: 'tA', name: 'Tank A', type: { kind: 'thing', thing: 'tank' } }],
}

/** What a formula gives when each cell it reads holds what `cells` says; the reason where it does not hold. */
export function valueOf(
  text: string,
  cells: Readonly<Record<string, Value>> = {},
  expectation?: Expectation,
): Value | string {
  const compilation = compile(text, SCOPE, VOCABULARY, expectation)
  if (!compilation.ok) return `! ${compilation.fault.reason}`
  const values = compilation.reads.map((read) =>
    read.kind === 'cell' ? (cells[read.column] ?? null) : (cells[read.thing] ?? null),
  )
  const value = compilation.run(values, AROUND)
  return typeof value === 'object' && value !== null && 'fault' in value ? `! ${value.reason}` : value
}
