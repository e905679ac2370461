import { createState, findFluid, type Fluid, type Pair, type State } from '@/lib/fluids'

/** A case of the bench: one state of many, found again and again, and how long one may take, warm. */
interface Case {
  readonly name: string
  readonly most_us: number
  readonly calls: number
  readonly run: () => void
}

const CALLS = 5_000

/** States in gas and dense fluid, above the critical temperature. */
function statesOf(fluid: Fluid): readonly State[] {
  const { T_K, rho_kg_m3 } = fluid.info.critical!
  const T_highest = Math.min(2.3 * T_K, 0.98 * fluid.info.T_max_K)
  return Array.from({ length: 97 }, (_, i) => {
    const share = (i % 13) / 12
    return fluid.state('rhoT', rho_kg_m3 * (0.01 + i / 60), 1.05 * T_K + share * (T_highest - 1.05 * T_K))
  })
}

function caseOf(name: string, pair: Pair, pick: (state: State) => readonly [number, number], most_us: number): Case {
  const fluid = findFluid(name)!
  const given = statesOf(fluid).map(pick)
  const out = createState()
  return {
    name: `${fluid.name}, ${pair}`,
    most_us,
    calls: CALLS,
    run: () => {
      for (let i = 0; i < CALLS; i++) {
        const [a, b] = given[i % given.length]
        fluid.state(pair, a, b, out)
      }
    },
  }
}

function saturationOf(name: string, most_us: number): Case {
  const fluid = findFluid(name)!
  const { triple, critical } = fluid.info
  const out = createState()
  return {
    name: `${fluid.name}, Tx`,
    most_us,
    calls: CALLS,
    run: () => {
      for (let i = 0; i < CALLS; i++) {
        const share = 0.02 + (0.95 * (i % 101)) / 100
        fluid.state('Tx', triple!.T_K + share * (critical!.T_K - triple!.T_K), 0.4, out)
      }
    },
  }
}

const byRhoT = (state: State) => [state.rho_kg_m3, state.T_K] as const
const byPT = (state: State) => [state.p_Pa, state.T_K] as const
const byRhoU = (state: State) => [state.rho_kg_m3, state.u_J_kg] as const
const byPH = (state: State) => [state.p_Pa, state.h_J_kg] as const

export const CASES: readonly Case[] = [
  caseOf('nitrogen', 'rhoT', byRhoT, 1.6),
  caseOf('hydrogen', 'rhoT', byRhoT, 0.9),
  caseOf('water', 'rhoT', byRhoT, 2.8),
  caseOf('carbon_dioxide', 'rhoT', byRhoT, 2.8),
  caseOf('nitrogen', 'pT', byPT, 8),
  caseOf('nitrogen', 'rhou', byRhoU, 16),
  caseOf('nitrogen', 'ph', byPH, 24),
  caseOf('carbon_dioxide', 'ph', byPH, 32),
  saturationOf('carbon_dioxide', 16),
]
