import { errorNorm, type OdeSystem, type Stepper } from './system'

/*
 * Dormand and Prince's pair of order 5(4): J. R. Dormand, P. J. Prince, A family of embedded Runge-Kutta formulae,
 * J. Comput. Appl. Math. 6 (1980) 19-26, doi:10.1016/0771-050X(80)90013-3. Continuous extension of order 4 and
 * stiffness detection: E. Hairer, S. P. Nørsett, G. Wanner, Solving Ordinary Differential Equations I (1993), II.6, and II (1996), IV.2.
 */
export const DOPRI5 = {
  a: [
    [],
    [1 / 5],
    [3 / 40, 9 / 40],
    [44 / 45, -56 / 15, 32 / 9],
    [19372 / 6561, -25360 / 2187, 64448 / 6561, -212 / 729],
    [9017 / 3168, -355 / 33, 46732 / 5247, 49 / 176, -5103 / 18656],
    [35 / 384, 0, 500 / 1113, 125 / 192, -2187 / 6784, 11 / 84],
  ],
  c: [0, 1 / 5, 3 / 10, 4 / 5, 8 / 9, 1, 1],
  /** Fifth-order minus fourth-order weights. */
  e: [71 / 57600, 0, -71 / 16695, 71 / 1920, -17253 / 339200, 22 / 525, -1 / 40],
  d: [
    -12715105075 / 11282082432,
    0,
    87487479700 / 32700410799,
    -10690763975 / 1880347072,
    701980252875 / 199316789632,
    -1453857185 / 822651844,
    69997945 / 29380423,
  ],
} as const

/** Beyond |h λ| of this the method is at the edge of its stability on the negative real axis. */
const STABILITY_EDGE = 3.25
/** So many steps at that edge, with never so many off it between, mean that the system is stiff. */
const STEPS_AT_EDGE = 10
const STEPS_OFF_EDGE = 4

export class Dopri5 implements Stepper {
  readonly errorPower = 5
  readonly y: Float64Array
  readonly f: Float64Array
  private readonly from: Float64Array
  private readonly k: Float64Array[]
  private readonly stage: Float64Array
  private readonly beforeLast: Float64Array
  private readonly yNew: Float64Array
  private readonly error: Float64Array
  private readonly scales: Float64Array
  private readonly controlled: number
  private h = 0
  private atEdge = 0
  private offEdge = 0

  constructor(
    private readonly system: OdeSystem,
    private readonly rtol: number,
  ) {
    const vector = () => new Float64Array(system.size)
    this.k = Array.from({ length: 7 }, vector)
    this.y = vector()
    this.f = vector()
    this.from = vector()
    this.stage = vector()
    this.beforeLast = vector()
    this.yNew = vector()
    this.error = vector()
    this.scales = vector()
    this.controlled = system.size - system.quadratures
  }

  get stiff() {
    return this.atEdge >= STEPS_AT_EDGE
  }

  reset(y: Float64Array, f: Float64Array) {
    this.y.set(y)
    this.f.set(f)
    this.system.scales(this.scales)
  }

  attempt(h: number): number {
    const { k, y, stage, yNew, error, system } = this
    const n = system.size
    this.h = h
    this.from.set(y)
    k[0].set(this.f)
    for (let s = 1; s < 7; s++) {
      const a = DOPRI5.a[s]
      const target = s === 6 ? yNew : stage
      for (let i = 0; i < n; i++) {
        let sum = 0
        for (let j = 0; j < s; j++) sum += a[j] * k[j][i]
        target[i] = y[i] + h * sum
      }
      if (s === 5) this.beforeLast.set(stage)
      system.rates(target, k[s])
    }
    const { e } = DOPRI5
    for (let i = 0; i < n; i++) {
      error[i] =
        h * (e[0] * k[0][i] + e[2] * k[2][i] + e[3] * k[3][i] + e[4] * k[4][i] + e[5] * k[5][i] + e[6] * k[6][i])
    }
    return errorNorm(error, this.scales, this.rtol, this.controlled)
  }

  dense(theta: number, out: Float64Array) {
    const { k, from, yNew, h } = this
    const { d } = DOPRI5
    const rest = 1 - theta
    for (let i = 0; i < out.length; i++) {
      const rise = yNew[i] - from[i]
      const bend = h * k[0][i] - rise
      const twist = rise - h * k[6][i] - bend
      const quartic =
        h * (d[0] * k[0][i] + d[2] * k[2][i] + d[3] * k[3][i] + d[4] * k[4][i] + d[5] * k[5][i] + d[6] * k[6][i])
      out[i] = from[i] + theta * (rise + rest * (bend + theta * (twist + rest * quartic)))
    }
  }

  accept() {
    this.watchStiffness()
    this.y.set(this.yNew)
    this.f.set(this.k[6])
    this.system.scales(this.scales)
  }

  private watchStiffness() {
    let slope = 0
    let distance = 0
    for (let i = 0; i < this.controlled; i++) {
      const scale = this.scales[i]
      slope += ((this.k[6][i] - this.k[5][i]) / scale) ** 2
      distance += ((this.yNew[i] - this.beforeLast[i]) / scale) ** 2
    }
    if (distance > 0 && this.h * Math.sqrt(slope / distance) > STABILITY_EDGE) {
      this.offEdge = 0
      this.atEdge++
    } else if (++this.offEdge >= STEPS_OFF_EDGE) this.atEdge = 0
  }
}
