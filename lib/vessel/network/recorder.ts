import { turningPoint, type StepView } from '@/lib/numerics/ode'
import type { Trace } from '../run'
import { meanTemperature_K } from '../shell/temperatures'
import type { Network } from './system'

/** What is read off a volume at one moment. */
type Reading = Record<Exclude<keyof Trace, 't_s'>, number>

/** A value whose course within a step is watched, with its rate. */
interface Slope {
  readonly value: number
  readonly rate: number
  /** A plot shows a straight line where the curve is nearer to it than this. */
  readonly visible: number
}

interface Moment {
  readonly reading: Reading
  readonly slopes: readonly Slope[]
}

const COLUMNS = [
  'p_Pa',
  'T_K',
  'm_kg',
  'flow_kg_s',
  'shellMean_K',
  'shellInner_K',
  'shellOuter_K',
  'otherP_Pa',
  'otherT_K',
] as const satisfies readonly (keyof Reading)[]

/** How far from a straight line a curve may be drawn, of its value for a pressure, in kelvins for a temperature. */
const VISIBLE_PART = 0.005
const VISIBLE_K = 0.5
const MOST_BETWEEN = 7

/** Follows one volume through a run: its trace, and its highest and lowest values, found within steps too. */
export class Recorder {
  readonly trace: { -readonly [Key in keyof Trace]: number[] } = {
    t_s: [],
    p_Pa: [],
    T_K: [],
    m_kg: [],
    flow_kg_s: [],
    shellMean_K: [],
    shellInner_K: [],
    shellOuter_K: [],
    otherP_Pa: [],
    otherT_K: [],
  }
  readonly extremes = {
    T_peak_K: -Infinity,
    T_low_K: Infinity,
    p_peak_Pa: -Infinity,
    p_low_Pa: Infinity,
    shell_peak_K: -Infinity,
    shell_low_K: Infinity,
    flow_peak_kg_s: 0,
  }
  private readonly point: Float64Array
  private readonly pointRates: Float64Array
  private last: Moment | null = null

  constructor(
    private readonly network: Network,
    private readonly index: number,
    /** Temperature of a shell that takes no part. */
    private readonly idleShell_K: number,
    private readonly keepsTrace: boolean,
  ) {
    this.point = new Float64Array(network.size)
    this.pointRates = new Float64Array(network.size)
  }

  /** The last moment added. */
  get end(): Reading {
    if (!this.last) throw new Error('nothing has been recorded')
    return this.last.reading
  }

  /** What the volume is like where the network's rates have just been worked out to be f. */
  look(f: Float64Array): Moment {
    const volume = this.network.volumes[this.index]
    const slopes: Slope[] = [
      { value: volume.gas.T_K, rate: volume.dT_K_s, visible: VISIBLE_K },
      { value: volume.gas.p_Pa, rate: volume.dp_Pa_s, visible: VISIBLE_PART * volume.gas.p_Pa },
    ]
    const first = this.network.at[this.index] + 2
    for (const cell of volume.cells > 1 ? [0, volume.cells - 1] : volume.cells === 1 ? [0] : []) {
      const T_K = volume.cells_K[cell]
      const capacity = volume.wall.mass_kg[cell] * volume.wall.caloric[cell].capacity_J_kgK(T_K)
      slopes.push({ value: T_K, rate: f[first + cell] / capacity, visible: VISIBLE_K })
    }
    return { reading: this.read(), slopes }
  }

  /** Adds a moment and what happened in the step that led to it. Moves the network's state. */
  add(t: number, now: Moment, step: StepView | null) {
    if (step && this.last) this.between(step, this.last, now)
    this.note(t, now.reading)
    this.last = now
  }

  /** Turning points within a step, and as many points more as a plot needs to look smooth. */
  private between(step: StepView, before: Moment, now: Moment) {
    const length = step.h * step.end
    const fractions: number[] = []
    let bend = 0
    now.slopes.forEach(({ value, rate, visible }, i) => {
      const { value: value0, rate: rate0 } = before.slopes[i]
      // Half way, the cubic through both ends lies this far from the straight line.
      bend = Math.max(bend, (Math.abs(rate0 - rate) * length) / 8 / visible)
      if (rate0 * rate < 0) fractions.push(turningPoint(value0, value, rate0 * length, rate * length))
    })
    if (this.keepsTrace) {
      const more = Math.min(MOST_BETWEEN, Math.ceil(Math.sqrt(bend)) - 1)
      for (let i = 1; i <= more; i++) fractions.push(i / (more + 1))
    }
    fractions.sort((a, b) => a - b)
    for (const theta of fractions) {
      step.at(theta * step.end, this.point)
      this.network.rates(this.point, this.pointRates)
      this.note(step.t + theta * length, this.read())
    }
  }

  private read(): Reading {
    const { network } = this
    const volume = network.volumes[this.index]
    const { wall, cells_K, gas } = volume
    const moves = wall.cells > 0
    const even = volume.cells === 0
    const other = network.volumes.length > 1 ? network.volumes[1 - this.index].gas : null
    return {
      p_Pa: gas.p_Pa,
      T_K: gas.T_K,
      m_kg: volume.m_kg,
      flow_kg_s: network.inflow(volume),
      shellMean_K: moves ? meanTemperature_K(wall, cells_K) : this.idleShell_K,
      shellInner_K: moves ? (even ? cells_K[0] : volume.inner.face_K) : this.idleShell_K,
      shellOuter_K: moves ? (even ? cells_K[0] : volume.outer.face_K) : this.idleShell_K,
      otherP_Pa: other ? other.p_Pa : NaN,
      otherT_K: other ? other.T_K : NaN,
    }
  }

  private note(t: number, reading: Reading) {
    if (this.keepsTrace) {
      this.trace.t_s.push(t)
      for (const column of COLUMNS) this.trace[column].push(reading[column])
    }
    const e = this.extremes
    e.T_peak_K = Math.max(e.T_peak_K, reading.T_K)
    e.T_low_K = Math.min(e.T_low_K, reading.T_K)
    e.p_peak_Pa = Math.max(e.p_peak_Pa, reading.p_Pa)
    e.p_low_Pa = Math.min(e.p_low_Pa, reading.p_Pa)
    e.shell_peak_K = Math.max(e.shell_peak_K, reading.shellInner_K, reading.shellOuter_K)
    e.shell_low_K = Math.min(e.shell_low_K, reading.shellInner_K, reading.shellOuter_K)
    e.flow_peak_kg_s = Math.max(e.flow_peak_kg_s, Math.abs(reading.flow_kg_s))
  }
}
