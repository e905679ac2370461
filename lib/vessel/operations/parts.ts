import { Problem } from '@/lib/errors'
import type { Fluid } from '@/lib/fluids'
import { Connection, type Boundary, type End } from '../network/connection'
import { ControlVolume } from '../network/volume'
import type { Path } from '../paths/kinds'
import { resistanceOf } from '../paths/build'
import { FixedFlow } from '../paths/given'
import type { Resistance } from '../paths/resistance'
import type { Draw, Heat, Run } from '../run'
import type { Vessel } from '../vessel'
import { SEED_Pa } from './begin'

/** A run's vessel, ready to be integrated. `vessel` may stand for several such vessels together. */
export function volumeFrom(run: Run, heat: Heat, vessel: Vessel = run.vessel): ControlVolume {
  const { fluid } = run
  const guess =
    run.m_kg > 0
      ? fluid.state('rhou', run.rho_kg_m3, run.u_J_kg)
      : fluid.state('pT', SEED_Pa, Math.max(run.T_K, fluid.info.T_min_K))
  return new ControlVolume(vessel, fluid, heat, run, guess)
}

/** How heat passes: by the vessel's coefficients where there is time and a shell, else not at all, unless it is said. */
export function heatFor(heat: Heat | undefined, vessel: Vessel, timeless: boolean): Heat {
  if (heat === 'by_coefficients' && timeless) {
    throw new Problem('impossible', 'heat by coefficients takes time: give a path')
  }
  const chosen = heat ?? (timeless ? 'adiabatic' : 'by_coefficients')
  if (vessel.shell.kind !== 'none') return chosen
  return chosen === 'by_coefficients' || chosen === 'shell_at_gas_temperature' ? 'adiabatic' : chosen
}

interface Link {
  readonly from: End
  readonly to: End
  readonly fluid: Fluid
  /** Absent in a balance: mass passes as fast as the independent variable says. */
  readonly path: Path | undefined
  /** A typical mass, which in a balance passes in one unit of the independent variable. */
  readonly mass_kg: number
  readonly draw?: Draw
  /** Whether flow may turn back unless the path says. */
  readonly bothWays: boolean
  /** Something around the path, such as a highest flow. */
  readonly wrap?: (inner: Resistance) => Resistance
}

export function link({ from, to, fluid, path, mass_kg, draw = 'mixed', bothWays, wrap }: Link): Connection {
  checkPath(path)
  const make = () => {
    const inner = !path || path.kind === 'ramp' ? new FixedFlow(mass_kg) : resistanceOf(path, fluid)
    return wrap ? wrap(inner) : inner
  }
  const open = path?.check === undefined ? bothWays : !path.check
  const ramp_Pa_s = path?.kind === 'ramp' ? path.rate_Pa_s : null
  return new Connection({ from, to, forward: make(), backward: open ? make() : null, draw, ramp_Pa_s })
}

export const ofVolume = (volume: ControlVolume): End => ({ volume })
export const ofBoundary = (boundary: Boundary): End => ({ boundary })

export function sameFluid(one: Fluid, other: Fluid) {
  if (one.id !== other.id) {
    throw new Problem(
      'impossible',
      `the vessel holds ${one.name} and would get ${other.name}: gases are not mixed here`,
    )
  }
}

export function checkPath(path: Path | undefined): void {
  if (!path) return
  const positive = (value: number, words: string) => {
    if (!(value > 0 && Number.isFinite(value))) throw new Problem('range', `${words} must be more than nothing`)
  }
  switch (path.kind) {
    case 'orifice':
      positive(path.diameter_m, "the orifice's diameter")
      return positive(path.dischargeCoefficient, 'the discharge coefficient')
    case 'valve':
      positive(path.Kv_m3_h, "the valve's Kv")
      return positive(path.xT, 'xT')
    case 'sonic':
      positive(path.C_m3_sPa, 'the sonic conductance')
      positive(path.m, 'the subsonic index')
      if (!(path.b >= 0 && path.b < 1)) throw new Problem('range', 'the critical pressure ratio lies between 0 and 1')
      return
    case 'fixed_flow':
      return positive(path.rate_kg_s, 'the flow')
    case 'ramp':
      return positive(path.rate_Pa_s, 'the rate of a pressure ramp')
    case 'pump':
      positive(path.speed_m3_s, "the pump's speed")
      if (!(path.p_low_Pa >= 0)) throw new Problem('range', "the pump's lowest pressure must not be negative")
      return
    case 'series':
      if (path.paths.length === 0) throw new Problem('argument', 'paths in series: give one at least')
      path.paths.forEach(checkPath)
  }
}
