import type { Fluid, State } from '@/lib/fluids'
import type { Resistance } from './resistance'

const MAX_ROUNDS = 60
const TOLERANCE = 1e-11

/**
 * Two paths one after the other, each starting from rest: between them the gas comes to rest again at its stagnation
 * enthalpy, at the pressure at which both let the same flow through. Longer rows are nested.
 */
export class Series implements Resistance {
  private between: State | undefined
  private own = 0
  /** Where the pressure between lay last, as a share of the drop. */
  private share = 0.5

  constructor(
    private readonly fluid: Fluid,
    private readonly first: Resistance,
    private readonly second: Resistance,
  ) {}

  get evaluations() {
    return this.own + this.first.evaluations + this.second.evaluations
  }

  /** The first lets less through the higher the pressure between, the second more: one crossing, bracketed throughout. */
  flow_kg_s(up: State, p_down_Pa: number) {
    const drop = up.p_Pa - p_down_Pa
    if (drop <= 0) return 0
    let [low, high] = [0, 1]
    let [excessLow, excessHigh] = [NaN, NaN]
    let x = this.share
    let flow = 0
    for (let round = 0; round < MAX_ROUNDS; round++) {
      const p = p_down_Pa + x * drop
      const through = this.first.flow_kg_s(up, p)
      const onward = this.second.flow_kg_s(this.atRest(p, up), p_down_Pa)
      flow = Math.min(through, onward)
      const excess = through - onward
      if (Math.abs(excess) <= TOLERANCE * Math.max(through, onward) || high - low < 1e-13) break
      if (excess > 0) [low, excessLow] = [x, excess]
      else [high, excessHigh] = [x, excess]
      const secant = low + ((high - low) * excessLow) / (excessLow - excessHigh)
      // Until both ends are known, and every third round, halve.
      x = round % 3 === 2 || !(secant > low && secant < high) ? (low + high) / 2 : secant
    }
    this.share = x
    return flow
  }

  private atRest(p_Pa: number, up: State): State {
    this.between = this.fluid.state('ph', p_Pa, up.h_J_kg, this.between, this.between ?? up)
    this.own += this.between.evaluations
    return this.between
  }
}
