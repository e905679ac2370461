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

/** Pressures this near each other, relative, count as equal. */
const EQUAL = 1e-6
/** So many times that may lie between them where heat alone makes gas pass, slowly against how fast they adjust. */
const SLAVED = 30
/** How far heat changes the pressure, relative, while a difference comes to its place. */
const EASE = 1e-3
/** Flow at which it is driven again, over that at the difference that counts as equal: past the root of `SLAVED`, lest both call each other. */
const HANDED_BACK = 7

/**
 * How a flow comes about. Where pressures have become equal a path's law has no slope, and a tiny difference passes
 * whatever is asked of it: the flow is then the one that keeps that difference, and not the other way round.
 * - `driven`: by the pressure difference, after the law of its path.
 * - `level`: pressures are as good as equal; heat alone makes gas pass.
 * - `shut`: a check valve is closed against the flow.
 */
export type Mode = 'driven' | 'level' | 'shut'

interface Parts {
  readonly from: End
  readonly to: End
  readonly forward: Resistance
  /** Absent where a check valve closes against it. */
  readonly backward: Resistance | null
  readonly draw: Draw
  /** The flow is what makes the pressure of the volume it serves change so fast. */
  readonly ramp_Pa_s: number | null
}

/** A flow from one end to the other, positive that way. */
export class Connection {
  readonly from: End
  readonly to: End
  mode: Mode = 'driven'
  flow_kg_s = 0
  /** Stagnation enthalpy of what flows, J/kg. */
  h_J_kg = 0
  /** The flow that would keep pressures equal, or follow the ramp, at the point last worked out. */
  asked_kg_s = 0
  /** What the path lets through while pressures count as equal. */
  private most_kg_s = 0
  /** Which way it is driven. */
  private sense = 1
  /** Whether phases are still drawn apart. */
  private apart = true
  /** The greatest flow with which a ramp has come to equal pressures: a ramp has no law to say what passes then. */
  private rampEnded_kg_s = 0
  private fromVersion = -1
  private toVersion = -1

  constructor(private readonly parts: Parts) {
    this.from = parts.from
    this.to = parts.to
  }

  get evaluations() {
    return this.parts.forward.evaluations + (this.parts.backward?.evaluations ?? 0)
  }

  get drop_Pa() {
    return pressureOf(this.from) - pressureOf(this.to)
  }

  /**
   * How far the pressures still are from equal, in units of what counts as equal; below zero once they have passed each
   * other. Where a check valve is shut they count as equal.
   */
  get unequal() {
    if (this.mode !== 'driven') return 0
    return (this.sense * this.drop_Pa) / (EQUAL * Math.max(pressureOf(this.from), pressureOf(this.to)))
  }

  /** Takes the states of both ends as they are; where it follows, `follow` then finds the flow. */
  evaluate() {
    const fromVersion = versionOf(this.from)
    const toVersion = versionOf(this.to)
    if (fromVersion === this.fromVersion && toVersion === this.toVersion) return
    const { forward, backward } = this.parts
    const drop = this.drop_Pa
    if (this.ramping) {
      // The flow of a moment ago is a good beginning for `follow`.
      this.law(forward, this.from, this.to)
    } else if (this.mode === 'driven') {
      if (drop < 0 && backward) this.flow_kg_s = -this.law(backward, this.to, this.from)
      else this.flow_kg_s = this.law(forward, this.from, this.to, Math.min(pressureOf(this.from), pressureOf(this.to)))
    } else {
      const most = this.law(forward, this.from, this.to, pressureOf(this.from) * (1 - EQUAL))
      this.most_kg_s = this.parts.ramp_Pa_s === null ? most : this.rampEnded_kg_s
    }
    this.fromVersion = fromVersion
    this.toVersion = toVersion
  }

  private law(resistance: Resistance, from: End, to: End, p_down = pressureOf(to)): number {
    const draw = this.apart ? this.parts.draw : 'mixed'
    const up = 'volume' in from ? from.volume.rest(draw) : from.boundary.rest?.(p_down)
    if (!up) return 0
    this.h_J_kg = up.h_J_kg
    return resistance.flow_kg_s(up, p_down)
  }

  /**
   * A step that stays well short of where pressures are equal: a path's law has no slope there, and an explicit step that
   * reaches for it would be thrown away.
   */
  get longestStep_s() {
    if (this.mode !== 'driven') return Infinity
    const drop = this.sense * this.drop_Pa
    const rate = this.sense * (rateOf(this.from) - rateOf(this.to))
    return drop > 0 && rate < 0 ? (0.55 * drop) / -rate : Infinity
  }

  /** Finds the flow asked for, with heat as it stands; returns by how much it changed, relative. */
  follow(): number {
    const before = this.flow_kg_s
    const still = this.pressureRate(0)
    const each = this.pressureRate(1) - still
    this.asked_kg_s = (this.target() - still) / each
    if (this.mode === 'shut') this.flow_kg_s = 0
    else if (this.mode === 'level') this.flow_kg_s = this.levelFlow()
    else if (this.ramping) this.flow_kg_s = this.drop_Pa > 0 ? Math.max(0, this.asked_kg_s) : 0
    return this.flow_kg_s === before ? 0 : Math.abs(this.flow_kg_s - before) / Math.abs(this.flow_kg_s)
  }

  /**
   * What is asked, a little more or less so that the difference comes to where the path's law has it for that flow: while
   * heat changes the pressure by a thousandth, say, which is slow enough not to be felt.
   */
  private levelFlow(): number {
    const { asked_kg_s: asked, most_kg_s: most } = this
    const share = most > 0 ? asked / most : 0
    const away = this.drop_Pa / pressureOf(this.from) - EQUAL * share * Math.abs(share)
    return asked + Math.abs(asked) * (away / EASE)
  }

  /** Of the drop; for a ramp of the pressure of the volume it serves. */
  private pressureRate(flow: number): number {
    const { from, to } = this
    const energy = flow * this.h_J_kg
    let rate = 0
    if ('volume' in to) rate -= to.volume.pressureRate(flow, energy + to.volume.inner.heat_W)
    if ('volume' in from && !(this.ramping && 'volume' in to)) {
      rate += from.volume.pressureRate(-flow, -energy + from.volume.inner.heat_W)
    }
    return rate
  }

  private target() {
    return this.ramping ? -(this.parts.ramp_Pa_s ?? 0) : 0
  }

  get ramping() {
    return this.mode === 'driven' && this.parts.ramp_Pa_s !== null
  }

  /** Below 1 where a driven flow is nearly what heat asks for: the drop then only follows. */
  private get unslaved() {
    // the flow of a ramp is by its nature what is asked for: that says nothing of how near to equal the pressures are
    return this.ramping || this.flow_kg_s === 0
      ? Infinity
      : (2 * Math.abs(this.flow_kg_s - this.asked_kg_s)) / Math.abs(this.flow_kg_s)
  }

  /** Falls to zero where the mode is to change. */
  readonly modeEnds = (): number => {
    const most = Math.max(this.most_kg_s, Number.MIN_VALUE)
    switch (this.mode) {
      case 'driven':
        return Math.log(Math.max(Math.min(this.unequal, Math.max(this.unequal / SLAVED, this.unslaved)), 1e-9))
      case 'level': {
        const spare = 1 - Math.abs(this.asked_kg_s) / (HANDED_BACK * most)
        return this.parts.backward ? spare : Math.min(spare, this.asked_kg_s / most)
      }
      case 'shut':
        return Math.max(-this.drop_Pa / (EQUAL * pressureOf(this.to)), -this.asked_kg_s / most)
    }
  }

  /** Falls to zero where no liquid is left to be drawn. What condenses later is mist, and goes with the gas. */
  readonly liquidLeft = (): number => {
    const { draw, from } = this.parts
    if (draw !== 'liquid' || !this.apart || !('volume' in from)) return 1
    const { x, phase } = from.volume.gas
    if (phase === 'two-phase') return 1 - x
    return phase === 'gas' ? -1 : 1
  }

  liquidGone() {
    this.apart = false
    this.fromVersion = -1
  }

  changeMode() {
    if (this.mode === 'level') this.mode = this.parts.backward || this.asked_kg_s > this.most_kg_s ? 'driven' : 'shut'
    else {
      this.rampEnded_kg_s = Math.max(Math.abs(this.flow_kg_s), this.rampEnded_kg_s)
      this.mode = 'level'
    }
    this.sense = this.drop_Pa < 0 && this.parts.backward ? -1 : 1
    this.fromVersion = -1
  }
}

const pressureOf = (end: End) => ('volume' in end ? end.volume.p_Pa : end.boundary.p_Pa)
const rateOf = (end: End) => ('volume' in end ? end.volume.dp_Pa_s : 0)
const versionOf = (end: End) => ('volume' in end ? end.volume.version : 0)
