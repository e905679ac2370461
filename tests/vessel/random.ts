import fc from 'fast-check'
import type { Fluid } from '@/lib/fluids'
import {
  start,
  type Inside,
  type Outside,
  type Path,
  type Run,
  type Shell,
  type Supply,
  type Vessel,
} from '@/lib/vessel'
import { fluid } from './vessels'

/** Plausible things of every kind, for property tests. */

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const logBetween = (min: number, max: number) => between(Math.log(min), Math.log(max)).map(Math.exp)

/** Gases as they are kept in vessels, with a range of pressure that they have as gas around 20 °C. */
export const GASES: readonly { name: string; most_Pa: number }[] = [
  { name: 'nitrogen', most_Pa: 350e5 },
  { name: 'hydrogen', most_Pa: 800e5 },
  { name: 'helium', most_Pa: 400e5 },
  { name: 'argon', most_Pa: 300e5 },
  { name: 'oxygen', most_Pa: 250e5 },
  { name: 'methane', most_Pa: 250e5 },
  { name: 'air', most_Pa: 300e5 },
  { name: 'carbon_dioxide', most_Pa: 40e5 },
  { name: 'propane', most_Pa: 5e5 },
  { name: 'ammonia', most_Pa: 5e5 },
]

const gas = fc.constantFrom(...GASES)

const orifice: fc.Arbitrary<Path> = fc.record({
  kind: fc.constant('orifice' as const),
  diameter_m: logBetween(0.3e-3, 8e-3),
  dischargeCoefficient: between(0.6, 1),
})
const valve: fc.Arbitrary<Path> = fc.record({
  kind: fc.constant('valve' as const),
  Kv_m3_h: logBetween(0.01, 3),
  xT: between(0.4, 0.8),
})
const sonic: fc.Arbitrary<Path> = fc.record({
  kind: fc.constant('sonic' as const),
  C_m3_sPa: logBetween(1e-10, 5e-8),
  b: between(0.1, 0.5),
  m: fc.constantFrom(0.5, 0.5, 0.55),
})
const fixed: fc.Arbitrary<Path> = fc.record({
  kind: fc.constant('fixed_flow' as const),
  rate_kg_s: logBetween(1e-4, 0.2),
})
const ramp: fc.Arbitrary<Path> = fc.record({ kind: fc.constant('ramp' as const), rate_Pa_s: logBetween(1e3, 1e6) })
const series: fc.Arbitrary<Path> = fc.record({
  kind: fc.constant('series' as const),
  paths: fc.oneof(
    fc.tuple(orifice, sonic),
    fc.tuple(valve, orifice),
    fc.tuple(orifice, orifice),
    fc.tuple(fixed, valve),
  ),
})

/** Any path; for what may be liquid or two phases only orifices and given flows. */
export const anyPath: fc.Arbitrary<Path> = fc.oneof(orifice, valve, sonic, fixed, ramp, series)
export const wetPath: fc.Arbitrary<Path> = fc.oneof(orifice, fixed)

const inside: fc.Arbitrary<Inside> = fc.oneof(
  fc.record({ kind: fc.constant('fixed' as const), coefficient_W_m2K: logBetween(5, 500) }),
  fc.record({ kind: fc.constant('free' as const), height_m: between(0.2, 2) }),
  fc.record({
    kind: fc.constant('jet' as const),
    inletDiameter_m: between(2e-3, 10e-3),
    diameter_m: between(0.15, 0.5),
  }),
)
const outside: fc.Arbitrary<Outside | undefined> = fc.oneof(
  fc.constant(undefined),
  fc.record({ kind: fc.constant('fixed' as const), coefficient_W_m2K: between(3, 30) }),
  fc.record({ kind: fc.constant('fixed' as const), coefficient_W_m2K: between(3, 30), emissivity: between(0, 1) }),
  fc.record({ kind: fc.constant('absorbed' as const), flux_W_m2: between(0, 2e3) }),
)
const heatCapacity = between(400, 1500)
const shell: fc.Arbitrary<Shell> = fc.oneof(
  fc.constant({ kind: 'none' as const }),
  fc.record({
    kind: fc.constant('lumped' as const),
    mass_kg: between(5, 120),
    heatCapacity,
    area_m2: between(0.3, 2),
  }),
  fc.record({
    kind: fc.constant('layers' as const),
    layers: fc.array(
      fc.record({
        thickness_m: between(1e-3, 20e-3),
        conductivity_W_mK: logBetween(0.2, 200),
        density_kg_m3: between(900, 8000),
        heatCapacity,
        cells: fc.integer({ min: 1, max: 8 }),
      }),
      { minLength: 1, maxLength: 3 },
    ),
    area_m2: between(0.3, 2),
    innerDiameter_m: fc.option(between(0.1, 0.6), { nil: undefined }),
  }),
)

export const anyVessel: fc.Arbitrary<Vessel> = fc.record({
  volume_m3: logBetween(1e-3, 2),
  shell,
  inside,
  outside,
  ambient_T_K: between(263, 318),
})

/** A vessel at a low and at a high pressure, a supply above both, and a path: as data, so that a failure can be read. */
export const gasScene = fc.record({
  gas,
  vessel: anyVessel,
  lowPart: logBetween(1e-3, 0.1),
  highPart: between(0.2, 0.6),
  supplyPart: between(0.65, 1),
  T_K: between(268, 323),
  supplyT_K: between(268, 323),
  count: fc.integer({ min: 1, max: 6 }),
  isBank: fc.boolean(),
  path: anyPath,
})

export interface Scene {
  readonly medium: Fluid
  readonly low: Run
  readonly high: Run
  readonly supply: Supply
}

export function built(scene: typeof gasScene extends fc.Arbitrary<infer Data> ? Data : never): Scene {
  const medium = fluid(scene.gas.name)
  const at = (part: number, T_K: number) =>
    start(scene.vessel, medium, { pair: 'pT', a: part * scene.gas.most_Pa, b: T_K })
  return {
    medium,
    low: at(scene.lowPart, scene.T_K),
    high: at(scene.highPart, scene.T_K),
    supply: scene.isBank
      ? { kind: 'bank', count: scene.count, contents: at(scene.supplyPart, scene.supplyT_K) }
      : { kind: 'header', fluid: medium, p_Pa: scene.supplyPart * scene.gas.most_Pa, T_K: scene.supplyT_K },
  }
}

const soak = Number(process.env.SOAK ?? 1)
/** How many random cases: SOAK multiplies. */
export const cases = (few: number) => Math.round(few * soak)
/** For a test of so many cases. */
export const PATIENCE_ms = 60_000 * Math.max(1, soak)
