import { Problem } from '@/lib/errors'
import type { Path } from '../paths/kinds'
import type { Run } from '../run'

/** What a path is to be sized for. */
export type Target =
  | { readonly time_s: number }
  | { readonly T_peak_K: number }
  | { readonly T_low_K: number }
  | { readonly shell_peak_K: number }
  | { readonly shell_low_K: number }
  | { readonly flow_peak_kg_s: number }

export interface Sized {
  /** A diameter in m, or a Kv in m³/h. */
  readonly size: number
  readonly path: Path
  readonly run: Run
  /** How far the run is from the target, relative. */
  readonly residual: number
  /** Runs that it took. */
  readonly runs: number
}

const TOLERANCE = 1e-7
const MAX_WIDENINGS = 24
const MAX_RUNS = 70

/** Sizes looked at: diameters from 10 µm to 1 m, Kv from 1e-5 to 1e5 m³/h; the search begins between. */
const RANGES = {
  orifice: { least: 1e-5, first: 3e-3, most: 1 },
  valve: { least: 1e-5, first: 0.3, most: 1e5 },
}

/**
 * The orifice (by its diameter) or valve (by its Kv) through which an operation meets a target.
 * @throws Problem `impossible` where no size does, with how near it comes.
 */
export function sizePath(
  path:
    | { readonly kind: 'orifice'; readonly dischargeCoefficient: number }
    | { readonly kind: 'valve'; readonly xT: number },
  operation: (path: Path) => Run,
  target: Target,
): Sized {
  const [name, wished] = Object.entries(target)[0] as [keyof Run, number]
  const range = RANGES[path.kind]
  let runs = 0
  const attempt = (logSize: number) => {
    const size = Math.exp(logSize)
    const made: Path = path.kind === 'orifice' ? { ...path, diameter_m: size } : { ...path, Kv_m3_h: size }
    const run = operation(made)
    runs++
    const reached = run[name]
    if (typeof reached !== 'number') throw new Problem('impossible', 'a balance has no time in it: nothing to size for')
    return { logSize, made, run, off: reached / wished - 1 }
  }
  type Attempt = ReturnType<typeof attempt>
  const answer = ({ logSize, made, run, off }: Attempt): Sized => ({
    size: Math.exp(logSize),
    path: made,
    run,
    residual: Math.abs(off),
    runs,
  })
  let low = attempt(Math.log(range.first))
  let high = low
  // Widen to both sides in turn until the target lies between.
  for (let widening = 0; low.off * high.off > 0; widening++) {
    const step = Math.log(4)
    const [least, most] = [Math.log(range.least), Math.log(range.most)]
    if (widening === MAX_WIDENINGS || (low.logSize === least && high.logSize === most)) {
      const nearest = Math.abs(low.off) < Math.abs(high.off) ? low : high
      throw new Problem(
        'impossible',
        `no size does it: the nearest comes within ${(100 * Math.abs(nearest.off)).toPrecision(3)} %`,
      )
    }
    const upward = high.logSize < most && (widening % 2 === 0 || low.logSize === least)
    if (upward) {
      const next = attempt(Math.min(most, high.logSize + step))
      if (next.off * high.off <= 0) low = high
      high = next
    } else {
      const next = attempt(Math.max(least, low.logSize - step))
      if (next.off * low.off <= 0) high = low
      low = next
    }
  }
  let weight = 1
  let lastSide = 0
  while (runs < MAX_RUNS) {
    const nearest = Math.abs(low.off) < Math.abs(high.off) ? low : high
    if (Math.abs(nearest.off) <= TOLERANCE || high.logSize - low.logSize < 1e-12) return answer(nearest)
    const [wl, wh] = lastSide > 0 ? [1, weight] : [weight, 1]
    const secant = low.logSize + ((high.logSize - low.logSize) * low.off * wl) / (low.off * wl - high.off * wh)
    const x = secant > low.logSize && secant < high.logSize ? secant : (low.logSize + high.logSize) / 2
    const next = attempt(x)
    const side = next.off * low.off > 0 ? 1 : -1
    weight = side === lastSide ? weight / 2 : 1
    lastSide = side
    if (side > 0) low = next
    else high = next
  }
  return answer(Math.abs(low.off) < Math.abs(high.off) ? low : high)
}
