import { Problem } from '@/lib/errors'
import { Dopri5 } from './dopri5'
import { Rodas4 } from './rodas4'
import { fallToZero } from './root'
import type { OdeSystem, Stepper } from './system'
import { turningPoint } from './turningPoint'

export type Method = 'explicit' | 'stiff' | 'auto'

/** A step that was accepted: readable at any fraction θ from 0 to `end` (1, or where an event cut it). */
export interface StepView {
  readonly t: number
  readonly h: number
  readonly end: number
  at(theta: number, out: Float64Array): void
}

export interface IntegrationOptions {
  /** Where to end at the latest. */
  readonly until: number
  /** Local error allowed in a step, relative to the system's scales. */
  readonly rtol: number
  /** `auto` begins explicit and goes over to the stiff method where stability, not accuracy, holds the steps short. */
  readonly method?: Method
  readonly maxSteps?: number
  readonly maxStep?: number
  /** Called at the start and at the end of each accepted step, where `rates` has just been called. */
  readonly onPoint?: (t: number, y: Float64Array, f: Float64Array, step: StepView | null) => void
}

export interface Outcome {
  /** `end`: reached `until`. `event`: a terminal event. `steps`: too many steps. `stuck`: no step is short enough. */
  readonly status: 'end' | 'event' | 'steps' | 'stuck'
  /** Which event, or -1. */
  readonly event: number
  readonly t: number
  readonly y: Float64Array
  readonly steps: number
  readonly rejected: number
  /** Whether the stiff method was in use at the end. */
  readonly stiff: boolean
  /** Why the last step that failed could not be made, where the system said so. */
  readonly cause: Problem | null
}

const SAFETY = 0.95
const SHRINK = 0.2
const GROW = 8
/** Memory of the last step's error in the step size (a PI controller): smooths the sequence of steps. */
const MEMORY = 0.04
const EVENT_TOLERANCE = 1e-12
const EVENT_OVERDUE = 1e-9
const EVENT_TIE = 1e-9
/** A step this short, relative to the time reached, is none. */
const SHORTEST = 1e-14

/**
 * Integrates from t = 0 until `until` or the first terminal event, which is found on the continuous solution and
 * landed on from the side where it has not yet happened. The number of steps is bounded; a Problem thrown by the
 * system rejects the step that met it.
 */
export function integrate(system: OdeSystem, y0: Float64Array, options: IntegrationOptions): Outcome {
  return new Integration(system, options).run(y0)
}

class Integration {
  private stepper: Stepper
  private readonly values: Float64Array
  private readonly valuesNew: Float64Array
  private readonly valuesAt: Float64Array
  private readonly slopes: Float64Array
  private readonly slopesNew: Float64Array
  private readonly point: Float64Array
  private readonly pointRates: Float64Array
  /** How far the system lets the next step go. */
  private reach = Infinity
  private t = 0
  private stiff: boolean
  private steps = 0
  private rejected = 0
  private cause: Problem | null = null

  constructor(
    private readonly system: OdeSystem,
    private readonly options: IntegrationOptions,
  ) {
    this.stiff = options.method === 'stiff'
    this.stepper = new (this.stiff ? Rodas4 : Dopri5)(this.system, options.rtol)
    this.values = new Float64Array(system.events.length)
    this.valuesNew = new Float64Array(system.events.length)
    this.valuesAt = new Float64Array(system.events.length)
    this.slopes = new Float64Array(system.events.length).fill(NaN)
    this.slopesNew = new Float64Array(system.events.length).fill(NaN)
    this.point = new Float64Array(system.size)
    this.pointRates = new Float64Array(system.size)
  }

  run(y0: Float64Array): Outcome {
    const { system, options } = this
    const { until, maxSteps = 5000, maxStep = Infinity } = options
    this.point.set(y0)
    this.begin()
    options.onPoint?.(0, this.stepper.y, this.stepper.f, null)
    this.overdue()
    const already = this.ended()
    if (already >= 0) return this.outcome('event', already)
    let h = Math.min(this.firstStep(), maxStep)
    let lastError = 1e-4
    let ceiling = GROW
    while (this.t < until) {
      if (this.steps + this.rejected >= maxSteps) return this.outcome('steps')
      if (!(h > SHORTEST * this.t)) return this.outcome('stuck')
      h = Math.min(h, this.reach)
      const last = this.t + h >= until * (1 - 1e-12)
      if (last) h = until - this.t
      const error = this.attempt(h)
      const power = 1 / this.stepper.errorPower
      if (!(error <= 1)) {
        this.rejected++
        ceiling = 1
        h *= error < Infinity ? Math.max(SHRINK, SAFETY * error ** -power) : SHRINK
        continue
      }
      this.steps++
      const factor = SAFETY * Math.max(error, 1e-12) ** (-power * (1 - MEMORY)) * lastError ** MEMORY
      lastError = Math.max(error, 1e-4)
      const hNext = Math.min(maxStep, h * Math.min(ceiling, Math.max(SHRINK, factor)))
      ceiling = GROW
      const event = this.finish(h, last ? until : this.t + h)
      if (event >= 0 && system.events[event].terminal) return this.outcome('event', event)
      const interrupted = event >= 0 || this.overdue()
      if (interrupted) {
        // What changed the system may have made another event happen at once.
        const done = this.ended()
        if (done >= 0) return this.outcome('event', done)
      }
      h = interrupted ? Math.min(this.firstStep(), hNext) : hNext
      if (this.stepper.stiff && options.method !== 'explicit') this.goStiff()
    }
    return this.outcome('end')
  }

  private attempt(h: number): number {
    try {
      const error = this.stepper.attempt(h)
      return Number.isNaN(error) ? Infinity : error
    } catch (error) {
      if (!(error instanceof Problem)) throw error
      this.cause = error
      return Infinity
    }
  }

  /** Moves to the end of the step just tried, or to the first event in it, whose index is returned (else -1). */
  private finish(h: number, end: number): number {
    const { system, stepper, values, valuesNew, options } = this
    const from = this.t
    stepper.accept()
    this.reach = system.longestStep?.() ?? Infinity
    system.eventValues(valuesNew)
    system.eventRates?.(this.slopesNew)
    const event = this.firstEvent(h)
    if (event.index < 0) {
      this.t = end
      values.set(valuesNew)
      this.slopes.set(this.slopesNew)
    } else {
      this.t = from + event.theta * h
      stepper.dense(event.theta, this.point)
      if (!system.events[event.index].terminal) system.passed?.(event.index)
      this.begin()
    }
    const at = (theta: number, out: Float64Array) => stepper.dense(theta, out)
    options.onPoint?.(this.t, stepper.y, stepper.f, { t: from, h, end: event.theta, at })
    return event.index
  }

  private firstEvent(h: number): { index: number; theta: number } {
    const { values, valuesNew } = this
    let first = { index: -1, theta: 1 }
    for (let index = 0; index < values.length; index++) {
      if (!(values[index] > 0)) continue
      const g = (theta: number) => this.eventAt(index, theta)
      let until = first.theta
      let atEnd = until < 1 ? g(until) : valuesNew[index]
      if (atEnd > 0 && this.slopes[index] < 0 && this.slopesNew[index] > 0) {
        // It falls and rises again within the step: it may have been below zero between.
        const dip = turningPoint(values[index], valuesNew[index], this.slopes[index] * h, this.slopesNew[index] * h)
        if (dip < until) [until, atEnd] = [dip, g(dip)]
      }
      if (atEnd > 0) continue
      const theta = fallToZero(g, 0, values[index], until, atEnd, EVENT_TOLERANCE)
      // Of two at once the one listed first counts.
      if (first.index < 0 || theta < first.theta * (1 - EVENT_TIE)) first = { index, theta }
    }
    return first
  }

  private eventAt(index: number, theta: number): number {
    this.stepper.dense(theta, this.point)
    this.system.rates(this.point, this.pointRates)
    this.system.eventValues(this.valuesAt)
    return this.valuesAt[index]
  }

  /**
   * An interruption that is past already where a step begins (it never was ahead, or came while another was handled)
   * happens there. At most one a step, so that two that call each other cannot hold the integration up.
   */
  private overdue(): boolean {
    const { system, values } = this
    const event = values.findIndex((value, i) => !system.events[i].terminal && value < -EVENT_OVERDUE)
    if (event < 0) return false
    system.passed?.(event)
    this.point.set(this.stepper.y)
    this.begin()
    return true
  }

  /** A terminal event that has happened where a step begins, or -1. */
  private ended(): number {
    return this.values.findIndex((value, i) => this.system.events[i].terminal && value <= 0)
  }

  /** Stands on `point`. */
  private begin() {
    this.system.rates(this.point, this.pointRates)
    this.stepper.reset(this.point, this.pointRates)
    this.reach = this.system.longestStep?.() ?? Infinity
    this.system.eventValues(this.values)
    this.system.eventRates?.(this.slopes)
  }

  private goStiff() {
    const { y, f } = this.stepper
    this.stiff = true
    this.stepper = new Rodas4(this.system, this.options.rtol)
    this.system.rates(y, f)
    this.stepper.reset(y, f)
  }

  /** A step over which the solution changes by a twentieth of its scale, or the whole way where nothing changes. */
  private firstStep(): number {
    const { system, stepper, options } = this
    const scales = new Float64Array(system.size)
    system.scales(scales)
    let fastest = 0
    for (let i = 0; i < system.size - system.quadratures; i++) {
      fastest = Math.max(fastest, Math.abs(stepper.f[i]) / scales[i])
    }
    const rest = options.until - this.t
    return fastest > 0 ? Math.min(rest, 0.05 / fastest) : rest
  }

  private outcome(status: Outcome['status'], event = -1): Outcome {
    return {
      status,
      event,
      t: this.t,
      y: Float64Array.from(this.stepper.y),
      steps: this.steps,
      rejected: this.rejected,
      stiff: this.stiff,
      cause: this.cause,
    }
  }
}
