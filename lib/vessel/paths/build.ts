import { Problem } from '@/lib/errors'
import type { Fluid } from '@/lib/fluids'
import type { Path } from './kinds'
import { FixedFlow, Pump } from './given'
import { Orifice } from './orifice'
import type { Resistance } from './resistance'
import { Series } from './series'
import { Sonic } from './sonic'
import { Valve } from './valve'

/** The resistance of a path for a fluid. A pressure ramp is none: it depends on the vessel it serves. */
export function resistanceOf(path: Path, fluid: Fluid): Resistance {
  switch (path.kind) {
    case 'orifice':
      return new Orifice(fluid, path.diameter_m, path.dischargeCoefficient)
    case 'valve':
      return new Valve(fluid, path.Kv_m3_h, path.xT)
    case 'sonic':
      return new Sonic(fluid, path.C_m3_sPa, path.b, path.m)
    case 'fixed_flow':
      return new FixedFlow(path.rate_kg_s)
    case 'pump':
      return new Pump(path.speed_m3_s, path.p_low_Pa)
    case 'series':
      return path.paths
        .map((part) => resistanceOf(part, fluid))
        .reduceRight((rest, part) => new Series(fluid, part, rest))
    case 'ramp':
      throw new Problem(
        'unsupported',
        'a pressure ramp stands alone: it cannot be one of a series, and has no flow of its own',
      )
  }
}
