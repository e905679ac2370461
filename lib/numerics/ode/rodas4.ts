import { factorize, solveFactorized } from './linear'
import { errorNorm, type OdeSystem, type Stepper } from './system'

/*
 * RODAS, a stiffly accurate, L-stable Rosenbrock pair of order 4(3) with a continuous extension of order 3:
 * E. Hairer, G. Wanner, Solving Ordinary Differential Equations II (1996), IV.7. Coefficients in the form without
 * matrix-vector products; for an autonomous system.
 */
export const RODAS4 = {
  gamma: 0.25,
  a: [
    [],
    [1.544],
    [0.9466785280815826, 0.2557011698983284],
    [3.314825187068521, 2.896124015972201, 0.9986419139977817],
    [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
    [1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1],
  ],
  c: [
    [],
    [-5.6688],
    [-2.430093356833875, -0.2063599157091915],
    [-0.1073529058151375, -9.594562251023355, -20.47028614809616],
    [7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
    [8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054],
  ],
  d: [
    [10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662],
    [-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872],
  ],
} as const

/** Relative step of the difference quotients, a balance between curvature and the noise of an iterated state. */
const DIFFERENCE = 3e-8

export class Rodas4 implements Stepper {
  readonly errorPower = 4
  readonly stiff = false
  readonly y: Float64Array
  readonly f: Float64Array
  private readonly from: Float64Array
  private readonly u: Float64Array[]
  private readonly stage: Float64Array
  private readonly rates: Float64Array
  private readonly yNew: Float64Array
  private readonly scales: Float64Array
  private readonly jacobian: Float64Array
  private readonly matrix: Float64Array
  private readonly pivots: Int32Array
  private readonly active: number
  private current = false

  constructor(
    private readonly system: OdeSystem,
    private readonly rtol: number,
  ) {
    const n = system.size
    const vector = () => new Float64Array(n)
    this.active = n - system.quadratures
    this.u = Array.from({ length: 6 }, vector)
    this.y = vector()
    this.f = vector()
    this.from = vector()
    this.stage = vector()
    this.rates = vector()
    this.yNew = vector()
    this.scales = vector()
    this.jacobian = new Float64Array(n * n)
    this.matrix = new Float64Array(this.active * this.active)
    this.pivots = new Int32Array(this.active)
  }

  reset(y: Float64Array, f: Float64Array) {
    this.y.set(y)
    this.f.set(f)
    this.system.scales(this.scales)
    this.current = false
  }

  attempt(h: number): number {
    const { system, y, u, stage, yNew, rates, active } = this
    const n = system.size
    if (!this.current) this.linearize()
    if (!this.prepare(h)) return Infinity
    this.from.set(y)
    for (let s = 0; s < 6; s++) {
      const a = RODAS4.a[s]
      const c = RODAS4.c[s]
      if (s > 0) {
        for (let i = 0; i < n; i++) {
          let sum = y[i]
          for (let j = 0; j < s; j++) sum += a[j] * u[j][i]
          stage[i] = sum
        }
        system.rates(stage, rates)
      } else rates.set(this.f)
      const us = u[s]
      for (let i = 0; i < n; i++) {
        let sum = 0
        for (let j = 0; j < s; j++) sum += c[j] * u[j][i]
        us[i] = rates[i] + sum / h
      }
      solveFactorized(this.matrix, active, this.pivots, us)
      for (let q = active; q < n; q++) {
        let sum = us[q]
        for (let j = 0; j < active; j++) sum += this.jacobian[q * n + j] * us[j]
        us[q] = RODAS4.gamma * h * sum
      }
    }
    for (let i = 0; i < n; i++) yNew[i] = stage[i] + u[5][i]
    return errorNorm(u[5], this.scales, this.rtol, active)
  }

  dense(theta: number, out: Float64Array) {
    const { from, yNew, u } = this
    const rest = 1 - theta
    const [d1, d2] = RODAS4.d
    for (let i = 0; i < out.length; i++) {
      const first = d1[0] * u[0][i] + d1[1] * u[1][i] + d1[2] * u[2][i] + d1[3] * u[3][i] + d1[4] * u[4][i]
      const second = d2[0] * u[0][i] + d2[1] * u[1][i] + d2[2] * u[2][i] + d2[3] * u[3][i] + d2[4] * u[4][i]
      out[i] = from[i] * rest + theta * (yNew[i] + rest * (first + theta * second))
    }
  }

  accept() {
    this.y.set(this.yNew)
    this.system.rates(this.y, this.f)
    this.system.scales(this.scales)
    this.current = false
  }

  private linearize() {
    if (this.system.jacobian) this.system.jacobian(this.y, this.f, this.jacobian)
    else differenceJacobian(this.system, this.y, this.f, this.scales, this.jacobian)
    this.current = true
  }

  private prepare(h: number): boolean {
    const { active, matrix, jacobian } = this
    const n = this.system.size
    const diagonal = 1 / (RODAS4.gamma * h)
    for (let i = 0; i < active; i++) {
      for (let j = 0; j < active; j++) matrix[i * active + j] = -jacobian[i * n + j]
      matrix[i * active + i] += diagonal
    }
    return factorize(matrix, active, this.pivots)
  }
}

/** df/dy by forward differences, one column at a time; the columns of quadratures are zero. */
function differenceJacobian(
  system: OdeSystem,
  y: Float64Array,
  f: Float64Array,
  scales: Float64Array,
  out: Float64Array,
): void {
  const n = system.size
  const moved = Float64Array.from(y)
  const rates = new Float64Array(n)
  for (let j = 0; j < n - system.quadratures; j++) {
    moved[j] = y[j] + DIFFERENCE * scales[j]
    const step = moved[j] - y[j]
    system.rates(moved, rates)
    for (let i = 0; i < n; i++) out[i * n + j] = (rates[i] - f[i]) / step
    moved[j] = y[j]
  }
}
