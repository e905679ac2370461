import type { ProblemCode, Span } from '@/lib/errors'
import type { Fault, Thing, Value } from './types'

export const isFault = (value: Value | undefined): value is Fault =>
  typeof value === 'object' && value !== null && 'fault' in value

export const isThing = (value: Value | undefined): value is Thing =>
  typeof value === 'object' && value !== null && 'thing' in value

export const isList = (value: Value): value is readonly Value[] => Array.isArray(value)

export const fault = (code: ProblemCode, reason: string, span?: Span): Fault =>
  span ? { fault: code, reason, span } : { fault: code, reason }

/** What a formula is handed for `@from` in a state that starts from none. */
export const STARTS_FROM_NONE: Fault = fault('state', 'this state starts from none')
