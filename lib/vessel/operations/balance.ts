import type { Network } from '../network/system'
import { evenWall, wallEnergy } from '../shell/temperatures'
import type { Plan } from './simulate'

/**
 * Relative residuals of mass and energy over all volumes of a run: what they hold at the end, less what they held at the
 * start, less what has crossed the borders. What they hold is worked out anew from the states that are reported
 * (density and temperature, by another way into the fluid's equation, and cell temperatures), not from the masses and
 * energies that were integrated.
 */
export function balanceOf(plan: Plan, network: Network, y: Float64Array) {
  let mass = 0
  let energy = 0
  let massScale = 0
  let energyScale = 0
  network.volumes.forEach((volume, i) => {
    const from = plan.from[i]
    const { gas, wall, vessel, fluid, cells_K } = volume
    const m = gas.rho_kg_m3 * vessel.volume_m3
    const u = fluid.state('rhoT', gas.rho_kg_m3, gas.T_K).u_J_kg
    const into = network.heatLedger(i)
    const lost = into + 1
    mass += m - from.m_kg
    energy += m * u - (from.m_kg > 0 ? from.m_kg * from.u_J_kg : 0)
    if (wall.cells > 0) energy += wallEnergy(wall, cells_K) - wallEnergy(wall, from.shell.cells_K)
    if (volume.heat === 'isothermal') energy -= volume.heldBy_J
    if (volume.cells > 0) energy += y[lost]
    massScale = Math.max(massScale, m, from.m_kg)
    energyScale = Math.max(energyScale, m * gas.cv_J_kgK * gas.T_K, Math.abs(y[into]), Math.abs(y[lost]))
    // Where gas and shell share one temperature, their energies are found together and no more exactly than that.
    if (volume.heat === 'shell_at_gas_temperature') {
      energyScale = Math.max(energyScale, evenWall(wall, gas.T_K).capacity_J_K * gas.T_K)
    }
  })
  network.connections.forEach(({ from, to }, i) => {
    const passed = network.flowLedger(i)
    const enthalpy = passed + 1
    const inward = ('volume' in to ? 1 : 0) - ('volume' in from ? 1 : 0)
    mass -= inward * y[passed]
    energy -= inward * y[enthalpy]
    massScale = Math.max(massScale, Math.abs(y[passed]))
  })
  return { energy: Math.abs(energy) / energyScale, mass: Math.abs(mass) / massScale }
}
