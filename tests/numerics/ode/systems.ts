import type { OdeSystem } from '@/lib/numerics/ode'

export interface CountedSystem extends OdeSystem {
  calls: number
}

interface Definition {
  readonly size: number
  readonly quadratures?: number
  readonly rates: (y: Float64Array, out: Float64Array) => void
  readonly scales?: (out: Float64Array) => void
  /** Values as functions of the solution. */
  readonly events?: readonly {
    readonly terminal: boolean
    readonly value: (y: Float64Array) => number
    readonly rate?: (y: Float64Array) => number
    readonly passed?: () => void
  }[]
}

/** A system that counts how often its rates are asked for. */
export function system({ size, quadratures = 0, rates, scales, events = [] }: Definition): CountedSystem {
  let at = new Float64Array(size)
  const counted: CountedSystem = {
    size,
    quadratures,
    events,
    calls: 0,
    rates(y, out) {
      counted.calls++
      at = Float64Array.from(y)
      rates(y, out)
    },
    scales: scales ?? ((out) => out.fill(1)),
    eventValues(out) {
      events.forEach((event, i) => (out[i] = event.value(at)))
    },
    eventRates(out) {
      events.forEach((event, i) => (out[i] = event.rate?.(at) ?? NaN))
    },
    passed: (event) => events[event].passed?.(),
  }
  return counted
}

/** y = (cos t, -sin t, ∫cos² dt): the last feeds nothing back. */
export const oscillator = () =>
  system({
    size: 3,
    quadratures: 1,
    rates(y, out) {
      out[0] = y[1]
      out[1] = -y[0]
      out[2] = y[0] * y[0]
    },
  })

export const OSCILLATOR_START = Float64Array.of(1, 0, 0)
export const oscillatorAt = (t: number) => [Math.cos(t), -Math.sin(t), t / 2 + Math.sin(2 * t) / 4]

/** The chemical kinetics of Robertson (1966), stiff over eleven decades. */
export const robertson = () =>
  system({
    size: 3,
    rates([a, b, c], out) {
      const first = 0.04 * a
      const second = 3e7 * b * b
      const third = 1e4 * b * c
      out[0] = -first + third
      out[1] = first - third - second
      out[2] = second
    },
    scales: (out) => out.set([1, 1e-4, 1]),
  })

/** Van der Pol's oscillator in the form whose relaxation is slow for a large mu. */
export const vanDerPol = (mu: number) =>
  system({
    size: 2,
    rates([x, v], out) {
      out[0] = v
      out[1] = mu * (1 - x * x) * v - x
    },
    scales: (out) => out.set([1, mu]),
  })
