import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { Resistance } from './resistance'

/** N6 of IEC 60534-2-1:2011, table 1, for Kv, kg/h and kPa, here for kg/s and Pa. */
const N6 = 3.16 / 3600 / 1000 ** 0.5
/** Heat capacity ratio of the air with which xT is measured. */
const AIR_RATIO = 1.4

/**
 * A control valve: IEC 60534-2-1:2011, sizing of compressible fluids, without fittings (Fp = 1):
 * W = N6 Kv Y √(x p1 ρ1), Y = 1 - x / (3 Fγ xT), choked at x = Fγ xT where Y = 2/3. Density is that of the real gas upstream,
 * Fγ that of the ideal gas at the temperature upstream.
 */
export class Valve implements Resistance {
  readonly evaluations = 0

  constructor(
    private readonly fluid: Fluid,
    private readonly Kv_m3_h: number,
    private readonly xT: number,
  ) {}

  flow_kg_s(up: State, p_down_Pa: number) {
    if (up.phase === 'liquid' || up.phase === 'two-phase') {
      throw new Problem(
        'unsupported',
        `the valve's equation is for gas, and what reaches it is ${up.phase}: take an orifice`,
      )
    }
    const choking = (ratioOfIdealGas(this.fluid, up.T_K) / AIR_RATIO) * this.xT
    const x = Math.min(1 - p_down_Pa / up.p_Pa, choking)
    const expansion = 1 - x / (3 * choking)
    return N6 * this.Kv_m3_h * expansion * Math.sqrt(x * up.p_Pa * up.rho_kg_m3)
  }
}

/** cp/cv of the ideal gas at a temperature. */
export function ratioOfIdealGas(fluid: Fluid, T_K: number): number {
  const cp = fluid.idealCp_J_kgK(T_K)
  return cp / (cp - fluid.info.gasConstant_J_kgK)
}
