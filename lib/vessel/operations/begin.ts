import { fallToZero } from '@/lib/numerics/ode'
import type { Connection } from '../network/connection'
import type { Network } from '../network/system'
import type { ControlVolume } from '../network/volume'
import type { Plan } from './simulate'

/** Pressure of the trace of gas that an evacuated vessel begins with. */
export const SEED_Pa = 1

/** The solution vector at the start, read by the network. */
export function begin(plan: Plan, network: Network): Float64Array {
  const y = new Float64Array(network.size)
  plan.volumes.forEach((volume, i) => {
    const { m_kg, u_J_kg } = plan.from[i]
    if (m_kg > 0) volume.write(m_kg, u_J_kg, y, network.at[i])
  })
  plan.volumes.forEach((volume, i) => {
    if (!(plan.from[i].m_kg > 0)) seed(network, i, volume, y)
  })
  network.rates(y, new Float64Array(network.size))
  return y
}

/**
 * An evacuated vessel has no temperature. It begins with a trace of gas that has come in already, and counts so: at the
 * temperature at which what flows in and the heat from the shell keep it, which is where an ever smaller trace tends to.
 */
function seed(network: Network, index: number, volume: ControlVolume, y: Float64Array) {
  const { fluid, vessel } = volume
  const at = network.at[index]
  const through = network.connections.findIndex(({ to }) => 'volume' in to && to.volume === volume)
  const connection = network.connections[through]
  const h = supplied(connection)
  const rho = fluid.state('pT', SEED_Pa, vessel.ambient_T_K).rho_kg_m3
  const m = rho * vessel.volume_m3
  volume.write(m, h, y, at)
  if (volume.cells > 0) {
    const rates = new Float64Array(network.size)
    const warming = (T_K: number) => {
      y[at + 1] = m * fluid.state('rhoT', rho, T_K).u_J_kg
      network.rates(y, rates)
      return volume.dT_K_s
    }
    const adiabatic = fluid.state('rhou', rho, h).T_K
    const shell_K = volume.cells_K[0]
    const [low, high] = [Math.min(shell_K, adiabatic), Math.max(shell_K, adiabatic)]
    const [atLow, atHigh] = [warming(low), warming(high)]
    if (atLow > 0 && atHigh < 0) warming(fallToZero(warming, low, atLow, high, atHigh, 1e-9 * atLow))
    // What the trace has taken up beyond its enthalpy has come from the shell.
    y[at + 2] -= y[at + 1] - m * h
    y[network.heatLedger(index)] = y[at + 1] - m * h
  }
  const ledger = network.flowLedger(through)
  y[ledger] = m
  y[ledger + 1] = m * h
  if ('volume' in connection.from) {
    const donor = network.at[network.volumes.indexOf(connection.from.volume)]
    y[donor] -= m
    y[donor + 1] -= m * h
  }
}

function supplied({ from }: Connection): number {
  if ('volume' in from) return from.volume.gas.h_J_kg
  const state = from.boundary.rest?.(SEED_Pa)
  if (!state) throw new Error('an evacuated vessel can only be charged')
  return state.h_J_kg
}
