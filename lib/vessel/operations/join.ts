import type { Run, Trace } from '../run'

/** Two runs of a vessel, the second of which starts where the first ends, as one. */
export function join(first: Run, second: Run): Run {
  return {
    ...second,
    T_peak_K: Math.max(first.T_peak_K, second.T_peak_K),
    T_low_K: Math.min(first.T_low_K, second.T_low_K),
    p_peak_Pa: Math.max(first.p_peak_Pa, second.p_peak_Pa),
    p_low_Pa: Math.min(first.p_low_Pa, second.p_low_Pa),
    shell_peak_K: Math.max(first.shell_peak_K, second.shell_peak_K),
    shell_low_K: Math.min(first.shell_low_K, second.shell_low_K),
    flow_peak_kg_s: Math.max(first.flow_peak_kg_s, second.flow_peak_kg_s),
    moved_kg: first.moved_kg + second.moved_kg,
    heat_J: first.heat_J + second.heat_J,
    time_s: first.time_s === null || second.time_s === null ? null : first.time_s + second.time_s,
    balance: {
      energy: Math.max(first.balance.energy, second.balance.energy),
      mass: Math.max(first.balance.mass, second.balance.mass),
    },
    trace: first.trace && second.trace ? joinTraces(first.trace, second.trace) : (first.trace ?? second.trace),
    counts: {
      steps: first.counts.steps + second.counts.steps,
      rejected: first.counts.rejected + second.counts.rejected,
      rates: first.counts.rates + second.counts.rates,
      evaluations: first.counts.evaluations + second.counts.evaluations,
    },
  }
}

function joinTraces(first: Trace, second: Trace): Trace {
  const end = first.t_s[first.t_s.length - 1]
  const join = (key: keyof Trace) => [...first[key], ...second[key]]
  return {
    t_s: [...first.t_s, ...second.t_s.map((t) => end + t)],
    p_Pa: join('p_Pa'),
    T_K: join('T_K'),
    m_kg: join('m_kg'),
    flow_kg_s: join('flow_kg_s'),
    shellMean_K: join('shellMean_K'),
    shellInner_K: join('shellInner_K'),
    shellOuter_K: join('shellOuter_K'),
    otherP_Pa: join('otherP_Pa'),
    otherT_K: join('otherT_K'),
  }
}
