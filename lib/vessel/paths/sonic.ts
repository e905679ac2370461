import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { Resistance } from './resistance'
import { ratioOfIdealGas } from './valve'

/** Reference atmosphere of ISO 6358-1:2013 (ISO 8778): density of its air, and temperature. */
const RHO_ANR_kg_m3 = 1.185
const T_ANR_K = 293.15
/** Dry air: molar gas constant over molar mass (ISO 2533), and its heat capacity ratio. */
const R_AIR_J_kgK = 287.0529
const AIR_RATIO = 1.4

/**
 * A pneumatic component: ISO 6358-1:2013, ṁ = C ρ0 p1 √(T0/T1), and below choking times
 * (1 - ((p2/p1 - b)/(1 - b))²)^m. C is as measured with air; another gas flows as its choked flux compares with air's.
 */
export class Sonic implements Resistance {
  readonly evaluations = 0

  constructor(
    private readonly fluid: Fluid,
    private readonly C_m3_sPa: number,
    private readonly b: number,
    private readonly m: number,
  ) {}

  flow_kg_s(up: State, p_down_Pa: number) {
    if (up.phase === 'liquid' || up.phase === 'two-phase') {
      throw new Problem(
        'unsupported',
        `a sonic conductance is for gas, and what reaches it is ${up.phase}: take an orifice`,
      )
    }
    const gas = chokedFactor(ratioOfIdealGas(this.fluid, up.T_K)) / Math.sqrt(this.fluid.info.gasConstant_J_kgK)
    const air = chokedFactor(AIR_RATIO) / Math.sqrt(R_AIR_J_kgK)
    const choked = (gas / air) * this.C_m3_sPa * RHO_ANR_kg_m3 * up.p_Pa * Math.sqrt(T_ANR_K / up.T_K)
    const part = (p_down_Pa / up.p_Pa - this.b) / (1 - this.b)
    return part <= 0 ? choked : choked * Math.max(0, 1 - part * part) ** this.m
  }
}

/** Choked mass flux of a perfect gas in units of p/√(R T). */
const chokedFactor = (k: number) => Math.sqrt(k) * (2 / (k + 1)) ** ((k + 1) / (2 * (k - 1)))
