import type { Fluid, Pair, State } from '@/lib/fluids'

/** Temperatures and pressures all over a fluid's range, more of them about its two-phase region; the same every time. */
export function* statesOf(fluid: Fluid, perSide: number): Generator<{ readonly T_K: number; readonly p_Pa: number }> {
  const { T_min_K, T_max_K, p_max_Pa, critical } = fluid.info
  const random = uniform(20_260)
  for (let i = 0; i < perSide; i++) {
    for (let j = 0; j < perSide; j++) {
      const wide = T_min_K + (T_max_K - T_min_K) * random() ** 2
      const near = T_min_K + (Math.min(T_max_K, 1.3 * critical!.T_K) - T_min_K) * random()
      const thin = p_max_Pa ** random()
      const T_K = i % 2 ? wide : near
      yield { T_K, p_Pa: j % 3 ? thin : critical!.p_Pa * (0.3 + 1.5 * random()) }
    }
  }
}

/** A linear congruential generator: random enough for places on a map, and the same on every machine. */
function uniform(seed: number): () => number {
  let at = seed
  return () => (at = (at * 1_103_515_245 + 12_345) % 2_147_483_648) / 2_147_483_648
}

/** A state told again by each pair of a single phase. */
export const toldBy = (state: State): readonly (readonly [Pair, number, number])[] => [
  ['rhoT', state.rho_kg_m3, state.T_K],
  ['rhou', state.rho_kg_m3, state.u_J_kg],
  ['rhoh', state.rho_kg_m3, state.h_J_kg],
  ['rhop', state.rho_kg_m3, state.p_Pa],
  ['ph', state.p_Pa, state.h_J_kg],
  ['ps', state.p_Pa, state.s_J_kgK],
  ['pu', state.p_Pa, state.u_J_kg],
  ['Ts', state.T_K, state.s_J_kgK],
]
