import type { OdeSystem } from '@/lib/numerics/ode'
import type { Connection, End } from './connection'
import { differenceJacobian } from './jacobian'
import type { ControlVolume } from './volume'

/** What ends or interrupts a run, as a function of where it stands that falls to zero. */
export interface Watch {
  readonly terminal: boolean
  value(): number
  /** How fast it changes; NaN, or absent, where that is not known. */
  rate?(): number
  /** What happens where it interrupts. */
  passed?(): void
}

const FOLLOW_ROUNDS = 30

/** Heat into the contents and out of the shell, J. */
const PER_VOLUME = 2
/** Mass and enthalpy that have passed. */
const PER_CONNECTION = 2

/**
 * Volumes and what flows between them and their surroundings, as one system of equations. Behind the volumes' own parts
 * the solution vector carries what has crossed each border; the balance is struck from those and the states at the ends.
 */
export class Network implements OdeSystem {
  readonly size: number
  readonly quadratures: number
  /** Where each volume's part begins. */
  readonly at: readonly number[]
  /** Where the parts of each connection's ends begin, or -1. */
  readonly sources: readonly number[]
  readonly sinks: readonly number[]
  /** Set before the integration begins. */
  events: readonly Watch[] = []
  /** Calls of `rates`. */
  calls = 0

  constructor(
    readonly volumes: readonly ControlVolume[],
    readonly connections: readonly Connection[],
  ) {
    let size = 0
    this.at = volumes.map((volume) => (size += volume.size) - volume.size)
    this.quadratures = PER_VOLUME * volumes.length + PER_CONNECTION * connections.length
    this.size = size + this.quadratures
    const partOf = (end: End) => ('volume' in end ? this.at[volumes.indexOf(end.volume)] : -1)
    this.sources = connections.map(({ from }) => partOf(from))
    this.sinks = connections.map(({ to }) => partOf(to))
  }

  get evaluations() {
    const sum = (parts: readonly { readonly evaluations: number }[]) => parts.reduce((n, p) => n + p.evaluations, 0)
    return sum(this.volumes) + sum(this.connections)
  }

  /** Place of a volume's ledger: heat into its contents; the next is heat out of its shell. */
  heatLedger(volume: number) {
    return this.size - this.quadratures + PER_VOLUME * volume
  }

  /** Place of a connection's ledger: mass that has passed; the next is its enthalpy. */
  flowLedger(connection: number) {
    return this.size - PER_CONNECTION * (this.connections.length - connection)
  }

  rates(y: Float64Array, out: Float64Array) {
    this.calls++
    const { volumes, connections, at } = this
    for (let i = 0; i < volumes.length; i++) volumes[i].read(y, at[i])
    for (const connection of connections) connection.evaluate()
    this.passHeat()
    out.fill(0)
    for (let i = 0; i < connections.length; i++) this.addFlow(i, out)
    for (let i = 0; i < volumes.length; i++) {
      const ledger = this.heatLedger(i)
      out[ledger] = volumes[i].settleRates(out, at[i])
      out[ledger + 1] = volumes[i].outer.heat_W
    }
  }

  /** Heat and the flows that follow from it; a jet makes heat depend on the flow in its turn. */
  private passHeat() {
    const { volumes, connections } = this
    for (let round = 0; round < FOLLOW_ROUNDS; round++) {
      for (const volume of volumes) volume.passHeat(this.inflow(volume))
      let change = 0
      for (const connection of connections) change = Math.max(change, connection.follow())
      if (change <= 1e-13) return
    }
  }

  /** Net mass flow into a volume at the point last worked out. */
  inflow(volume: ControlVolume): number {
    let sum = 0
    for (const { from, to, flow_kg_s } of this.connections) {
      if ('volume' in to && to.volume === volume) sum += flow_kg_s
      if ('volume' in from && from.volume === volume) sum -= flow_kg_s
    }
    return sum
  }

  private addFlow(index: number, out: Float64Array) {
    const { flow_kg_s, h_J_kg } = this.connections[index]
    const energy = flow_kg_s * h_J_kg
    const source = this.sources[index]
    const sink = this.sinks[index]
    if (source >= 0) {
      out[source] -= flow_kg_s
      out[source + 1] -= energy
    }
    if (sink >= 0) {
      out[sink] += flow_kg_s
      out[sink + 1] += energy
    }
    const ledger = this.flowLedger(index)
    out[ledger] = flow_kg_s
    out[ledger + 1] = energy
  }

  scales(out: Float64Array) {
    out.fill(1)
    this.volumes.forEach((volume, i) => volume.scales(out, this.at[i]))
  }

  longestStep() {
    let longest = Infinity
    for (const connection of this.connections) longest = Math.min(longest, connection.longestStep_s)
    return longest
  }

  eventValues(out: Float64Array) {
    for (let i = 0; i < this.events.length; i++) out[i] = this.events[i].value()
  }

  eventRates(out: Float64Array) {
    for (let i = 0; i < this.events.length; i++) out[i] = this.events[i].rate?.() ?? NaN
  }

  passed(event: number) {
    this.events[event].passed?.()
  }

  jacobian(y: Float64Array, f: Float64Array, out: Float64Array) {
    differenceJacobian(this, y, f, out)
  }
}
