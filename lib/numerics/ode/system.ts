/**
 * An autonomous system of ordinary differential equations dy/dt = f(y), as the integrator sees it.
 *
 * The last `quadratures` components feed nothing back (their rates depend on the others only): they ride along, and the
 * error control and the implicit solves leave them out.
 */
export interface OdeSystem {
  readonly size: number
  readonly quadratures: number
  /** Writes f(y). May throw a Problem where y has no meaning: the step that asked is then tried again, shorter. */
  rates(y: Float64Array, out: Float64Array): void
  /** Magnitudes (all > 0) to which the relative tolerance refers, at the point of the last call of `rates`. */
  scales(out: Float64Array): void
  /** Which events end the integration; the others restart it where they happen. */
  readonly events: readonly { readonly terminal: boolean }[]
  /** Event functions at the point of the last call of `rates`. An event happens where its value falls to zero. */
  eventValues(out: Float64Array): void
  /** Their rates there, NaN where they are not known: they tell of an event that comes and goes within a step. */
  eventRates?(out: Float64Array): void
  /** The longest step that makes sense from the point of the last call of `rates`. */
  longestStep?(): number
  /** Told where an event that is not terminal has happened, before the integration goes on from there. */
  passed?(event: number): void
  /** df/dy at y, given f(y), row-major size × size, columns of quadratures left at zero. Default: by differences. */
  jacobian?(y: Float64Array, f: Float64Array, out: Float64Array): void
}

/** One way to make a step. `y` and `f` are the point it stands on. */
export interface Stepper {
  readonly y: Float64Array
  readonly f: Float64Array
  /** Order of the error estimate plus one: the error of a step of h falls as h to this power. */
  readonly errorPower: number
  /** Tries a step of h and returns its estimated error in units of the tolerance (≤ 1 is good enough). */
  attempt(h: number): number
  /** Moves to the end of the step just tried, calling `rates` there if the attempt did not end with that. */
  accept(): void
  /** The solution at the fraction θ of the step last tried or accepted. */
  dense(theta: number, out: Float64Array): void
  /** Moves elsewhere, where the rates are f. */
  reset(y: Float64Array, f: Float64Array): void
  /** Whether the last accepted steps were held short by stability alone. */
  readonly stiff: boolean
}

/** Root mean square of error / (rtol × scale) over the components that are controlled. */
export function errorNorm(error: Float64Array, scales: Float64Array, rtol: number, count: number): number {
  let sum = 0
  for (let i = 0; i < count; i++) {
    const part = error[i] / (rtol * scales[i])
    sum += part * part
  }
  return Math.sqrt(sum / count)
}
