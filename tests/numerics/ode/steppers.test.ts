import { describe, expect, it } from 'vitest'
import { DOPRI5, Dopri5 } from '@/lib/numerics/ode/dopri5'
import { RODAS4, Rodas4 } from '@/lib/numerics/ode/rodas4'
import type { OdeSystem, Stepper } from '@/lib/numerics/ode/system'
import { system } from './systems'

/** y' = y (1 - y) and its integral: a nonlinear system with a closed solution. */
const logistic = () =>
  system({
    size: 2,
    quadratures: 1,
    rates([y], out) {
      out[0] = y * (1 - y)
      out[1] = y
    },
  })
const START = 0.2
const logisticAt = (t: number) => {
  const y = 1 / (1 + (1 / START - 1) * Math.exp(-t))
  return [y, Math.log(1 - START + START * Math.exp(t))]
}

/** Error of one step of h from the start, read at the fraction θ. */
function stepError(make: (system: OdeSystem) => Stepper, h: number, theta: number): number {
  const equations = logistic()
  const stepper = make(equations)
  const y = Float64Array.of(START, 0)
  const f = new Float64Array(2)
  equations.rates(y, f)
  stepper.reset(y, f)
  stepper.attempt(h)
  const reached = new Float64Array(2)
  stepper.dense(theta, reached)
  const exact = logisticAt(theta * h)
  return Math.max(...exact.map((value, i) => Math.abs(value - reached[i])))
}

const METHODS = [
  { name: 'Dopri5', make: (s: OdeSystem) => new Dopri5(s, 1e-6), order: 5, denseOrder: 4, h: 0.4 },
  { name: 'Rodas4', make: (s: OdeSystem) => new Rodas4(s, 1e-6), order: 4, denseOrder: 3, h: 0.2 },
]

describe.each(METHODS)('$name', ({ make, order, denseOrder, h }) => {
  it('has a local error that falls with the step as its order says', () => {
    const observed = Math.log2(stepError(make, h, 1) / stepError(make, h / 2, 1))
    expect(observed).toBeGreaterThan(order + 0.6)
  })

  it('has a continuous solution of one order less, which meets the step at both ends', () => {
    const observed = Math.log2(stepError(make, h, 0.6) / stepError(make, h / 2, 0.6))
    expect(observed).toBeGreaterThan(denseOrder + 0.6)
    expect(stepError(make, h, 0)).toBe(0)
  })

  it('moves to where the tried step ends', () => {
    const equations = logistic()
    const stepper = make(equations)
    const y = Float64Array.of(START, 0)
    const f = new Float64Array(2)
    equations.rates(y, f)
    stepper.reset(y, f)
    stepper.attempt(0.1)
    stepper.accept()
    const end = new Float64Array(2)
    stepper.dense(1, end)
    expect(stepper.y[0]).toBeCloseTo(end[0], 15)
    expect(stepper.f[0]).toBeCloseTo(end[0] * (1 - end[0]), 14)
  })
})

describe('coefficients', () => {
  it('of Dopri5 have rows that sum to their abscissae, and error weights that sum to nothing', () => {
    DOPRI5.a.forEach((row, i) => expect(sum(row)).toBeCloseTo(DOPRI5.c[i], 13))
    expect(sum(DOPRI5.e)).toBeCloseTo(0, 15)
    expect(sum(DOPRI5.a[6])).toBeCloseTo(1, 15)
  })

  it('of Rodas4 are stiffly accurate: the last stage adds only the error estimate to the one before', () => {
    expect(RODAS4.a[5].slice(0, 4)).toEqual([...RODAS4.a[4]])
    expect(RODAS4.a[5][4]).toBe(1)
  })

  it('of Rodas4 damp what decays at once: a step of any length over y’ = -λ y, λ h → ∞, ends near nothing', () => {
    const decay = system({ size: 1, rates: ([y], out) => (out[0] = -1e9 * y) })
    const stepper = new Rodas4(decay, 1)
    stepper.reset(Float64Array.of(1), Float64Array.of(-1e9))
    stepper.attempt(1)
    stepper.accept()
    expect(Math.abs(stepper.y[0])).toBeLessThan(1e-6)
  })
})

function sum(values: readonly number[]) {
  return values.reduce((total, value) => total + value, 0)
}
