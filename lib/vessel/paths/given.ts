import type { State } from '@/lib/fluids'
import type { Resistance } from './resistance'

/** A flow that something else keeps steady. */
export class FixedFlow implements Resistance {
  readonly evaluations = 0

  constructor(private readonly rate_kg_s: number) {}

  flow_kg_s() {
    return this.rate_kg_s
  }
}

/** A path that lets no more through than a given flow. */
export class Limited implements Resistance {
  constructor(
    private readonly rate_kg_s: number,
    private readonly inner: Resistance,
  ) {}

  get evaluations() {
    return this.inner.evaluations
  }

  flow_kg_s(up: State, p_down_Pa: number) {
    return Math.min(this.rate_kg_s, this.inner.flow_kg_s(up, p_down_Pa))
  }
}

/** A vacuum pump: a volume swept at its inlet, falling to nothing at its lowest pressure. */
export class Pump implements Resistance {
  readonly evaluations = 0

  constructor(
    private readonly speed_m3_s: number,
    private readonly p_low_Pa: number,
  ) {}

  flow_kg_s(up: State) {
    return up.rho_kg_m3 * this.speed_m3_s * Math.max(0, 1 - this.p_low_Pa / up.p_Pa)
  }
}
