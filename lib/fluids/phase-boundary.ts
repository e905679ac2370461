import { Problem } from '@/lib/errors'
import { airBoundary } from './air-boundary'
import type { FluidData } from './equation-data'
import { densityAt } from './density'
import { createState } from './fluid'
import type { Saturation, State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase } from './properties'
import { SaturationCurve } from './saturation-curve'
import { bar, kelvin } from './words'

/** Where liquid and vapour of one fluid stand side by side. */
export class PhaseBoundary {
  /** Null for air, whose two phases differ in composition: the equation of state does not describe them. */
  readonly curve: SaturationCurve | null
  private readonly densities = { liquid: 0, vapour: 0 }
  readonly liquid = createState()
  readonly vapour = createState()

  constructor(
    private readonly fluid: HelmholtzFluid,
    data: FluidData,
  ) {
    const critical = data.criticalOfEquation
    this.curve =
      critical &&
      new SaturationCurve({
        alpha: fluid.alpha,
        T_reducing_K: data.reducing.T_K,
        rho_reducing: data.reducing.rho_mol_m3,
        T_critical_K: critical.T_K,
        rho_critical: critical.rho_mol_m3,
        T_triple_K: data.triple.T_K,
        acentricFactor: data.acentricFactor ?? 0,
      })
  }

  /** Highest temperature at which two phases occur. */
  get T_top_K(): number {
    return this.curve ? this.fluid.info.critical!.T_K : airBoundary.T_K
  }

  saturationAtT(T_K: number): Saturation {
    this.fluid.checkTemperature(T_K)
    const { name, info } = this.fluid
    if (!this.curve) throw this.noEquilibrium()
    if (T_K > info.critical!.T_K) {
      throw new Problem(
        'state',
        `${name} has no saturation above its critical temperature, ${kelvin(info.critical!.T_K)}: T is ${kelvin(T_K)}`,
      )
    }
    return this.solveAt(T_K, createState(), createState())
  }

  saturationAtP(p_Pa: number): Saturation {
    return this.solveAt(this.temperatureAt(p_Pa), createState(), createState())
  }

  /** Fills `liquid` and `vapour` of this object and says the pressure. */
  solveAt(T_K: number, liquid: State = this.liquid, vapour: State = this.vapour): Saturation {
    this.curve!.solve(T_K, this.densities)
    const M = this.fluid.info.molarMass_kg_mol
    this.fluid.singlePhase(T_K, this.densities.vapour * M, vapour).phase = 'gas'
    this.fluid.singlePhase(T_K, this.densities.liquid * M, liquid).phase = 'liquid'
    // of a cold liquid the pressure is the small difference of large terms: the vapour's is the good one
    liquid.p_Pa = vapour.p_Pa
    return { T_K, p_Pa: vapour.p_Pa, liquid, vapour }
  }

  /** Densities on the curve by its table alone, kg/m³. */
  guessDensities(T_K: number): { liquid: number; vapour: number } {
    this.curve!.guess(T_K, this.densities)
    const M = this.fluid.info.molarMass_kg_mol
    return { liquid: this.densities.liquid * M, vapour: this.densities.vapour * M }
  }

  /** Saturation temperature at a pressure, by Newton along the Clapeyron slope in ln p over 1/T, which is nearly straight. */
  temperatureAt(p_Pa: number): number {
    const { name, info } = this.fluid
    const { critical, triple } = info
    if (!this.curve) throw this.noEquilibrium()
    this.fluid.checkPressure(p_Pa)
    if (p_Pa > critical!.p_Pa) {
      throw new Problem(
        'state',
        `${name} has no saturation above its critical pressure, ${bar(critical!.p_Pa)}: p is ${bar(p_Pa)}`,
      )
    }
    if (p_Pa < triple!.p_Pa * (1 - 1e-9)) {
      throw new Problem(
        'range',
        `no liquid ${name} below its triple-point pressure, ${bar(triple!.p_Pa)}: p is ${bar(p_Pa)}`,
      )
    }
    let low = triple!.T_K
    let high = critical!.T_K
    // the chord of ln p over 1/T between the two ends
    const share = Math.log(p_Pa / triple!.p_Pa) / Math.log(critical!.p_Pa / triple!.p_Pa)
    let T = 1 / (1 / low + share * (1 / high - 1 / low))
    for (let i = 0; i < 60; i++) {
      T = Math.min(Math.max(T, low), high)
      const { liquid, vapour } = this.solveAt(T)
      const off = Math.log(vapour.p_Pa / p_Pa)
      if (off > 0) high = T
      else low = T
      const slope = (vapour.s_J_kgK - liquid.s_J_kgK) / (1 / vapour.rho_kg_m3 - 1 / liquid.rho_kg_m3)
      // d ln p / d(1/T)
      const steep = (-slope * T * T) / vapour.p_Pa
      const next = 1 / (1 / T - off / steep)
      if (Math.abs(next - T) < 1e-13 * T || high - low < 1e-13 * T)
        return Math.min(Math.max(next, triple!.T_K), critical!.T_K)
      T = next > low && next < high ? next : Number.isFinite(next) && off !== 0 ? (low + high) / 2 : T
    }
    return T
  }

  mixedAtT(T_K: number, x: number, out: State): State {
    this.checkQuality(x)
    const { liquid, vapour } = this.saturationAtT(T_K)
    return this.mixed(liquid, vapour, x, out)
  }

  mixedAtP(p_Pa: number, x: number, out: State): State {
    this.checkQuality(x)
    const { liquid, vapour } = this.saturationAtP(p_Pa)
    return this.mixed(liquid, vapour, x, out)
  }

  /** @throws Problem for air, of which only one phase is described. */
  mixed(liquid: State, vapour: State, x: number, out: State): State {
    if (!this.curve) throw this.noEquilibrium()
    return fillTwoPhase(out, liquid, vapour, x)
  }

  /** Saturated liquid and vapour at a temperature below the top of the two-phase region; of air at its bubble and dew pressure. */
  edgesAtT(T_K: number): { readonly liquid: State; readonly vapour: State } {
    if (this.curve) return this.solveAt(T_K)
    this.fluid.singlePhase(T_K, densityAt(this.fluid, T_K, airBoundary.dew_Pa(T_K), 'gas'), this.vapour)
    this.fluid.singlePhase(T_K, densityAt(this.fluid, T_K, airBoundary.bubble_Pa(T_K), 'liquid'), this.liquid)
    return this
  }

  /** The same at a pressure; null where the fluid has one phase at every temperature. */
  edgesAtP(p_Pa: number): { readonly liquid: State; readonly vapour: State } | null {
    const { critical, triple } = this.fluid.info
    if (this.curve) {
      return p_Pa < critical!.p_Pa && p_Pa >= triple!.p_Pa ? this.solveAt(this.temperatureAt(p_Pa)) : null
    }
    if (p_Pa >= airBoundary.p_Pa || p_Pa < airBoundary.bubble_Pa(triple!.T_K)) return null
    const T_dew = temperatureOn(airBoundary.dew_Pa, p_Pa, triple!.T_K)
    const T_bubble = temperatureOn(airBoundary.bubble_Pa, p_Pa, triple!.T_K)
    this.fluid.singlePhase(T_dew, densityAt(this.fluid, T_dew, p_Pa, 'gas'), this.vapour)
    this.fluid.singlePhase(T_bubble, densityAt(this.fluid, T_bubble, p_Pa, 'liquid'), this.liquid)
    return this
  }

  private checkQuality(x: number): void {
    if (!(x >= 0 && x <= 1))
      throw new Problem('range', `a quality lies between 0 and 1: x is ${Number(x.toPrecision(4))}`)
  }

  private noEquilibrium(): Problem {
    return new Problem(
      'unsupported',
      `liquid and vapour of ${this.fluid.name} differ in composition, so what lies between them is not worked out here; above ${kelvin(airBoundary.T_K)} there is one phase`,
    )
  }
}

/** Where a curve that rises with temperature reaches a pressure, by halving: it is asked seldom. */
function temperatureOn(curve: (T_K: number) => number, p_Pa: number, T_low_K: number): number {
  let [low, high] = [T_low_K, airBoundary.T_K]
  while (high - low > 1e-12 * high) {
    const middle = (low + high) / 2
    if (middle === low || middle === high) break
    if (curve(middle) < p_Pa) low = middle
    else high = middle
  }
  return (low + high) / 2
}
