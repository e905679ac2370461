import { Problem } from '@/lib/errors'
import type { FluidData } from './equation-data'
import { flashAtDensity } from './flash-density'
import { flashAtPressure } from './flash-pressure'
import { flashAtTemperature } from './flash-temperature'
import { createState } from './fluid'
import type { Fluid, FluidInfo, Pair, Saturation, State } from './fluid'
import { HelmholtzEnergy } from './helmholtz'
import { PhaseBoundary } from './phase-boundary'
import { evaluateAt, fillSinglePhase } from './properties'
import type { Scales } from './properties'
import { bar, kelvin } from './words'

/** A fluid by its multi-parameter Helmholtz equation of state. */
export class HelmholtzFluid implements Fluid {
  readonly id: string
  readonly name: string
  readonly info: FluidInfo
  readonly alpha: HelmholtzEnergy
  readonly scales: Scales
  private boundaryMade: PhaseBoundary | null = null

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
    return (this.boundaryMade ??= new PhaseBoundary(this, this.data))
  }

  state(pair: Pair, a: number, b: number, out: State = createState(), guess?: State): State {
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

  viscosity_Pa_s(_state: State): number {
    throw new Problem('unsupported', `the viscosity of ${this.name} is not worked out here`)
  }

  conductivity_W_mK(_state: State): number {
    throw new Problem('unsupported', `the thermal conductivity of ${this.name} is not worked out here`)
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
    if (T_K >= T_min_K * (1 - 1e-12) && T_K <= T_max_K * (1 + 1e-12)) return
    if (!Number.isFinite(T_K)) throw new Problem('range', `the temperature of ${this.name} is no number`)
    const bound = T_K < T_min_K ? `below ${kelvin(T_min_K)}` : `above ${kelvin(T_max_K)}`
    throw new Problem('range', `no ${this.name} ${bound} here: T is ${kelvin(T_K)}`)
  }

  checkPressure(p_Pa: number): void {
    if (p_Pa > 0 && p_Pa <= this.info.p_max_Pa * (1 + 1e-12)) return
    if (p_Pa > 0) throw new Problem('range', `no ${this.name} above ${bar(this.info.p_max_Pa)} here: p is ${bar(p_Pa)}`)
    throw new Problem('range', `the absolute pressure of ${this.name} has to be above zero: p is ${bar(p_Pa)}`)
  }

  private flash(pair: Pair, a: number, b: number, out: State, guess: State | undefined): State {
    switch (pair) {
      case 'pT':
        return flashAtTemperature(this, b, 'p', a, out, guess)
      case 'Ts':
        return flashAtTemperature(this, a, 's', b, out, guess)
      case 'rhoT':
        return flashAtTemperature(this, b, 'rho', a, out)
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

  private phaseOf({ T_K, p_Pa, rho_kg_m3 }: State): State['phase'] {
    const critical = this.info.critical!
    if (T_K >= critical.T_K) return p_Pa >= critical.p_Pa ? 'supercritical' : 'gas'
    return rho_kg_m3 > critical.rho_kg_m3 ? 'liquid' : 'gas'
  }
}
