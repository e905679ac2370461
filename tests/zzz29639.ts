import { FLUIDS, createState } from '@/lib/fluids'
// saturation: counts, two-phase flashes, residual of equal g and p
for (const f of FLUIDS) {
  if (f.id === 'air') continue
  const { triple, critical } = f.info
  let maxSat = 0, worstG = 0, worstP = 0, maxFl = 0, bad = 0, n = 0, worst = 0; const ex: string[] = [], evs: string[] = []
  for (let i = 0; i <= 60; i++) {
    const T = triple!.T_K + (critical!.T_K * 0.9999 - triple!.T_K) * (i / 60)
    const s = f.saturationAtT(T)
    const gl = s.liquid.h_J_kg - T * s.liquid.s_J_kgK, gv = s.vapour.h_J_kg - T * s.vapour.s_J_kgK
    worstG = Math.max(worstG, Math.abs(gl - gv) / (f.info.gasConstant_J_kgK * T))
    const back = f.saturationAtP(s.p_Pa); worstP = Math.max(worstP, Math.abs(back.T_K / T - 1))
    for (const x of [0, 1e-6, 0.02, 0.3, 0.5, 0.9, 0.9999, 1]) {
      const m = f.state("Tx", T, x); maxSat = Math.max(maxSat, m.evaluations); if (x === 0.3 && m.evaluations > 2) evs.push((T / critical!.T_K).toFixed(4) + ":" + m.evaluations)
      const q = f.state('px', s.p_Pa, x); maxSat = Math.max(maxSat, q.evaluations)
      for (const [pair, a, b] of [['rhou', m.rho_kg_m3, m.u_J_kg], ['rhoh', m.rho_kg_m3, m.h_J_kg], ['rhop', m.rho_kg_m3, m.p_Pa], ['ph', m.p_Pa, m.h_J_kg], ['ps', m.p_Pa, m.s_J_kgK], ['pu', m.p_Pa, m.u_J_kg], ['Ts', T, m.s_J_kgK], ['rhoT', m.rho_kg_m3, T]] as const) {
        n++
        try { const o = f.state(pair, a, b); maxFl = Math.max(maxFl, o.evaluations)
          const e = Math.max(Math.abs(o.T_K / T - 1), Math.abs(o.rho_kg_m3 / m.rho_kg_m3 - 1)); worst = Math.max(worst, e)
          if (!(e < 1e-7)) { bad++; if (ex.length < 3) ex.push(`${pair} T ${T} x ${x} -> ${o.T_K} ${o.x} ${o.rho_kg_m3} vs ${m.rho_kg_m3}`) }
        } catch (err) { bad++; if (ex.length < 3) ex.push(`${pair} T ${T} x ${x}: ${(err as Error).message}`) }
      }
    }
  }
  console.log(f.id.padEnd(20), evs.join(" "), 'sat ev', maxSat, 'g', worstG.toExponential(1), 'T(p)', worstP.toExponential(1), 'flash ev', maxFl, 'n', n, 'bad', bad, 'worst', worst.toExponential(1)); for (const x of ex) console.log('     ', x)
}
