/**
 * Bubble and dew pressure of air, from the paper of its equation of state (E. W. Lemmon, R. T Jacobsen, S. G. Penoncello,
 * D. G. Friend, J. Phys. Chem. Ref. Data 29 (2000) 331). Between the two air is in two phases, which the equation does not
 * describe.
 */
const BUBBLE = { n: [0.2260724, -7.080499, 5.700283, -12.44017, 17.81926, -10.81364], t: [0.5, 1, 1.5, 2, 2.5, 3] }
const DEW = { n: [-0.1567266, -5.539635, 0.7567212, -3.514322], t: [0.5, 1, 2.5, 4] }

/** Highest temperature and pressure of the two-phase region. */
const TOP = { T_K: 132.6312, p_Pa: 3_785_020 }

function pressure_Pa({ n, t }: typeof BUBBLE, T_K: number): number {
  const off = 1 - T_K / TOP.T_K
  const sum = n.reduce((so, coefficient, i) => so + coefficient * off ** t[i], 0)
  return TOP.p_Pa * Math.exp((TOP.T_K / T_K) * sum)
}

export const airBoundary = {
  T_K: TOP.T_K,
  p_Pa: TOP.p_Pa,
  bubble_Pa: (T_K: number) => pressure_Pa(BUBBLE, T_K),
  dew_Pa: (T_K: number) => pressure_Pa(DEW, T_K),
}
