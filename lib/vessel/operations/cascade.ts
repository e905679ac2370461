import { Problem } from '@/lib/errors'
import type { Path } from '../paths/kinds'
import type { Heat, Run, Stops } from '../run'
import type { Supply } from '../supply'
import { bar } from '../words'
import { charge, highest } from './charge'
import { join } from './join'
import type { Numerics } from './requests'

export interface CascadeRequest extends Numerics {
  readonly from: Run
  /** In the order in which they are opened, as a rule the lowest first. */
  readonly supplies: readonly Supply[]
  readonly through?: Path
  /** Goes on to the next supply when the flow has fallen to this; default: when pressures are equal. Needs a path. */
  readonly switchFlow_kg_s?: number
  readonly stops?: Pick<Stops, 'until_p_Pa' | 'until_T_K' | 'until_m_kg'>
  readonly heat?: Heat
}

export interface Cascade {
  readonly run: Run
  /** What is left of each supply, in the order given. */
  readonly supplies: readonly Supply[]
  /** One for each supply that was opened. */
  readonly stages: readonly { readonly supply: number; readonly run: Run }[]
}

/**
 * Charges from one supply after another. A supply that is no higher than the vessel is passed over.
 * @throws Problem `impossible` where the last supply leaves the stop unreached, or none has the pressure to begin.
 */
export function cascade(request: CascadeRequest): Cascade {
  const { from, supplies, through, switchFlow_kg_s, stops = {}, heat } = request
  if (switchFlow_kg_s !== undefined && !through) {
    throw new Problem('argument', 'going on at a flow needs a path: without one there is no flow')
  }
  const left = [...supplies]
  const stages: { supply: number; run: Run }[] = []
  let whole: Run | null = null
  for (let i = 0; i < supplies.length; i++) {
    const at: Run = whole ?? from
    if (!(highest(supplies[i]) > at.p_Pa * (1 + 1e-5))) continue
    const reachable =
      stops.until_p_Pa !== undefined && stops.until_p_Pa > highest(supplies[i]) ? undefined : stops.until_p_Pa
    const run = charge({
      from: at,
      supply: supplies[i],
      through,
      heat,
      rtol: request.rtol,
      horizon_s: request.horizon_s,
      stops: { ...stops, until_p_Pa: reachable, level: true, until_flow_kg_s: switchFlow_kg_s },
    })
    stages.push({ supply: i, run })
    if (run.supply) left[i] = run.supply
    whole = whole ? join(whole, run) : run
    if (run.stoppedBy !== 'level' && run.stoppedBy !== 'until_flow') break
  }
  if (!whole) throw new Problem('impossible', `no supply is above the vessel's ${bar(from.p_Pa)}: nothing flows in`)
  const asked = stops.until_p_Pa !== undefined || stops.until_T_K !== undefined || stops.until_m_kg !== undefined
  if (asked && (whole.stoppedBy === 'level' || whole.stoppedBy === 'until_flow')) {
    throw new Problem('impossible', `the last supply leaves the vessel at ${bar(whole.p_Pa)}, short of what was asked`)
  }
  return { run: { ...whole, operation: 'cascade', supply: undefined }, supplies: left, stages }
}
