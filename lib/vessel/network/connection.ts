import type { State } from '@/lib/fluids'
import type { Resistance } from '../paths/resistance'
import type { Draw } from '../run'
import type { ControlVolume } from './volume'

/** Where a flow comes from or goes to without being changed by it. */
export interface Boundary {
  readonly p_Pa: number
  /** What it delivers, at rest, into a place at this pressure; absent for what only receives. */
  rest?(p_into_Pa: number): State
  /** Evaluations of the equation of state. */
  readonly evaluations: number
}

export type End = { readonly volume: ControlVolume } | { readonly boundary: Boundary }

/** Nearer to equal pressures than this, relative, flow goes with the pressure difference: its root has no slope there. */
export const LAMINAR = 1e-6

/** A flow from one end to the other, positive that way. */
export class Connection {
  flow_kg_s = 0
  /** Stagnation enthalpy of what flows, J/kg. */
  h_J_kg = 0
  private fromVersion = -1
  private toVersion = -1

  constructor(
    readonly from: End,
    readonly to: End,
    private readonly forward: Resistance,
    /** Absent where a check valve closes against it. */
    private readonly backward: Resistance | null,
    private readonly draw: Draw,
    /** The flow is what makes the pressure of the volume it serves change so fast. */
    readonly ramp_Pa_s: number | null = null,
  ) {}

  get evaluations() {
    return this.forward.evaluations + (this.backward?.evaluations ?? 0)
  }

  get drop_Pa() {
    return pressureOf(this.from) - pressureOf(this.to)
  }

  /** How far from equal the pressures are, relative; a flow that a check valve stops counts as at rest. */
  get unequal() {
    const drop = this.drop_Pa
    if (drop < 0 && !this.backward) return 0
    return Math.abs(drop) / Math.max(pressureOf(this.from), pressureOf(this.to))
  }

  evaluate() {
    const fromVersion = versionOf(this.from)
    const toVersion = versionOf(this.to)
    if (fromVersion === this.fromVersion && toVersion === this.toVersion) return
    const drop = this.drop_Pa
    this.flow_kg_s = 0
    if (drop > 0) this.flow_kg_s = this.flow(this.forward, this.from, this.to)
    else if (drop < 0 && this.backward) this.flow_kg_s = -this.flow(this.backward, this.to, this.from)
    this.fromVersion = fromVersion
    this.toVersion = toVersion
  }

  private flow(resistance: Resistance, from: End, to: End): number {
    const p_down = pressureOf(to)
    const up = 'volume' in from ? from.volume.rest(this.draw) : from.boundary.rest?.(p_down)
    if (!up) return 0
    this.h_J_kg = up.h_J_kg
    const p_up = pressureOf(from)
    const part = (p_up - p_down) / (LAMINAR * p_up)
    if (part >= 1) return resistance.flow_kg_s(up, p_down)
    // Joins the law of the path with its value and, for a root, its slope.
    return resistance.flow_kg_s(up, p_up * (1 - LAMINAR)) * part * (1.25 - 0.25 * part * part)
  }
}

const pressureOf = (end: End) => ('volume' in end ? end.volume.p_Pa : end.boundary.p_Pa)
const versionOf = (end: End) => ('volume' in end ? end.volume.version : 0)
