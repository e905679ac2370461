import type { StepView } from '@/lib/numerics/ode'
import type { Trace } from '../run'
import { meanTemperature_K } from '../shell/temperatures'
import type { Network } from './system'

/** What is read off a volume at one moment. */
interface Reading {
  p_Pa: number
  T_K: number
  shellMean_K: number
  shellInner_K: number
  shellOuter_K: number
  flow_kg_s: number
}

type Columns = { -readonly [Key in keyof Trace]: number[] }

export interface Extremes {
  T_peak_K: number
  T_low_K: number
  p_peak_Pa: number
  p_low_Pa: number
  shell_peak_K: number
  shell_low_K: number
  flow_peak_kg_s: number
}

/** Follows one volume through a run: its trace, and its highest and lowest values, found within steps too. */
export class Recorder {
  readonly trace: Columns = {
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
  readonly extremes: Extremes = {
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
  /** Values and rates at the last point whose course within a step is watched: T, p, shell. */
  private last = { values: [0, 0, 0], rates: [0, 0, 0] }

  constructor(
    private readonly network: Network,
    private readonly index: number,
    /** Temperature of a shell that takes no part. */
    private readonly idleShell_K: number,
  ) {
    this.point = new Float64Array(network.size)
    this.pointRates = new Float64Array(network.size)
  }

  /** To be called at each accepted point, where the network's rates have just been worked out. */
  at(t: number) {
    const reading = this.read()
    const { trace, network } = this
    const other = network.volumes.length > 1 ? network.volumes[1 - this.index] : null
    trace.t_s.push(t)
    trace.p_Pa.push(reading.p_Pa)
    trace.T_K.push(reading.T_K)
    trace.m_kg.push(network.volumes[this.index].m_kg)
    trace.flow_kg_s.push(reading.flow_kg_s)
    trace.shellMean_K.push(reading.shellMean_K)
    trace.shellInner_K.push(reading.shellInner_K)
    trace.shellOuter_K.push(reading.shellOuter_K)
    trace.otherP_Pa.push(other ? other.gas.p_Pa : NaN)
    trace.otherT_K.push(other ? other.gas.T_K : NaN)
    this.note(reading)
  }

  /** Rates at the point just recorded; compared with those before, they tell of a peak within the step. */
  slopes(f: Float64Array): { values: number[]; rates: number[] } {
    const volume = this.network.volumes[this.index]
    const first = this.network.at[this.index] + 2
    const shellRate =
      volume.cells > 0
        ? f[first] / volume.wall.mass_kg[0] / volume.wall.caloric[0].capacity_J_kgK(volume.cells_K[0])
        : 0
    const shell = volume.cells > 0 ? volume.cells_K[0] : 0
    return { values: [volume.gas.T_K, volume.gas.p_Pa, shell], rates: [volume.dT_K_s, volume.dp_Pa_s, shellRate] }
  }

  /** Looks for turning points within the step that led to the point with these slopes. Moves the network's state. */
  within(step: StepView | null, now: { values: number[]; rates: number[] }) {
    const before = this.last
    this.last = now
    if (!step) return
    const length = step.h * step.end
    for (let i = 0; i < now.rates.length; i++) {
      if (!(before.rates[i] * now.rates[i] < 0)) continue
      const theta = turningPoint(before.values[i], now.values[i], before.rates[i] * length, now.rates[i] * length)
      step.at(theta * step.end, this.point)
      this.network.rates(this.point, this.pointRates)
      this.note(this.read())
    }
  }

  private read(): Reading {
    const volume = this.network.volumes[this.index]
    const { wall, cells_K } = volume
    const moving = wall.cells > 0
    const even = volume.cells === 0
    return {
      p_Pa: volume.gas.p_Pa,
      T_K: volume.gas.T_K,
      shellMean_K: moving ? meanTemperature_K(wall, cells_K) : this.idleShell_K,
      shellInner_K: moving ? (even ? cells_K[0] : volume.inner.face_K) : this.idleShell_K,
      shellOuter_K: moving ? (even ? cells_K[0] : volume.outer.face_K) : this.idleShell_K,
      flow_kg_s: this.network.inflow(volume),
    }
  }

  private note(reading: Reading) {
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

/** Where the cubic through two values with two slopes (per step) of opposite sign turns, as a fraction of the step. */
function turningPoint(v0: number, v1: number, d0: number, d1: number): number {
  // The derivative is a θ² + b θ + d0.
  const a = 3 * (d0 + d1) - 6 * (v1 - v0)
  const b = 6 * (v1 - v0) - 4 * d0 - 2 * d1
  const root = Math.sqrt(Math.max(0, b * b - 4 * a * d0))
  const q = -(b + (b >= 0 ? root : -root)) / 2
  for (const theta of [q / a, d0 / q]) if (theta > 0 && theta < 1) return theta
  return 0.5
}
