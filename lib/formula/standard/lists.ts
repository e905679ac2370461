import { Problem } from '@/lib/errors'
import { NUMBER } from '../typing'
import type { FunctionSpec } from '../types'
import { GROUP, SOURCE, VALUES, numbersOf } from './common'
import type { Example } from './common'
import { many, noReading, sameQuantity } from './types'

interface OverValues {
  readonly name: string
  readonly help: string
  readonly of: (values: readonly number[]) => number
  readonly example: Example
}

/** Functions of one or more values of one quantity, which give that quantity. */
const overValues = ({ name, help, of, example }: OverValues): FunctionSpec => ({
  name,
  group: GROUP,
  parameters: [VALUES],
  result: (types) => sameQuantity(many(types, 'values'), name),
  help,
  example,
  source: SOURCE,
  evaluate: (args) => {
    const values = numbersOf(args.values)
    if (values.length === 0) throw new Problem('argument', `${name} has nothing to work on: every cell is empty`)
    return of(values)
  },
})

const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0)

function middle(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b)
  const half = sorted.length >> 1
  return sorted.length % 2 === 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2
}

export const listFunctions: readonly FunctionSpec[] = [
  {
    ...overValues({
      name: 'sum',
      help: 'the sum',
      of: total,
      example: { formula: 'sum(1 kg, 500 g)', shown: '1.5 kg' },
    }),
    result: (types) => {
      const why = 'readings on a scale have no sum: two temperatures cannot be added'
      return noReading(sameQuantity(many(types, 'values'), 'sum'), why)
    },
    evaluate: (args) => total(numbersOf(args.values)),
  },
  overValues({
    name: 'average',
    help: 'the mean',
    of: (values) => total(values) / values.length,
    example: { formula: 'average(10 °C, 20 °C)', shown: '15 °C' },
  }),
  overValues({
    name: 'median',
    help: 'the value in the middle',
    of: middle,
    example: { formula: 'median(10 °C, 40 °C, 20 °C)', shown: '20 °C' },
  }),
  overValues({
    name: 'min',
    help: 'the least',
    of: (values) => values.reduce((a, b) => Math.min(a, b)),
    example: { formula: 'min(3 bar, 250 kPa)', shown: '2.5 bar' },
  }),
  overValues({
    name: 'max',
    help: 'the greatest',
    of: (values) => values.reduce((a, b) => Math.max(a, b)),
    example: { formula: 'max(3 bar, 250 kPa)', shown: '3 bar' },
  }),
  {
    name: 'count',
    group: GROUP,
    parameters: [VALUES],
    result: NUMBER,
    help: 'how many numbers there are; errors, texts and empty cells are not counted',
    example: { formula: 'count(1, 2 bar)', shown: '2' },
    source: SOURCE,
    takesFaults: true,
    evaluate: (args) => numbersOf(args.values).length,
  },
]
