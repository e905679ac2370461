import type { Value } from '@/lib/formula'
import type { Run } from '@/lib/vessel'
import { isThing } from './content'

/** A run as plots draw it: plain arrays in SI over time in seconds, with the limits of its vessel. */
export interface RunCurves {
  readonly time_s: readonly number[]
  readonly p_Pa: readonly number[]
  readonly T_K: readonly number[]
  readonly shellT_K: readonly number[]
  readonly flow_kg_s: readonly number[]
  readonly limits: { readonly p_high_Pa?: number; readonly shell_high_K?: number; readonly shell_low_K?: number }
}

export function runCurves(value: Value): RunCurves | null {
  if (!isThing(value as Value) || (value as { thing: string }).thing !== 'run') return null
  const { trace, vessel } = (value as { value: unknown }).value as Run
  return {
    time_s: trace.time_s,
    p_Pa: trace.p_Pa,
    T_K: trace.T_K,
    shellT_K: trace.shellT_K,
    flow_kg_s: trace.flow_kg_s,
    limits: vessel.limits,
  }
}
