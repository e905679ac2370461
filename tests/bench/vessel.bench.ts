import { findFluid, type Fluid } from '@/lib/fluids'
import { charge, start, vent, type Inside, type Path, type Run, type Shell, type Vessel } from '@/lib/vessel'

/** A case of the bench: what is run, and how long it may take, warm. */
interface Case {
  readonly name: string
  readonly most_ms: number
  readonly run: () => Run
}

const fluid = (name: string): Fluid => findFluid(name)!
const nitrogen = fluid('nitrogen')
const carbonDioxide = fluid('carbon_dioxide')

const ORIFICE: Path = { kind: 'orifice', diameter_m: 2.5e-3, dischargeCoefficient: 0.84 }
const JET: Inside = { kind: 'jet', inletDiameter_m: 5e-3, diameter_m: 0.23 }
const LUMPED: Shell = { kind: 'lumped', mass_kg: 52, heatCapacity: 470, area_m2: 0.75 }
const LAYERS: Shell = {
  kind: 'layers',
  layers: [{ thickness_m: 0.009, conductivity_W_mK: 45, density_kg_m3: 7850, heatCapacity: 470, cells: 20 }],
  area_m2: 0.75,
}

const vessel = (shell: Shell, inside?: Inside): Vessel => ({
  volume_m3: 0.05,
  shell,
  ...(inside && { inside }),
  outside: { kind: 'fixed', coefficient_W_m2K: 6 },
  ambient_T_K: 291.15,
})

const supply = { kind: 'header', fluid: nitrogen, p_Pa: 300e5, T_K: 288.15 } as const
const low = (v: Vessel) => start(v, nitrogen, { pair: 'pT', a: 5e5, b: 291.15 })
const fill = (v: Vessel) => {
  const from = low(v)
  return () => charge({ from, supply, through: ORIFICE, stops: { until_p_Pa: 200e5 }, rtol: 1e-6 })
}
const letDown = (draw: 'vapour' | 'mixed') => {
  const from = start(vessel({ kind: 'none' }), carbonDioxide, { pair: 'Tx', a: 290, b: 0.1 })
  return () => vent({ from, through: ORIFICE, draw, stops: { until_p_Pa: 15e5 }, rtol: 1e-6 })
}

export const CASES: readonly Case[] = [
  { name: 'charge, nitrogen, orifice, adiabatic', most_ms: 1, run: fill(vessel({ kind: 'none' })) },
  { name: 'charge, lumped shell, jet-mixed', most_ms: 2, run: fill(vessel(LUMPED, JET)) },
  { name: 'charge, 20 cells of a wall, jet-mixed', most_ms: 6, run: fill(vessel(LAYERS, JET)) },
  { name: 'vent, carbon dioxide, two phases, vapour drawn', most_ms: 10, run: letDown('vapour') },
  { name: 'vent, carbon dioxide, two phases, mixed', most_ms: 10, run: letDown('mixed') },
]

const REPETITIONS = 9
const WARM_UP_ms = 400
const EACH_ms = 60

/** Median and spread of the time of a run, ms, over repetitions of many runs each. */
function time(run: () => Run): { median_ms: number; spread_ms: number } {
  const repeat = (for_ms: number) => {
    const from = performance.now()
    let count = 0
    while (performance.now() - from < for_ms) {
      run()
      count++
    }
    return (performance.now() - from) / count
  }
  repeat(WARM_UP_ms)
  const times = Array.from({ length: REPETITIONS }, () => repeat(EACH_ms)).sort((a, b) => a - b)
  return { median_ms: times[REPETITIONS >> 1], spread_ms: times[REPETITIONS - 1] - times[0] }
}

/** A line for each case: time against what it may take, steps, evaluations, and the cost of one. */
export function benchVessel(print: (line: string) => void): void {
  print('timed runs (relative tolerance 1e-6)'.padEnd(50) + '  median   spread     most   steps  evaluations   each')
  for (const { name, most_ms, run } of CASES) {
    const { counts } = run()
    const { median_ms, spread_ms } = time(run)
    const figures = [
      `${median_ms.toFixed(3)} ms`.padStart(9),
      `${spread_ms.toFixed(3)}`.padStart(8),
      `${most_ms} ms`.padStart(8),
      `${counts.steps}+${counts.rejected}`.padStart(7),
      `${counts.evaluations}`.padStart(12),
      `${((1e3 * median_ms) / counts.evaluations).toFixed(2)} µs`.padStart(9),
    ]
    print(name.padEnd(50) + figures.join(''))
  }
}
