import type { Network, Watch } from '../network/system'
import type { Connection } from '../network/connection'
import type { ControlVolume } from '../network/volume'
import type { StoppedBy, Stops } from '../run'

export interface NamedWatch extends Watch {
  readonly name: StoppedBy | 'change'
}

/** A stop is landed on so far short of it, relative: what a state found twice may differ by, so that it is not overshot. */
const SHORT_OF = 2e-11
/** At rest within this, K. */
const RESTING_K = 0.01
/** The run stops so close above the lowest temperature of the fluid's equation, relative. */
const COLD_MARGIN = 1e-5

/** The stops of a run as they stand for this volume, which is where it starts. */
export function watchesFor(volume: ControlVolume, connections: readonly Connection[], stops: Stops): NamedWatch[] {
  const watches: NamedWatch[] = []
  const reach = (name: StoppedBy, target: number | undefined, value: () => number, rate = () => NaN) => {
    if (target === undefined) return
    const scale = (value() <= target ? 1 : -1) * (Math.abs(target) || 1)
    watches.push({
      name,
      terminal: true,
      value: () => (target - value()) / scale - SHORT_OF,
      rate: () => -rate() / scale,
    })
  }
  reach(
    'until_p',
    stops.until_p_Pa,
    () => volume.gas.p_Pa,
    () => volume.dp_Pa_s,
  )
  reach(
    'until_T',
    stops.until_T_K,
    () => volume.gas.T_K,
    () => volume.dT_K_s,
  )
  reach('until_m', stops.until_m_kg, () => volume.m_kg)
  reach('until_x', stops.until_x, () => qualityOf(volume.gas.x))
  const { until_flow_kg_s: least } = stops
  if (least !== undefined) {
    const flow = () => Math.max(0, ...connections.map((connection) => Math.abs(connection.flow_kg_s)))
    watches.push({ name: 'until_flow', terminal: true, value: () => flow() / least - 1 })
  }
  if (stops.level) watches.push({ name: 'level', terminal: true, value: () => logOf(inequality(connections)) })
  return watches
}

/** Where a flow comes about in another way from there on, or takes another phase. */
export function changeWatches(connection: Connection): NamedWatch[] {
  const change = { name: 'change', terminal: false } as const
  return [
    { ...change, value: connection.modeEnds, passed: () => connection.changeMode() },
    { ...change, value: connection.liquidLeft, passed: () => connection.liquidGone() },
  ]
}

/** Past the triple point of any volume. */
export function coldWatch(volumes: readonly ControlVolume[]): NamedWatch {
  return {
    name: 'triple_point',
    terminal: true,
    value: () => Math.min(...volumes.map((v) => v.gas.T_K / (v.fluid.info.T_min_K * (1 + COLD_MARGIN)) - 1)),
  }
}

/** Nothing flows any more, and with heat in play every temperature is where it rests. */
export function settledWatch({ volumes, connections }: Network): NamedWatch {
  return {
    name: 'settled',
    terminal: true,
    value: () => logOf(Math.max(inequality(connections), ...volumes.map(unsettledHeat))),
  }
}

const inequality = (connections: readonly Connection[]) => Math.max(0, ...connections.map((c) => c.unequal))

/** Of something that counts as nothing once it is at or below 1: even over many powers of ten, zero at 1. */
const logOf = (value: number) => Math.log(Math.max(value, 1e-9))

function unsettledHeat(volume: ControlVolume): number {
  if (volume.cells === 0) return 0
  const { outside, ambient_T_K } = volume.vessel
  let distance = Math.abs(volume.gas.T_K - volume.inner.face_K)
  for (const T of volume.cells_K) distance = Math.max(distance, Math.abs(T - volume.gas.T_K))
  if (outside?.kind === 'absorbed' && outside.flux_W_m2 !== 0) return Infinity
  if (outside?.kind === 'fixed') distance = Math.max(distance, Math.abs(volume.outer.face_K - ambient_T_K))
  return distance / RESTING_K
}

/** Quality with one phase taken as wholly vapour, so that a stop at quality 1 means: no liquid left. */
const qualityOf = (x: number) => (x >= 0 && x <= 1 ? x : 1)
