import { Problem } from '@/lib/errors'
import { Sink } from '../network/boundary'
import type { Run, Stops } from '../run'
import { bar, kilograms } from '../words'
import { heatFor, link, ofBoundary, ofVolume, volumeFrom } from './parts'
import type { EvacuateRequest, VentRequest } from './requests'
import { simulate } from './simulate'

/** Standard atmosphere, Pa. */
const ATMOSPHERE_Pa = 101_325

/** Lets gas (or liquid, or both) out of a vessel. */
export function vent(request: VentRequest): Run {
  return letOut('vent', request, request.back_Pa ?? ATMOSPHERE_Pa)
}

/** Draws a vessel empty, with a pump or into a vacuum. */
export function evacuate(request: EvacuateRequest): Run {
  return letOut('evacuate', request, lowest(request.through))
}

function letOut(operation: 'vent' | 'evacuate', request: VentRequest, back_Pa: number): Run {
  const { from, through, draw = 'mixed', stops = {} } = request
  checkWish(from, back_Pa, stops)
  const timeless = !through
  const volume = volumeFrom(from, heatFor(request.heat, from.vessel, timeless))
  const connection = link({
    from: ofVolume(volume),
    to: ofBoundary(new Sink(back_Pa)),
    fluid: from.fluid,
    path: through,
    mass_kg: from.m_kg,
    draw,
    bothWays: false,
  })
  const plan = { operation, volumes: [volume], from: [from], connections: [connection], stops, timeless }
  const [run] = simulate({ ...plan, rtol: request.rtol, horizon_s: request.horizon_s })
  return { ...run, ...(through ? { path: through } : {}) }
}

/** The pressure a pump comes to in the end; without a pump, a vacuum. */
function lowest(path: EvacuateRequest['through']): number {
  if (path.kind === 'pump') return path.p_low_Pa
  if (path.kind === 'series') return Math.max(...path.paths.map(lowest))
  return 0
}

function checkWish(from: Run, back_Pa: number, { until_p_Pa, until_m_kg }: Stops) {
  if (!(from.m_kg > 0)) throw new Problem('impossible', 'the vessel is empty: nothing flows out')
  if (!(from.p_Pa > back_Pa)) {
    throw new Problem(
      'impossible',
      `the vessel is at ${bar(from.p_Pa)}, and what it would go to at ${bar(back_Pa)}: nothing flows out`,
    )
  }
  if (until_p_Pa !== undefined && until_p_Pa > from.p_Pa) {
    throw new Problem('impossible', `the vessel is at ${bar(from.p_Pa)}: it cannot be let down to ${bar(until_p_Pa)}`)
  }
  if (until_p_Pa !== undefined && until_p_Pa < back_Pa) {
    throw new Problem('impossible', `it goes to ${bar(back_Pa)}: ${bar(until_p_Pa)} cannot be reached`)
  }
  if (until_m_kg !== undefined && until_m_kg > from.m_kg) {
    throw new Problem(
      'impossible',
      `the vessel holds ${kilograms(from.m_kg)}: it cannot be let down to ${kilograms(until_m_kg)}`,
    )
  }
}
