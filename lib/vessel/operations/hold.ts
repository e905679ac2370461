import { Problem } from '@/lib/errors'
import type { Run } from '../run'
import { evenShell } from '../shell/temperatures'
import { wallOf } from '../shell/wall'
import { heatFor, volumeFrom } from './parts'
import type { HoldRequest } from './requests'
import { simulate } from './simulate'

/** Keeps a vessel shut: for a time or until a stop, or (with no time in it) until everything is at one temperature. */
export function hold(request: HoldRequest): Run {
  const { from, to_T_K, stops = {} } = request
  const given = Object.values(stops).some((stop) => stop !== undefined && stop !== false)
  if (to_T_K !== undefined) {
    if (given) throw new Problem('argument', 'hold to a temperature, or until a stop: not both')
    return settledAt(from, to_T_K)
  }
  if (!given) throw new Problem('argument', 'say for how long to hold, or to which temperature')
  if (!(from.m_kg > 0)) throw new Problem('impossible', 'the vessel is empty: there is nothing to hold')
  const volume = volumeFrom(from, heatFor(undefined, from.vessel, false))
  const plan = { operation: 'hold', volumes: [volume], from: [from], connections: [], stops, timeless: false } as const
  return simulate({ ...plan, rtol: request.rtol, horizon_s: request.horizon_s })[0]
}

function settledAt(from: Run, T_K: number): Run {
  const { vessel, fluid } = from
  const wall = wallOf(vessel.shell)
  const shell = evenShell(wall, T_K)
  const settled = {
    operation: 'hold',
    vessel,
    fluid,
    T_K,
    shell,
    time_s: null,
    stoppedBy: 'settled',
    trace: null,
  } as const
  if (!(from.m_kg > 0)) return { ...from, ...settled }
  const state = fluid.state('rhoT', from.rho_kg_m3, T_K)
  return {
    ...settled,
    p_Pa: state.p_Pa,
    m_kg: from.m_kg,
    rho_kg_m3: from.rho_kg_m3,
    u_J_kg: state.u_J_kg,
    h_J_kg: state.h_J_kg,
    s_J_kgK: state.s_J_kgK,
    x: state.x,
    phase: state.phase,
    T_peak_K: Math.max(from.T_K, T_K),
    T_low_K: Math.min(from.T_K, T_K),
    p_peak_Pa: Math.max(from.p_Pa, state.p_Pa),
    p_low_Pa: Math.min(from.p_Pa, state.p_Pa),
    shell_peak_K: Math.max(from.shell.inner_K, from.shell.outer_K, shell.mean_K),
    shell_low_K: Math.min(from.shell.inner_K, from.shell.outer_K, shell.mean_K),
    flow_peak_kg_s: 0,
    moved_kg: 0,
    heat_J: from.m_kg * (state.u_J_kg - from.u_J_kg),
    balance: { energy: 0, mass: 0 },
    counts: { steps: 0, rejected: 0, rates: 0, evaluations: state.evaluations },
  }
}
