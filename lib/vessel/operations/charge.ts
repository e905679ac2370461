import { Problem } from '@/lib/errors'
import { Compressor, Reservoir } from '../network/boundary'
import type { ControlVolume } from '../network/volume'
import { FixedFlow, Limited } from '../paths/given'
import type { Resistance } from '../paths/resistance'
import type { Run, Stops } from '../run'
import type { Supply } from '../supply'
import { together } from '../vessel'
import { bar, kilograms } from '../words'
import { heatFor, link, ofBoundary, ofVolume, sameFluid, volumeFrom } from './parts'
import type { ChargeRequest } from './requests'
import { simulate, type Plan } from './simulate'

/** Lets gas from a supply into a vessel. */
export function charge(request: ChargeRequest): Run {
  const { from, supply, through, stops = {} } = request
  const fluid = supply.kind === 'bank' ? supply.contents.fluid : supply.fluid
  sameFluid(from.fluid, fluid)
  const p_Pa = highest(supply)
  checkWish(from, p_Pa, stops)
  const timeless = !through && supply.kind !== 'machine'
  const volume = volumeFrom(from, heatFor(request.heat, from.vessel, timeless))
  const common = { operation: 'charge', stops, timeless, rtol: request.rtol, horizon_s: request.horizon_s } as const
  const way = { to: ofVolume(volume), fluid, path: through, bothWays: false }
  if (supply.kind === 'bank') return fromBank(request, supply, volume, common)
  const T_K = supply.T_K
  const mass_kg = fluid.state('pT', p_Pa, T_K).rho_kg_m3 * from.vessel.volume_m3
  const plan = { ...common, volumes: [volume], from: [from] }
  if (supply.kind === 'machine') {
    const { rate_kg_s } = supply
    const delivery = through ? new Reservoir(fluid, p_Pa, T_K) : new Compressor(fluid, p_Pa, T_K)
    const wrap = (inner: Resistance) => (through ? new Limited(rate_kg_s, inner) : new FixedFlow(rate_kg_s))
    const connection = link({ ...way, from: ofBoundary(delivery), mass_kg, wrap })
    return { ...simulate({ ...plan, connections: [connection] })[0], supply, ...(through ? { path: through } : {}) }
  }
  const connection = link({ ...way, from: ofBoundary(new Reservoir(fluid, p_Pa, T_K)), mass_kg })
  return { ...simulate({ ...plan, connections: [connection] })[0], supply, ...(through ? { path: through } : {}) }
}

function fromBank(
  { from, through, heat }: ChargeRequest,
  bank: Extract<Supply, { kind: 'bank' }>,
  volume: ControlVolume,
  common: Pick<Plan, 'operation' | 'stops' | 'timeless' | 'rtol' | 'horizon_s'>,
): Run {
  const { contents, count } = bank
  const whole = together(contents.vessel, count)
  const donor = volumeFrom(contents, heatFor(heat, contents.vessel, common.timeless), whole)
  const connection = link({
    from: ofVolume(donor),
    to: ofVolume(volume),
    fluid: contents.fluid,
    path: through,
    mass_kg: Math.min(contents.m_kg * count, contents.rho_kg_m3 * from.vessel.volume_m3),
    bothWays: false,
  })
  const asOne = { ...contents, vessel: whole, m_kg: contents.m_kg * count }
  const [run, left] = simulate({ ...common, volumes: [volume, donor], from: [from, asOne], connections: [connection] })
  const each: Run = {
    ...left,
    vessel: contents.vessel,
    m_kg: left.m_kg / count,
    moved_kg: left.moved_kg / count,
    heat_J: left.heat_J / count,
    flow_peak_kg_s: left.flow_peak_kg_s / count,
  }
  return { ...run, supply: { ...bank, contents: each }, ...(through ? { path: through } : {}) }
}

export function highest(supply: Supply): number {
  switch (supply.kind) {
    case 'header':
    case 'room_air':
      return supply.p_Pa
    case 'machine':
      return supply.p_high_Pa
    case 'bank':
      return supply.contents.p_Pa
  }
}

function checkWish(from: Run, supply_Pa: number, { until_p_Pa, until_m_kg }: Stops) {
  if (!(supply_Pa > from.p_Pa)) {
    throw new Problem(
      'impossible',
      `the supply has ${bar(supply_Pa)} and the vessel ${bar(from.p_Pa)}: nothing flows in`,
    )
  }
  if (until_p_Pa !== undefined && until_p_Pa > supply_Pa) {
    throw new Problem('impossible', `the supply has ${bar(supply_Pa)}: ${bar(until_p_Pa)} cannot be reached`)
  }
  if (until_p_Pa !== undefined && until_p_Pa < from.p_Pa) {
    throw new Problem(
      'impossible',
      `the vessel is at ${bar(from.p_Pa)} already: it cannot be charged to ${bar(until_p_Pa)}`,
    )
  }
  if (until_m_kg !== undefined && until_m_kg < from.m_kg) {
    throw new Problem(
      'impossible',
      `the vessel holds ${kilograms(from.m_kg)} already: it cannot be charged to ${kilograms(until_m_kg)}`,
    )
  }
}
