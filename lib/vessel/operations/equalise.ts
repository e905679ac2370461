import type { Run } from '../run'
import { heatFor, link, ofVolume, sameFluid, volumeFrom } from './parts'
import type { EqualiseRequest } from './requests'
import { simulate } from './simulate'

/** Opens two vessels to each other, whichever has the higher pressure: what becomes of either. */
export function equalise(request: EqualiseRequest): { a: Run; b: Run } {
  const { a, b, through, stops = {} } = request
  sameFluid(a.fluid, b.fluid)
  const timeless = !through
  const volumes = [a, b].map((run) => volumeFrom(run, heatFor(request.heat, run.vessel, timeless)))
  const [first, second] = a.p_Pa >= b.p_Pa ? volumes : [volumes[1], volumes[0]]
  const connection = link({
    from: ofVolume(first),
    to: ofVolume(second),
    fluid: a.fluid,
    path: through,
    mass_kg: Math.max(a.m_kg, b.m_kg),
    bothWays: true,
  })
  const plan = { operation: 'equalise', volumes, from: [a, b], connections: [connection], stops, timeless } as const
  const runs = simulate({ ...plan, rtol: request.rtol, horizon_s: request.horizon_s })
  const path = through ? { path: through } : {}
  return { a: { ...runs[0], ...path }, b: { ...runs[1], ...path } }
}
