import type { Fluid, State } from '@/lib/fluids'
import { IsentropicFlux } from './isentrope'
import type { Resistance } from './resistance'

/** An area with a discharge coefficient: isentropic flow of the real fluid through it. */
export class Orifice implements Resistance {
  private readonly isentrope: IsentropicFlux
  private readonly area_m2: number

  constructor(fluid: Fluid, diameter_m: number, dischargeCoefficient: number) {
    this.isentrope = new IsentropicFlux(fluid)
    this.area_m2 = (dischargeCoefficient * Math.PI * diameter_m ** 2) / 4
  }

  get evaluations() {
    return this.isentrope.evaluations
  }

  flow_kg_s(up: State, p_down_Pa: number) {
    return this.area_m2 * this.isentrope.flux(up, p_down_Pa)
  }
}
