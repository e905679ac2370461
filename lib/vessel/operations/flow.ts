import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { Path } from '../paths/kinds'
import { resistanceOf } from '../paths/build'
import { bar } from '../words'
import { checkPath } from './parts'

/** Mass flow of a path at a moment, kg/s: from a state at rest to a pressure. */
export function flowThrough(path: Path, fluid: Fluid, up: State, back_Pa: number): number {
  checkPath(path)
  if (!(back_Pa >= 0)) throw new Problem('range', 'the pressure it goes to must not be negative')
  if (!(up.p_Pa > back_Pa)) {
    throw new Problem('impossible', `${bar(up.p_Pa)} does not flow to ${bar(back_Pa)}`)
  }
  return resistanceOf(path, fluid).flow_kg_s(up, back_Pa)
}
