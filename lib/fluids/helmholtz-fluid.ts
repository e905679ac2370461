import { Problem } from '@/lib/errors'
import { Chart, isFluid } from './chart'
import type { FluidData } from './equation-data'
import { DensityAtPressure } from './density'
import { flashAtDensity } from './flash-density'
import { flashAtPressure } from './flash-pressure'
import { flashPT, flashRhoT, flashTs } from './flash-temperature'
import { createState } from './fluid'
import type { Fluid, FluidInfo, Pair, Saturation, State } from './fluid'
import { HelmholtzEnergy } from './helmholtz'
import { PhaseBoundary } from './phase-boundary'
import { dpdrhoOf, evaluateAt, fillSinglePhase } from './properties'
import type { Scales } from './properties'
import { transportOf } from './transport'
import type { Transport } from './transport'
import { bar, kelvin, perCubicMetre } from './words'

/** Liquids at the highest pressures of any fluid here are within this many reducing densities. */
const DENSEST = 8
/** Thinner than the space between the planets: there is nothing to work out, and logarithms end. */
const THINNEST_Pa = 1e-9
const THINNEST_kg_m3 = 1e-15

/** A fluid by its multi-parameter Helmholtz equation of state. */
export class HelmholtzFluid implements Fluid {
  readonly id: string
  readonly name: string
  readonly info: FluidInfo
  readonly alpha: HelmholtzEnergy
  readonly scales: Scales
  /** One object for all searches of a density, so that they allocate nothing. */
  readonly densitySearch = new DensityAtPressure(this)
  private boundaryMade: PhaseBoundary | null = null
  private chartMade: Chart | null = null
  private transportMade: Transport | null = null

  constructor(private readonly data: FluidData) {
    const M = data.molarMass_kg_mol
    this.id = data.id
    this.name = data.name
    this.alpha = new HelmholtzEnergy(data)
    this.scales = {
      T_reducing_K: data.reducing.T_K,
      rho_reducing_kg_m3: data.reducing.rho_mol_m3 * M,
      R_J_kgK: data.gasConstant_J_molK / M,
    }
    const critical = data.criticalOfEquation ?? data.critical
    this.info = {
      formula: data.formula,
      cas: data.cas,
      molarMass_kg_mol: M,
      gasConstant_J_kgK: this.scales.R_J_kgK,
      critical: { T_K: critical.T_K, p_Pa: critical.p_Pa, rho_kg_m3: critical.rho_mol_m3 * M },
      triple: data.triple,
      T_min_K: data.limits.T_min_K,
      T_max_K: data.limits.T_max_K,
      p_max_Pa: data.limits.p_max_Pa,
      sources: data.sources,
      otherNames: data.otherNames,
    }
  }

  /** Made when it is first needed: it takes a millisecond or two. */
  get boundary(): PhaseBoundary {
    return (this.boundaryMade ??= this.once(() => new PhaseBoundary(this, this.data)))
  }

  /** Coarse, for first guesses: a few milliseconds more. */
  get chart(): Chart {
    return (this.chartMade ??= this.once(() => new Chart(this, this.boundary.table)))
  }

  /** What is made once is no part of what one state costs. */
  private once<T>(make: () => T): T {
    const before = this.alpha.evaluations
    const made = make()
    this.alpha.evaluations = before
    return made
  }

  get transport(): Transport {
    return (this.transportMade ??= transportOf(this.id, {
      T_reducing_K: this.scales.T_reducing_K,
      rho_reducing_kg_m3: this.scales.rho_reducing_kg_m3,
      molarMass_kg_mol: this.info.molarMass_kg_mol,
      gasConstant_J_kgK: this.scales.R_J_kgK,
      T_critical_K: this.info.critical!.T_K,
      rho_critical_kg_m3: this.info.critical!.rho_kg_m3,
      T_triple_K: this.info.triple!.T_K,
      acentricFactor: this.data.acentricFactor ?? 0,
      dpdrhoAt: (T_K, rho) => {
        evaluateAt(this.alpha, this.scales, T_K, rho)
        return dpdrhoOf(this.alpha, this.scales, T_K)
      },
      idealCp_J_kgK: (T_K) => this.idealCp_J_kgK(T_K),
    }))
  }

  state(pair: Pair, a: number, b: number, out: State = createState(), guess?: State): State {
    if (!Number.isFinite(a) || !Number.isFinite(b))
      throw new Problem('range', `a state of ${this.name} needs two numbers: one of them is none`)
    const before = this.alpha.evaluations
    this.flash(pair, a, b, out, guess)
    out.evaluations = this.alpha.evaluations - before
    return out
  }

  saturationAtT(T_K: number): Saturation {
    return this.boundary.saturationAtT(T_K)
  }

  saturationAtP(p_Pa: number): Saturation {
    return this.boundary.saturationAtP(p_Pa)
  }

  viscosity_Pa_s(state: State): number {
    return this.transport.viscosity_Pa_s(this.onePhase(state, 'viscosity'))
  }

  conductivity_W_mK(state: State): number {
    return this.transport.conductivity_W_mK(this.onePhase(state, 'thermal conductivity'))
  }

  idealCp_J_kgK(T_K: number): number {
    // at no density at all only the ideal part is left
    evaluateAt(this.alpha, this.scales, T_K, 1e-12 * this.scales.rho_reducing_kg_m3)
    return this.scales.R_J_kgK * (1 - this.alpha.B2)
  }

  /** One phase at a temperature and density, whether it is stable there or not. */
  singlePhase(T_K: number, rho_kg_m3: number, out: State): State {
    evaluateAt(this.alpha, this.scales, T_K, rho_kg_m3)
    fillSinglePhase(out, this.alpha, this.scales, T_K, rho_kg_m3)
    out.phase = this.phaseOf(out)
    return out
  }

  checkTemperature(T_K: number): void {
    const { T_min_K, T_max_K } = this.info
    // a hair's breadth, for what conversions between units do to the bound itself
    if (T_K >= T_min_K * (1 - 1e-9) && T_K <= T_max_K * (1 + 1e-9)) return
    if (!Number.isFinite(T_K)) throw new Problem('range', `the temperature of ${this.name} is no number`)
    const bound = T_K < T_min_K ? `below ${kelvin(T_min_K)}` : `above ${kelvin(T_max_K)}`
    throw new Problem('range', `no ${this.name} ${bound} here: T is ${kelvin(T_K)}`)
  }

  checkPressure(p_Pa: number): void {
    if (p_Pa >= THINNEST_Pa && p_Pa <= this.info.p_max_Pa * (1 + 1e-9)) return
    if (p_Pa > THINNEST_Pa)
      throw new Problem('range', `no ${this.name} above ${bar(this.info.p_max_Pa)} here: p is ${bar(p_Pa)}`)
    throw new Problem('range', `the absolute pressure of ${this.name} has to be above zero: p is ${bar(p_Pa)}`)
  }

  checkDensity(rho_kg_m3: number): void {
    if (!(rho_kg_m3 >= THINNEST_kg_m3)) throw new Problem('range', `the density of ${this.name} has to be above zero`)
    if (rho_kg_m3 > DENSEST * this.scales.rho_reducing_kg_m3)
      throw new Problem('range', `no ${this.name} is as dense as ${perCubicMetre(rho_kg_m3)} here`)
  }

  /**
   * Far into the solid an equation ceases to describe a fluid, and several temperatures then share one energy.
   * @throws Problem there
   */
  checkFluid(state: State): void {
    if (isFluid(state, this.boundary.table)) return
    throw new Problem(
      'state',
      `${this.name} is solid at ${kelvin(state.T_K)} and ${bar(state.p_Pa)}: its equation does not reach there`,
    )
  }

  private flash(pair: Pair, a: number, b: number, out: State, guess: State | undefined): State {
    switch (pair) {
      case 'pT':
        return flashPT(this, a, b, out, guess)
      case 'Ts':
        return flashTs(this, a, b, out, guess)
      case 'rhoT':
        return flashRhoT(this, a, b, out)
      case 'Tx':
        return this.boundary.mixedAtT(a, b, out)
      case 'px':
        return this.boundary.mixedAtP(a, b, out)
      case 'ph':
      case 'ps':
      case 'pu':
        return flashAtPressure(this, a, pair[1] as 'h' | 's' | 'u', b, out, guess)
      case 'rhou':
        return flashAtDensity(this, a, 'u', b, out, guess)
      case 'rhoh':
        return flashAtDensity(this, a, 'h', b, out, guess)
      case 'rhop':
        return flashAtDensity(this, a, 'p', b, out, guess)
    }
  }

  private onePhase(state: State, what: string): State {
    if (state.phase !== 'two-phase') return state
    throw new Problem('state', `${this.name} has no one ${what} in two phases: ask it of the liquid or the vapour`)
  }

  private phaseOf({ T_K, p_Pa, rho_kg_m3 }: State): State['phase'] {
    const critical = this.info.critical!
    if (T_K >= critical.T_K) return p_Pa >= critical.p_Pa ? 'supercritical' : 'gas'
    return rho_kg_m3 > critical.rho_kg_m3 ? 'liquid' : 'gas'
  }
}
