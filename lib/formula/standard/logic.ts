import { Problem } from '@/lib/errors'
import { LOGICAL, commonType } from '../typing'
import type { FunctionSpec, Parameter, Type, Value } from '../types'
import { isFault } from '../values'
import { ANY, GROUP, SOURCE } from './common'
import { one } from './types'

const CONDITION: Parameter = { name: 'condition', type: LOGICAL, help: 'a comparison, or yes or no' }
const CONDITIONS: Parameter = { name: 'conditions', type: LOGICAL, repeats: true, help: 'comparisons' }

function onlyEagerly(): never {
  throw new Error('a lazy function is asked for its arguments one by one')
}

function branches(types: readonly Type[], name: string): Type {
  const common = commonType(types)
  if (!common) throw new Problem('dimension', `the results of ${name} have to be of one kind`)
  return common
}

const eachOf = (value: Value | undefined): readonly Value[] => (value ?? []) as readonly Value[]

export const logicFunctions: readonly FunctionSpec[] = [
  {
    name: 'if',
    group: GROUP,
    parameters: [
      CONDITION,
      { name: 'then', type: ANY, help: 'the result where it holds' },
      { name: 'otherwise', type: ANY, optional: true, help: 'the result where it does not; left out: empty' },
    ],
    result: (types) => branches([one(types, 'then'), ...(types.otherwise ? [one(types, 'otherwise')] : [])], 'if'),
    help: 'one of two results; only the one that is taken is worked out',
    example: { formula: 'if(2 bar > 150 kPa, "over", "within")', shown: 'over' },
    source: SOURCE,
    lazy: true,
    evaluate: onlyEagerly,
    evaluateLazy: ({ condition, then, otherwise }) => {
      const holds = condition!()
      if (holds === null) throw new Problem('argument', 'the condition is empty')
      if (isFault(holds)) return holds
      return holds ? then!() : (otherwise?.() ?? null)
    },
  },
  {
    name: 'iferror',
    group: GROUP,
    parameters: [
      { name: 'value', type: ANY, help: 'what may be an error' },
      { name: 'otherwise', type: ANY, help: 'the result where it is' },
    ],
    result: (types) => branches([one(types, 'value'), one(types, 'otherwise')], 'iferror'),
    help: 'a value, or another in place of an error',
    example: { formula: 'iferror(1/0, 7)', shown: '7' },
    source: SOURCE,
    lazy: true,
    evaluate: onlyEagerly,
    evaluateLazy: ({ value, otherwise }) => {
      const tried = value!()
      return isFault(tried) ? otherwise!() : tried
    },
  },
  ...(['iserror', 'isblank'] as const).map((name): FunctionSpec => ({
    name,
    group: GROUP,
    parameters: [{ name: 'value', type: ANY, help: 'a cell, or any other value' }],
    result: LOGICAL,
    help: name === 'iserror' ? 'whether a value is an error' : 'whether a cell is empty',
    example: { formula: `${name}(1/0)`, shown: name === 'iserror' ? 'yes' : 'no' },
    source: SOURCE,
    lazy: true,
    evaluate: onlyEagerly,
    evaluateLazy: ({ value }) => (name === 'iserror' ? isFault(value!()) : value!() === null),
  })),
  {
    name: 'and',
    group: GROUP,
    parameters: [CONDITIONS],
    result: LOGICAL,
    help: 'whether all hold',
    example: { formula: 'and(1 < 2, 2 < 3)', shown: 'yes' },
    source: SOURCE,
    evaluate: (args) => eachOf(args.conditions).every(Boolean),
  },
  {
    name: 'or',
    group: GROUP,
    parameters: [CONDITIONS],
    result: LOGICAL,
    help: 'whether any holds',
    example: { formula: 'or(1 > 2, 2 < 3)', shown: 'yes' },
    source: SOURCE,
    evaluate: (args) => eachOf(args.conditions).some(Boolean),
  },
  {
    name: 'not',
    group: GROUP,
    parameters: [CONDITION],
    result: LOGICAL,
    help: 'the opposite',
    example: { formula: 'not(1 > 2)', shown: 'yes' },
    source: SOURCE,
    evaluate: (args) => !args.condition,
  },
]
