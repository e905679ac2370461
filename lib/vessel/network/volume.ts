import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import { film, heatIn, type Film } from '../heat/inside'
import { heatOut, type FaceHeat } from '../heat/outside'
import type { Draw, Heat, Run } from '../run'
import { evenWall, wallEnergy } from '../shell/temperatures'
import { NO_WALL, wallOf, type Wall } from '../shell/wall'
import type { Vessel } from '../vessel'
import { energyByDensity, pressureByDensity } from './derivatives'

const MAX_ROUNDS = 100
/** A liquid's pressure answers a thousandfold: so far its mass and energy are not resolved. */
const STIFFEST = 100

/**
 * A vessel while it is being integrated. Its part of the solution vector is mass, internal energy and, where heat passes
 * by coefficients, the energy of each cell of its shell; in the limit of a shell at the gas's temperature the shell's
 * energy is part of the second. Mass and energy, not density and temperature, so that what passes is conserved exactly.
 * Where temperature is held, the second is what the contents would have without the heat that holds it.
 */
export class ControlVolume {
  readonly wall: Wall
  /** Cells whose energies are part of the solution. */
  readonly cells: number
  readonly size: number
  /** State of the contents at the point last read. */
  gas: State
  /** Counts the states, so that what depends on one can tell whether it is still the same. */
  version = 0
  readonly cells_K: Float64Array
  readonly inner: FaceHeat = { heat_W: 0, face_K: 0 }
  readonly outer: FaceHeat = { heat_W: 0, face_K: 0 }
  /** Evaluations of the equation of state. */
  evaluations = 0
  m_kg = 0
  energy_J = 0
  /** Rates at the point last worked out. */
  dT_K_s = 0
  dp_Pa_s = 0
  /** Where an isothermal volume stays. */
  readonly fixed_K: number
  private readonly film: Film | null
  private filmVersion = -1
  private saturated: State | undefined
  private saturatedVersion = -1
  private saturatedQuality = 1

  constructor(
    readonly vessel: Vessel,
    readonly fluid: Fluid,
    readonly heat: Heat,
    from: Run,
    guess: State,
  ) {
    this.wall = heat === 'adiabatic' || heat === 'isothermal' ? NO_WALL : wallOf(vessel.shell)
    this.cells = heat === 'by_coefficients' ? this.wall.cells : 0
    this.size = 2 + this.cells
    this.cells_K = Float64Array.from(from.shell.cells_K.slice(0, this.wall.cells))
    this.film = this.cells > 0 ? filmOf(vessel, fluid) : null
    this.gas = guess
    this.fixed_K = from.T_K
  }

  get p_Pa() {
    return this.gas.p_Pa
  }

  /** Writes the solution vector's part for contents of this mass and energy, with the shell as it stands. */
  write(m_kg: number, u_J_kg: number, y: Float64Array, at: number) {
    y[at] = m_kg
    y[at + 1] = m_kg * u_J_kg
    if (this.heat === 'shell_at_gas_temperature') y[at + 1] += wallEnergy(this.wall, this.cells_K)
    for (let i = 0; i < this.cells; i++) {
      y[at + 2 + i] = this.wall.mass_kg[i] * this.wall.caloric[i].energy_J_kg(this.cells_K[i])
    }
  }

  /** Takes the state of the contents and the shell from the solution vector. */
  read(y: Float64Array, at: number) {
    const m = y[at]
    const energy = y[at + 1]
    if (m !== this.m_kg || energy !== this.energy_J) {
      if (!(m > 0)) throw new Problem('state', 'nothing is left in the vessel')
      this.m_kg = NaN
      this.flash(m, energy)
      this.m_kg = m
      this.energy_J = energy
      this.version++
    }
    const { mass_kg, caloric } = this.wall
    for (let i = 0; i < this.cells; i++) this.cells_K[i] = caloric[i].temperature_K(y[at + 2 + i] / mass_kg[i])
  }

  private flash(m: number, energy: number) {
    const rho = m / this.vessel.volume_m3
    switch (this.heat) {
      case 'by_coefficients':
      case 'adiabatic':
        this.gas = this.fluid.state('rhou', rho, energy / m, this.gas, this.gas)
        this.evaluations += this.gas.evaluations
        break
      case 'isothermal':
        this.gas = this.fluid.state('rhoT', rho, this.fixed_K, this.gas, this.gas)
        this.evaluations += this.gas.evaluations
        break
      case 'shell_at_gas_temperature':
        this.flashWithShell(m, rho, energy)
    }
  }

  /** The temperature at which gas and shell together hold this energy. */
  private flashWithShell(m: number, rho: number, energy: number) {
    const { T_min_K, T_max_K } = this.fluid.info
    let [low, high] = [T_min_K, T_max_K]
    let T = this.gas.T_K
    for (let round = 0; round < MAX_ROUNDS; round++) {
      this.gas = this.fluid.state('rhoT', rho, T, this.gas, this.gas)
      this.evaluations += this.gas.evaluations
      const shell = evenWall(this.wall, T)
      const short = energy - m * this.gas.u_J_kg - shell.energy_J
      if (short > 0) low = T
      else high = T
      const step = short / (m * this.gas.cv_J_kgK + shell.capacity_J_K)
      if (Math.abs(step) <= 1e-14 * T || high - low <= 1e-14 * T) {
        this.cells_K.fill(T)
        return
      }
      // The heat capacity of the contents jumps where a phase appears: Newton's step is held between bounds.
      T = T + step > low && T + step < high ? T + step : (low + high) / 2
    }
    throw new Problem('unconverged', 'no temperature at which gas and shell together hold their energy was found')
  }

  /** Heat that has held the temperature, J. */
  get heldBy_J() {
    return this.m_kg * this.gas.u_J_kg - this.energy_J
  }

  /** What leaves, at rest. */
  rest(draw: Draw): State {
    const { gas } = this
    if (draw === 'mixed' || !(gas.x >= 0 && gas.x <= 1)) return gas
    return this.phaseOf(draw === 'vapour' ? 1 : 0)
  }

  private phaseOf(quality: 0 | 1): State {
    if (this.saturatedVersion !== this.version || this.saturatedQuality !== quality || !this.saturated) {
      this.saturated = this.fluid.state('Tx', this.gas.T_K, quality, this.saturated, this.saturated)
      this.evaluations += this.saturated.evaluations
      this.saturatedVersion = this.version
      this.saturatedQuality = quality
    }
    return this.saturated
  }

  /** Heat through both faces, with so much flowing in. */
  passHeat(inflow_kg_s: number) {
    if (!this.film) return
    const { vessel, wall, gas, cells_K } = this
    if (this.filmVersion !== this.version) {
      // In two phases it is the vapour that touches most of the wall, as a phase by itself.
      this.film.setGas(gas.x >= 0 ? this.fluid.saturationAtT(gas.T_K).vapour : gas)
      this.filmVersion = this.version
    }
    this.film.setInflow(inflow_kg_s)
    heatIn(this.film, wall.innerArea_m2, gas.T_K, cells_K[0], wall.innerResistance_K_W, this.inner)
    heatOut(
      vessel.outside,
      wall.outerArea_m2,
      cells_K[this.cells - 1],
      wall.outerResistance_K_W,
      vessel.ambient_T_K,
      this.outer,
    )
  }

  /**
   * Adds conduction to rates that already hold what flows in and out, and works out how temperature and pressure go.
   * Returns the heat that goes into the contents.
   */
  settleRates(out: Float64Array, at: number): number {
    const { wall } = this
    let heat = 0
    if (this.cells > 0) {
      heat = this.inner.heat_W
      out[at + 2] -= heat
      for (let i = 0; i + 1 < this.cells; i++) {
        const across = wall.conductance_W_K[i] * (this.cells_K[i] - this.cells_K[i + 1])
        out[at + 2 + i] -= across
        out[at + 3 + i] += across
      }
      out[at + 1 + this.cells] -= this.outer.heat_W
    }
    out[at + 1] += heat
    this.dT_K_s = this.temperatureRate(out[at], out[at + 1])
    this.dp_Pa_s = this.pressureRate(out[at], out[at + 1])
    return heat
  }

  /** dT/dt when mass and energy of what the volume holds change at these rates. */
  private temperatureRate(dm: number, dE: number): number {
    if (this.heat === 'isothermal') return 0
    let capacity = this.m_kg * this.gas.cv_J_kgK
    if (this.heat === 'shell_at_gas_temperature') capacity += evenWall(this.wall, this.gas.T_K).capacity_J_K
    return (dE - this.energyWithMass() * dm) / capacity
  }

  /** dp/dt when mass and energy of what the volume holds change at these rates. */
  pressureRate(dm: number, dE: number): number {
    return (
      this.gas.dpdT_rho_Pa_K * this.temperatureRate(dm, dE) + (this.gas.dpdrho_T_Pa_m3_kg * dm) / this.vessel.volume_m3
    )
  }

  /** d(m u)/dm at constant temperature and volume. */
  private energyWithMass(): number {
    return this.gas.u_J_kg + energyByDensity(this.gas) * this.gas.rho_kg_m3
  }

  /**
   * Magnitudes for the tolerance. Where pressure answers more than in proportion (a liquid, two phases) they are smaller
   * by as much, so that it too is good to the tolerance.
   */
  scales(out: Float64Array, at: number) {
    const { gas, m_kg, wall, cells_K } = this
    const toMass = (gas.rho_kg_m3 * Math.abs(pressureByDensity(gas))) / gas.p_Pa
    const toEnergy = (gas.T_K * Math.abs(gas.dpdT_rho_Pa_K)) / gas.p_Pa
    out[at] = m_kg / Math.min(STIFFEST, Math.max(1, toMass))
    out[at + 1] = (m_kg * gas.cv_J_kgK * gas.T_K) / Math.min(STIFFEST, Math.max(1, toEnergy))
    if (this.heat === 'shell_at_gas_temperature') out[at + 1] += evenWall(wall, gas.T_K).capacity_J_K * gas.T_K
    for (let i = 0; i < this.cells; i++) {
      out[at + 2 + i] = wall.mass_kg[i] * wall.caloric[i].capacity_J_kgK(cells_K[i]) * cells_K[i]
    }
  }
}

function filmOf(vessel: Vessel, fluid: Fluid): Film {
  if (!vessel.inside) throw new Problem('argument', 'the vessel has a shell but no inside coefficient')
  return film(vessel.inside, fluid)
}
