import type { Outcome } from '@/lib/numerics/ode'
import type { Recorder } from '../network/recorder'
import type { Network } from '../network/system'
import type { Run, ShellState, StoppedBy } from '../run'
import { meanTemperature_K, wallEnergy } from '../shell/temperatures'
import type { Plan } from './simulate'

interface Ended {
  readonly plan: Plan
  readonly network: Network
  readonly index: number
  readonly y: Float64Array
  readonly recorder: Recorder
  readonly stoppedBy: StoppedBy
  readonly outcome: Outcome
  readonly balance: Run['balance']
}

/** The run of one volume, from where the network stands at its end. */
export function report({ plan, network, index, y, recorder, stoppedBy, outcome, balance }: Ended): Run {
  const volume = network.volumes[index]
  const from = plan.from[index]
  const { gas } = volume
  return {
    operation: plan.operation,
    vessel: volume.vessel,
    fluid: volume.fluid,
    p_Pa: gas.p_Pa,
    T_K: gas.T_K,
    m_kg: volume.m_kg,
    rho_kg_m3: gas.rho_kg_m3,
    u_J_kg: gas.u_J_kg,
    h_J_kg: gas.h_J_kg,
    s_J_kgK: gas.s_J_kgK,
    x: gas.x,
    phase: gas.phase,
    shell: shellOf(network, index, from),
    ...withEnd(recorder.extremes, gas.p_Pa, gas.T_K),
    moved_kg: volume.m_kg - from.m_kg,
    heat_J: heatOf(network, index, from, y),
    time_s: plan.timeless ? null : outcome.t,
    stoppedBy,
    balance,
    trace: plan.timeless ? null : recorder.trace,
    counts: {
      steps: outcome.steps,
      rejected: outcome.rejected,
      rates: network.calls,
      evaluations: network.evaluations,
    },
  }
}

/** The end state is found once more for the report, and may differ from the one recorded in its last digit. */
function withEnd(extremes: Recorder['extremes'], p_Pa: number, T_K: number): Recorder['extremes'] {
  return {
    ...extremes,
    T_peak_K: Math.max(extremes.T_peak_K, T_K),
    T_low_K: Math.min(extremes.T_low_K, T_K),
    p_peak_Pa: Math.max(extremes.p_peak_Pa, p_Pa),
    p_low_Pa: Math.min(extremes.p_low_Pa, p_Pa),
  }
}

function shellOf(network: Network, index: number, from: Run): ShellState {
  const { wall, cells_K, cells, inner, outer } = network.volumes[index]
  if (wall.cells === 0) return from.shell
  const T_K = cells_K[0]
  return {
    mean_K: meanTemperature_K(wall, cells_K),
    inner_K: cells > 0 ? inner.face_K : T_K,
    outer_K: cells > 0 ? outer.face_K : T_K,
    cells_K: Array.from(cells_K),
  }
}

/** Heat that the contents have taken up. */
function heatOf(network: Network, index: number, from: Run, y: Float64Array): number {
  const volume = network.volumes[index]
  const { wall, cells_K } = volume
  switch (volume.heat) {
    case 'adiabatic':
      return 0
    case 'by_coefficients':
      return y[network.heatLedger(index)]
    case 'isothermal':
      return volume.heldBy_J
    case 'shell_at_gas_temperature':
      return wallEnergy(wall, from.shell.cells_K) - wallEnergy(wall, cells_K)
  }
}
