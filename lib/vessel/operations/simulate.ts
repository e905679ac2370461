import { Problem } from '@/lib/errors'
import { integrate, type Outcome } from '@/lib/numerics/ode'
import type { Connection } from '../network/connection'
import { Recorder } from '../network/recorder'
import { Network } from '../network/system'
import type { ControlVolume } from '../network/volume'
import type { Operation, Run, StoppedBy, Stops } from '../run'
import { bar, celsius, duration, kilograms, kilogramsPerSecond } from '../words'
import { balanceOf } from './balance'
import { begin } from './begin'
import { report } from './report'
import type { Numerics } from './requests'
import { changeWatches, coldWatch, settledWatch, watchesFor, type NamedWatch } from './watches'

/** A stop at the very pressure that it settles to counts as reached so near to it, relative. */
const NEAR_ENOUGH = 4e-6
const DEFAULT_RTOL = 1e-6
/** A balance has no time to resolve: it is integrated over the mass that passes, nearly exactly. */
const BALANCE_RTOL = 1e-10
const DEFAULT_HORIZON_s = 30 * 86_400
/** In a balance the independent variable is the mass passed over a typical mass; this is more than can pass. */
const BALANCE_HORIZON = 1e4

export interface Plan extends Numerics {
  readonly operation: Operation
  /** The first is the one that the stops refer to. */
  readonly volumes: readonly ControlVolume[]
  readonly from: readonly Run[]
  readonly connections: readonly Connection[]
  readonly stops: Stops
  /** A balance alone: no time. */
  readonly timeless: boolean
}

/** Carries a plan out: one run for each volume. */
export function simulate(plan: Plan): Run[] {
  const { volumes, stops, timeless } = plan
  if (timeless && stops.for_s !== undefined) {
    throw new Problem('argument', 'a balance has no time in it: to stop after a time, give a path')
  }
  const network = new Network(volumes, plan.connections)
  const y0 = begin(plan, network)
  const watches = watchesFor(volumes[0], plan.connections, stops)
  // A run that is to last a given time goes on when nothing changes any more; any other could then never end.
  if (stops.settled || stops.for_s === undefined) watches.push(settledWatch(network))
  watches.push(coldWatch(volumes), ...plan.connections.flatMap(changeWatches))
  network.events = watches
  const recorders = volumes.map((_, i) => new Recorder(network, i, plan.from[i].shell.mean_K, !timeless))
  const horizon = timeless ? BALANCE_HORIZON : (plan.horizon_s ?? DEFAULT_HORIZON_s)
  const outcome = integrate(network, y0, {
    until: stops.for_s ?? horizon,
    rtol: timeless ? BALANCE_RTOL : (plan.rtol ?? DEFAULT_RTOL),
    method: volumes.some((volume) => volume.cells > 1) ? 'stiff' : 'auto',
    onPoint: (t, _y, f, step) => {
      const moments = recorders.map((recorder) => recorder.look(f))
      recorders.forEach((recorder, i) => recorder.add(t, moments[i], step))
    },
  })
  const stoppedBy = whatStopped(plan, outcome, outcome.event >= 0 ? watches[outcome.event].name : null, recorders[0])
  network.rates(outcome.y, new Float64Array(network.size))
  const balance = balanceOf(plan, network, outcome.y)
  return volumes.map((_, i) =>
    report({ plan, network, index: i, y: outcome.y, recorder: recorders[i], stoppedBy, outcome, balance }),
  )
}

function whatStopped(plan: Plan, outcome: Outcome, event: NamedWatch['name'] | null, recorder: Recorder): StoppedBy {
  const { stops } = plan
  const at = () => `${bar(recorder.end.p_Pa)}, ${celsius(recorder.end.T_K)}`
  const after = plan.timeless ? '' : ` after ${duration(outcome.t)}`
  switch (outcome.status) {
    case 'event':
      if (event === 'settled' && !stops.settled && wished(stops)) {
        if (reachedAsNearAsCan(stops, recorder)) return 'until_p'
        throw new Problem('impossible', `it settles at ${at()}${after} without reaching ${wished(stops)}`)
      }
      if (event === null || event === 'change') throw new Error('a change in how gas flows does not end a run')
      return event
    case 'end':
      if (stops.for_s !== undefined) return 'for'
      throw new Problem('unreached', `it has come to ${at()}${after}, and not to ${wished(stops) ?? 'rest'}`)
    case 'steps':
    case 'stuck':
      throw outcome.cause
        ? new Problem(outcome.cause.code, `at ${at()}${after}: ${outcome.cause.reason}`)
        : new Problem('unconverged', `the calculation did not get beyond ${at()}${after}`)
  }
}

/** A stop at the very pressure of what it is joined to. */
function reachedAsNearAsCan({ until_p_Pa = NaN }: Stops, { end }: Recorder) {
  return Math.abs(end.p_Pa / until_p_Pa - 1) <= NEAR_ENOUGH
}

function wished(stops: Stops): string | null {
  const words: string[] = []
  if (stops.until_p_Pa !== undefined) words.push(bar(stops.until_p_Pa))
  if (stops.until_T_K !== undefined) words.push(celsius(stops.until_T_K))
  if (stops.until_m_kg !== undefined) words.push(kilograms(stops.until_m_kg))
  if (stops.until_x !== undefined) words.push(`quality ${stops.until_x}`)
  if (stops.until_flow_kg_s !== undefined) words.push(kilogramsPerSecond(stops.until_flow_kg_s))
  return words.length ? words.join(' or ') : null
}
