import { isThing } from '@/lib/formula'
import type { Value } from '@/lib/formula'
import type { Limits, Run, Trace } from '@/lib/vessel'

/** A run as plots draw it: plain arrays in SI, one entry for each point, with the limits of its vessel. */
export interface RunCurves {
  readonly trace: Trace
  readonly limits: Limits
}

/** Null where there is no run, or a run with no time in it. */
export function runCurves(value: Value): RunCurves | null {
  if (!isThing(value) || value.thing !== 'run') return null
  const { trace, vessel } = value.value as Run
  return trace && { trace, limits: vessel.limits ?? {} }
}
