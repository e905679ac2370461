import { describe, expect, it } from 'vitest'
import { Problem } from '@/lib/errors'
import { integrate, type Method } from '@/lib/numerics/ode'
import { oscillator, oscillatorAt, OSCILLATOR_START, robertson, system, vanDerPol } from './systems'

const farthest = (y: ArrayLike<number>, exact: readonly number[]) =>
  Math.max(...exact.map((value, i) => Math.abs(value - y[i])))

describe.each<{ method: Method; factor: number; power: number }>([
  { method: 'explicit', factor: 30, power: 0.9 },
  { method: 'stiff', factor: 300, power: 0.9 },
])('integrate, $method', ({ method, factor, power }) => {
  const errorAt = (rtol: number) => {
    const { y } = integrate(oscillator(), OSCILLATOR_START, { until: 10, rtol, method, maxSteps: 1e5 })
    return farthest(y, oscillatorAt(10))
  }

  it('keeps the error near the tolerance', () => {
    for (const rtol of [1e-4, 1e-6, 1e-8]) expect(errorAt(rtol)).toBeLessThan(factor * rtol)
  })

  it('has an error that falls in proportion to the tolerance', () => {
    const observed = Math.log10(errorAt(1e-4) / errorAt(1e-9)) / 5
    expect(observed).toBeGreaterThan(power)
  })

  it('ends exactly where it is to end, and passes each point on', () => {
    const times: number[] = []
    const { t, status, steps } = integrate(oscillator(), OSCILLATOR_START, {
      until: 1.25,
      rtol: 1e-6,
      method,
      onPoint: (at) => times.push(at),
    })
    expect(status).toBe('end')
    expect(t).toBe(1.25)
    expect(times).toHaveLength(steps + 1)
    expect(times[0]).toBe(0)
    expect(times.at(-1)).toBe(1.25)
  })
})

describe('cost', () => {
  it('of an easy problem is six evaluations a step', () => {
    const equations = oscillator()
    const { steps, rejected } = integrate(equations, OSCILLATOR_START, { until: 10, rtol: 1e-6, method: 'explicit' })
    expect(equations.calls).toBe(6 * (steps + rejected) + 1)
    expect(equations.calls).toBeLessThan(320)
  })
})

describe('stiff problems', () => {
  // Solution at t = 40: E. Hairer, G. Wanner, Solving Ordinary Differential Equations II, test problem ROBER.
  const AT_40 = [0.7158270687, 0.9185534764e-5, 0.2841637457]

  it('are solved by the stiff method in few steps', () => {
    const { y, steps } = integrate(robertson(), Float64Array.of(1, 0, 0), { until: 40, rtol: 1e-7, method: 'stiff' })
    AT_40.forEach((value, i) => expect(Math.abs(y[i] / value - 1)).toBeLessThan(1e-6))
    expect(steps).toBeLessThan(150)
  })

  it('are noticed, and handed over to the stiff method', () => {
    const equations = vanDerPol(1000)
    const { stiff, status, steps } = integrate(equations, Float64Array.of(2, 0), { until: 1000, rtol: 1e-6 })
    expect(status).toBe('end')
    expect(stiff).toBe(true)
    expect(steps).toBeLessThan(1500)
  })

  it('keep what is conserved to rounding, step after step', () => {
    integrate(robertson(), Float64Array.of(1, 0, 0), {
      until: 1e6,
      rtol: 1e-5,
      method: 'stiff',
      onPoint: (_, y) => expect(Math.abs(y[0] + y[1] + y[2] - 1)).toBeLessThan(1e-12),
    })
  })
})

/** A ball thrown up: height and speed; the ground is an event. */
const thrown = (events: Parameters<typeof system>[0]['events']) =>
  system({ size: 2, rates: ([, v], out) => out.set([v, -9.81]), events, scales: (out) => out.fill(1) })

describe('events', () => {
  it('are found to rounding, and never overshot', () => {
    const speed = 12.3
    const equations = thrown([{ terminal: true, value: (y) => y[0] + 1 }])
    const { t, y, status, event } = integrate(equations, Float64Array.of(0, speed), { until: 10, rtol: 1e-6 })
    const exact = (speed + Math.sqrt(speed * speed + 2 * 9.81)) / 9.81
    expect([status, event]).toEqual(['event', 0])
    expect(Math.abs(t / exact - 1)).toBeLessThan(1e-12)
    expect(y[0] + 1).toBeGreaterThanOrEqual(0)
    expect(y[0] + 1).toBeLessThan(1e-11)
  })

  it.each<Method>(['explicit', 'stiff'])('of several in one step stop at the first (%s)', (method) => {
    const fall = (to: number) => ({ terminal: true, value: (y: Float64Array) => y[0] - to })
    const equations = system({
      size: 1,
      rates: ([y], out) => (out[0] = -y),
      events: [fall(0.2), fall(0.5), fall(0.3)],
    })
    const { event, t } = integrate(equations, Float64Array.of(1), { until: 10, rtol: 1e-9, method })
    expect(event).toBe(1)
    expect(t).toBeCloseTo(Math.LN2, 7)
  })

  it('that come and go within a step are seen by their rates', () => {
    const top = (12.3 * 12.3) / (2 * 9.81)
    const near = {
      terminal: true,
      value: (y: Float64Array) => 0.999 * top - y[0],
      rate: (y: Float64Array) => -y[1],
    }
    const { t, status } = integrate(thrown([near]), Float64Array.of(0, 12.3), { until: 2.4, rtol: 1e-6 })
    expect(status).toBe('event')
    expect(t).toBeCloseTo((12.3 - Math.sqrt(0.001) * 12.3) / 9.81, 9)
  })

  it('at one moment count in the order listed', () => {
    const value = (y: Float64Array) => y[0] - 0.5
    const equations = system({
      size: 1,
      rates: ([y], out) => (out[0] = -y),
      events: [
        { terminal: true, value },
        { terminal: false, value },
      ],
    })
    expect(integrate(equations, Float64Array.of(1), { until: 10, rtol: 1e-6 }).event).toBe(0)
  })

  it('that have happened at the start end it there', () => {
    const equations = system({
      size: 1,
      rates: (_, out) => out.fill(1),
      events: [{ terminal: true, value: () => 0 }],
    })
    const { status, t, steps } = integrate(equations, Float64Array.of(1), { until: 10, rtol: 1e-6 })
    expect({ status, t, steps }).toEqual({ status: 'event', t: 0, steps: 0 })
  })

  it('that interrupt let the system change and go on from there', () => {
    let bounces = 0
    let speed = 1
    const equations = system({
      size: 1,
      rates: (_, out) => (out[0] = speed),
      events: [
        {
          terminal: false,
          value: (y) => (speed > 0 ? 1 - y[0] : y[0]),
          passed: () => {
            bounces++
            speed = -speed
          },
        },
      ],
    })
    const { y, status } = integrate(equations, Float64Array.of(0.25), { until: 10, rtol: 1e-6 })
    expect(status).toBe('end')
    expect(bounces).toBe(10)
    expect(y[0]).toBeCloseTo(0.25, 9)
  })

  it('that an interruption makes happen end it there', () => {
    let shut = false
    const equations = system({
      size: 1,
      rates: (_, out) => (out[0] = shut ? 0 : -1),
      events: [
        { terminal: true, value: () => (shut ? -1 : 1) },
        { terminal: false, value: (y) => (shut ? 1 : y[0]), passed: () => (shut = true) },
      ],
    })
    const { status, event, t } = integrate(equations, Float64Array.of(2), { until: 10, rtol: 1e-6 })
    expect({ status, event }).toEqual({ status: 'event', event: 0 })
    expect(t).toBeCloseTo(2, 9)
  })

  it('that interrupt and are overdue happen at the next point', () => {
    let shut = false
    const equations = system({
      size: 1,
      rates: (_, out) => (out[0] = shut ? 0 : 1),
      events: [{ terminal: false, value: () => (shut ? 1 : -1), passed: () => (shut = true) }],
    })
    const { y } = integrate(equations, Float64Array.of(0), { until: 10, rtol: 1e-6 })
    expect(y[0]).toBe(0)
  })
})

describe('what cannot be integrated', () => {
  it('ends at the border of what the system knows, with its reason', () => {
    const equations = system({
      size: 1,
      rates([y], out) {
        if (y < 0) throw new Problem('state', 'nothing below zero')
        out[0] = -1
      },
    })
    const { status, y, cause, steps, rejected } = integrate(equations, Float64Array.of(1), { until: 2, rtol: 1e-6 })
    expect(status).toBe('stuck')
    expect(cause?.reason).toBe('nothing below zero')
    expect(y[0]).toBeGreaterThanOrEqual(0)
    expect(y[0]).toBeLessThan(1e-9)
    expect(steps + rejected).toBeLessThan(500)
  })

  it('ends after so many steps', () => {
    const equations = system({ size: 1, rates: ([y], out) => (out[0] = Math.cos(1e6 * y)) })
    const { status, steps, rejected } = integrate(equations, Float64Array.of(0.3), {
      until: 1e9,
      rtol: 1e-9,
      maxSteps: 200,
      maxStep: 1e-3,
    })
    expect(status).toBe('steps')
    expect(steps + rejected).toBeLessThanOrEqual(200)
  })

  it('where it is a programmer’s mistake, is not hidden', () => {
    const equations = system({
      size: 1,
      rates([y], out) {
        if (y > 0.5) throw new TypeError('a mistake')
        out[0] = 1
      },
    })
    expect(() => integrate(equations, Float64Array.of(0), { until: 1, rtol: 1e-6 })).toThrow(TypeError)
  })

  it('is not mistaken for a number: a rate that is none rejects its step', () => {
    const equations = system({ size: 1, rates: ([y], out) => (out[0] = -Math.sqrt(y)) })
    const { status, t } = integrate(equations, Float64Array.of(1), { until: 5, rtol: 1e-6 })
    expect(status).toBe('stuck')
    expect(t).toBeCloseTo(2, 3)
  })
})
