import { Problem } from '@/lib/errors'
import { airBoundary } from './air-boundary'
import type { FluidData } from './equation-data'
import { createState } from './fluid'
import type { Saturation, State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import { fillTwoPhase, setPressure, shift } from './properties'
import { equilibrate, followSaturation } from './saturation-curve'
import type { SaturationTable } from './saturation-table'
import { LIQUID, VAPOUR } from './saturation-table'
import { bar, kelvin } from './words'

/** Where liquid and vapour of one fluid stand side by side. */
export class PhaseBoundary {
  readonly table: SaturationTable
  /** False for air, whose two phases differ in composition: the equation of state does not describe what lies between. */
  readonly hasEquilibrium: boolean
  readonly liquid = createState()
  readonly vapour = createState()
  readonly T_low_K: number
  readonly p_top_Pa: number

  constructor(
    private readonly fluid: HelmholtzFluid,
    data: FluidData,
  ) {
    this.T_low_K = data.triple.T_K
    const curve = followSaturation(fluid, data, this.liquid, this.vapour)
    this.hasEquilibrium = curve !== null
    this.table = curve ?? airBoundary(fluid, data.triple.T_K, this.liquid)
    this.p_top_Pa = curve ? fluid.info.critical!.p_Pa : this.table.p_Pa(VAPOUR, this.table.T_top_K)
  }

  saturationAtT(T_K: number): Saturation {
    this.checkTemperature(T_K)
    return this.solveAt(T_K, createState(), createState())
  }

  saturationAtP(p_Pa: number): Saturation {
    return this.solveAtPressure(p_Pa, createState(), createState())
  }

  /** Fills liquid and vapour at a temperature: two evaluations of the equation, more next to the critical point. */
  solveAt(T_K: number, liquid: State = this.liquid, vapour: State = this.vapour): Saturation {
    const T = Math.min(T_K, this.table.T_top_K)
    equilibrate(this.fluid, T, this.table.rho(LIQUID, T), this.table.rho(VAPOUR, T), liquid, vapour)
    liquid.phase = 'liquid'
    vapour.phase = 'gas'
    return { T_K, p_Pa: vapour.p_Pa, liquid, vapour }
  }

  /** The same at a pressure. */
  solveAtPressure(p_Pa: number, liquid: State = this.liquid, vapour: State = this.vapour): Saturation {
    this.checkPressure(p_Pa)
    let T = this.table.T_atPressure(VAPOUR, p_Pa)
    for (let i = 0; i < 8; i++) {
      this.solveAt(T, liquid, vapour)
      const slope = slopeOf(liquid, vapour)
      const step = (p_Pa - vapour.p_Pa) / slope
      // next to the critical point the table is as good as the equation's own digits
      if (!Number.isFinite(step) || Math.abs(step) > 0.01 * T) break
      if (Math.abs(step) < 1e-9 * T) {
        this.moveAlong(liquid, vapour, step)
        break
      }
      T = Math.min(T + step, this.table.T_top_K)
    }
    setPressure(liquid, p_Pa)
    setPressure(vapour, p_Pa)
    return { T_K: vapour.T_K, p_Pa, liquid, vapour }
  }

  /** Moves both phases along the saturation curve by a small step of temperature, to first order. */
  moveAlong(liquid: State, vapour: State, dT: number): void {
    const slope = slopeOf(liquid, vapour)
    for (const phase of [liquid, vapour]) {
      shift(phase, dT, ((slope - phase.dpdT_rho_Pa_K) / phase.dpdrho_T_Pa_m3_kg) * dT)
    }
    setPressure(liquid, vapour.p_Pa)
  }

  mixedAtT(T_K: number, x: number, out: State): State {
    checkQuality(x)
    this.checkTemperature(T_K)
    const { liquid, vapour } = this.solveAt(T_K)
    return fillTwoPhase(out, liquid, vapour, x)
  }

  mixedAtP(p_Pa: number, x: number, out: State): State {
    checkQuality(x)
    const { liquid, vapour } = this.solveAtPressure(p_Pa)
    return fillTwoPhase(out, liquid, vapour, x)
  }

  /** @throws Problem for air, of which only one phase is described. */
  checkEquilibrium(): void {
    if (this.hasEquilibrium) return
    throw new Problem(
      'unsupported',
      `liquid and vapour of ${this.fluid.name} differ in composition, so what lies between them is not worked out here; above ${kelvin(this.table.T_top_K)} there is one phase`,
    )
  }

  private checkTemperature(T_K: number): void {
    this.fluid.checkTemperature(T_K)
    this.checkEquilibrium()
    const { T_top_K } = this.table
    if (T_K <= T_top_K * (1 + 1e-9)) return
    throw new Problem(
      'state',
      `${this.fluid.name} has no saturation above its critical temperature, ${kelvin(T_top_K)}: T is ${kelvin(T_K)}`,
    )
  }

  private checkPressure(p_Pa: number): void {
    this.fluid.checkPressure(p_Pa)
    this.checkEquilibrium()
    if (p_Pa > this.p_top_Pa * (1 + 1e-9)) {
      throw new Problem(
        'state',
        `${this.fluid.name} has no saturation above its critical pressure, ${bar(this.p_top_Pa)}: p is ${bar(p_Pa)}`,
      )
    }
    const p_low = this.table.p_Pa(VAPOUR, this.T_low_K)
    if (p_Pa < p_low * (1 - 1e-8)) {
      throw new Problem(
        'range',
        `no liquid ${this.fluid.name} below its triple-point pressure, ${bar(p_low)}: p is ${bar(p_Pa)}`,
      )
    }
  }
}

/** Clapeyron: how the pressure rises along the saturation curve. */
export const slopeOf = (liquid: State, vapour: State) =>
  (vapour.s_J_kgK - liquid.s_J_kgK) / (1 / vapour.rho_kg_m3 - 1 / liquid.rho_kg_m3)

function checkQuality(x: number): void {
  if (!(x >= 0 && x <= 1))
    throw new Problem('range', `a quality lies between 0 and 1: x is ${Number(x.toPrecision(4))}`)
}
