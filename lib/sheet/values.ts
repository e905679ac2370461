import type { ProblemCode, Span } from '@/lib/errors'

/** What the engine worked out for one cell or rig thing: plain data, so that it crosses to and from a worker. */
export type CellValue =
  | { readonly kind: 'empty' }
  | { readonly kind: 'number'; readonly si: number }
  | { readonly kind: 'text'; readonly text: string }
  | { readonly kind: 'logical'; readonly value: boolean }
  | { readonly kind: 'thing'; readonly thing: string; readonly key: string; readonly shown: string }
  | { readonly kind: 'error'; readonly code: ProblemCode; readonly reason: string; readonly span?: Span }

/** Beyond which limit of its column a value lies. */
export type LimitMark = 'over' | 'under'

/** The limits of a cell's column, worked out for its row, in SI. */
export interface Limits {
  readonly high?: number
  readonly low?: number
}

/** What changed since the engine last spoke; an empty value or empty limits are a change too. */
export interface ValueChanges {
  /** By cellKey. */
  readonly cells: ReadonlyMap<string, CellValue>
  readonly limits: ReadonlyMap<string, Limits>
  /** By thing id. */
  readonly things: ReadonlyMap<string, CellValue>
  readonly ambient_Pa: number
}
