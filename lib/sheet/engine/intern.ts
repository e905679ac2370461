import { CellError, EmptyValue, ErrorType, SimpleRangeValue } from 'hyperformula'
import { STARTS_FROM_NONE } from '@/lib/formula'
import type { Fault, Value } from '@/lib/formula'

/** What a cell of the dependency graph can hold, and what an argument that names cells can be. */
export type GraphScalar = number | boolean | string | typeof EmptyValue | CellError
export type GraphValue = GraphScalar | SimpleRangeValue

/** Stands in the graph where a formula reads the state that a row starts from, and the row starts from none. */
export const NO_START = '@none'

/**
 * The graph's cells hold numbers, logicals and text; ours also hold things and faults. Those stand in the graph as a
 * text mark that leads to the value here. Equal values get equal marks, so that the graph stops where nothing changed.
 */
export class Interned {
  private readonly values = new Map<string, Value>([[NO_START, STARTS_FROM_NONE]])

  toGraph(value: Value): GraphScalar {
    if (typeof value === 'number' || typeof value === 'boolean') return value
    if (value === null) return EmptyValue
    const mark = markOf(value)
    if (!this.values.has(mark)) this.values.set(mark, value)
    return mark
  }

  fromGraph(value: GraphValue): Value {
    if (typeof value === 'number' || typeof value === 'boolean') return value
    if (typeof value === 'string') return this.fromMark(value)
    if (value instanceof SimpleRangeValue) return value.data.flat().map((item) => this.fromGraph(item as GraphScalar))
    if (value instanceof CellError) return graphFault(value.type)
    return null
  }

  fromMark(mark: string): Value {
    return this.values.get(mark) ?? null
  }

  /** Forgets what no cell holds any more. */
  keepOnly(marks: ReadonlySet<string>): void {
    for (const mark of this.values.keys()) if (!marks.has(mark) && mark !== NO_START) this.values.delete(mark)
  }

  get size(): number {
    return this.values.size
  }
}

function markOf(value: Exclude<Value, number | boolean | null>): string {
  if (typeof value === 'string') return `"${value}`
  if ('thing' in value) return `#${value.key}`
  if ('fault' in value) return `!${JSON.stringify(value)}`
  throw new Error('a list is no cell value')
}

/** What the graph itself finds: a ring of cells. Anything else would be a mistake in how we drive it. */
export function graphFault(type: ErrorType): Fault {
  if (type === ErrorType.CYCLE) return { fault: 'cycle', reason: 'this cell needs itself' }
  throw new Error(`the dependency graph answered ${type}`)
}
