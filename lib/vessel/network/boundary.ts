import type { Fluid, State } from '@/lib/fluids'
import type { Boundary } from './connection'

/** Steady pressure and temperature, whatever is drawn. */
export class Reservoir implements Boundary {
  readonly state: State
  readonly evaluations: number

  constructor(
    fluid: Fluid,
    readonly p_Pa: number,
    T_K: number,
  ) {
    this.state = fluid.state('pT', p_Pa, T_K)
    this.evaluations = this.state.evaluations
  }

  rest() {
    return this.state
  }
}

/** Delivers at a temperature and at whatever pressure it meets, up to its highest. */
export class Compressor implements Boundary {
  evaluations = 0
  private state: State | undefined

  constructor(
    private readonly fluid: Fluid,
    /** Its highest pressure. */
    readonly p_Pa: number,
    private readonly T_K: number,
  ) {}

  rest(p_into_Pa: number) {
    this.state = this.fluid.state('pT', Math.min(p_into_Pa, this.p_Pa), this.T_K, this.state, this.state)
    this.evaluations += this.state.evaluations
    return this.state
  }
}

/** A place that only receives. */
export class Sink implements Boundary {
  readonly evaluations = 0

  constructor(readonly p_Pa: number) {}
}
