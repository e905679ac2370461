import { Problem } from '@/lib/errors'
import { createState } from './fluid'
import type { Fluid, FluidInfo, Pair, Saturation, State } from './fluid'
import { bar, kelvin } from './words'

/** CODATA 2018, exact. */
const R_J_molK = 8.31446261815324
const ZERO = { T_K: 298.15, p_Pa: 101_325 }
/** Where constant heat capacities lose all sense. */
const RANGE = { T_min_K: 1, T_max_K: 5000, p_max_Pa: 1e12 }

export type IdealGasOf =
  { readonly of: Fluid; readonly at_T_K: number } | { readonly k: number; readonly molarMass_kg_mol: number }

/**
 * An ideal gas with constant heat capacities, to check with: those of a fluid's ideal gas at a stated temperature, or
 * from a heat capacity ratio and a molar mass. u = cv T and h = cp T; s is zero at 298.15 K and 101 325 Pa.
 */
export function idealGas(made: IdealGasOf): Fluid {
  if ('of' in made) {
    const { of: fluid, at_T_K } = made
    const { T_min_K, T_max_K } = fluid.info
    if (!(at_T_K >= T_min_K && at_T_K <= T_max_K)) {
      throw new Problem(
        'range',
        `the heat capacity of ${fluid.name} is known from ${kelvin(T_min_K)} to ${kelvin(T_max_K)}: T is ${kelvin(at_T_K)}`,
      )
    }
    const cp = fluid.idealCp_J_kgK(at_T_K)
    const name = `ideal ${fluid.name}`
    return new IdealGas(`ideal ${fluid.id} ${at_T_K}`, name, cp, fluid.info.gasConstant_J_kgK, fluid.info, fluid)
  }
  const { k, molarMass_kg_mol } = made
  if (!(k > 1)) throw new Problem('range', `a heat capacity ratio is above 1: k is ${k}`)
  const R = R_J_molK / molarMass_kg_mol
  const info: FluidInfo = { ...RANGE, formula: '', molarMass_kg_mol, gasConstant_J_kgK: R, sources: [], otherNames: [] }
  return new IdealGas(`ideal ${k} ${molarMass_kg_mol}`, `ideal gas, k ${k}`, (k * R) / (k - 1), R, info, null)
}

class IdealGas implements Fluid {
  readonly info: FluidInfo

  constructor(
    readonly id: string,
    readonly name: string,
    private readonly cp: number,
    private readonly R: number,
    like: FluidInfo,
    /** Whose viscosity and conductivity stand in. */
    private readonly real: Fluid | null,
  ) {
    const { formula, cas, molarMass_kg_mol, sources, otherNames } = like
    this.info = {
      ...RANGE,
      formula,
      ...(cas !== undefined && { cas }),
      molarMass_kg_mol,
      gasConstant_J_kgK: R,
      sources,
      otherNames,
    }
  }

  state(pair: Pair, a: number, b: number, out: State = createState()): State {
    const { cp, R } = this
    const cv = cp - R
    switch (pair) {
      case 'pT':
        return this.fill(b, a / (R * b), out)
      case 'rhoT':
        return this.fill(b, a, out)
      case 'rhou':
        return this.fill(b / cv, a, out)
      case 'rhoh':
        return this.fill(b / cp, a, out)
      case 'rhop':
        return this.fill(b / (a * R), a, out)
      case 'ph':
        return this.fill(b / cp, (a * cp) / (R * b), out)
      case 'pu':
        return this.fill(b / cv, (a * cv) / (R * b), out)
      case 'ps': {
        const T = ZERO.T_K * Math.exp((b + R * Math.log(a / ZERO.p_Pa)) / cp)
        return this.fill(T, a / (R * T), out)
      }
      case 'Ts': {
        const p = ZERO.p_Pa * Math.exp((cp * Math.log(a / ZERO.T_K) - b) / R)
        return this.fill(a, p / (R * a), out)
      }
      case 'Tx':
      case 'px':
        throw this.noLiquid()
    }
  }

  saturationAtT(): Saturation {
    throw this.noLiquid()
  }

  saturationAtP(): Saturation {
    throw this.noLiquid()
  }

  viscosity_Pa_s(state: State): number {
    return this.transport().viscosity_Pa_s(state)
  }

  conductivity_W_mK(state: State): number {
    return this.transport().conductivity_W_mK(state)
  }

  idealCp_J_kgK(): number {
    return this.cp
  }

  private fill(T: number, rho: number, out: State): State {
    const { cp, R, name } = this
    const cv = cp - R
    if (!(T >= RANGE.T_min_K && T <= RANGE.T_max_K))
      throw new Problem('range', `no ${name} at ${kelvin(T)}: it is worked out from 1 to 5000 K`)
    const p = rho * R * T
    if (!(p > 0 && p <= RANGE.p_max_Pa))
      throw new Problem('range', `the absolute pressure of ${name} has to be above zero: p is ${bar(p)}`)
    out.T_K = T
    out.rho_kg_m3 = rho
    out.p_Pa = p
    out.u_J_kg = cv * T
    out.h_J_kg = cp * T
    out.s_J_kgK = cp * Math.log(T / ZERO.T_K) - R * Math.log(p / ZERO.p_Pa)
    out.cv_J_kgK = cv
    out.cp_J_kgK = cp
    out.w_m_s = Math.sqrt((cp / cv) * R * T)
    out.x = NaN
    out.dpdT_rho_Pa_K = rho * R
    out.dpdrho_T_Pa_m3_kg = R * T
    out.phase = 'gas'
    out.evaluations = 0
    return out
  }

  private transport(): Fluid {
    if (this.real) return this.real
    throw new Problem(
      'unsupported',
      `${this.name} is known by its heat capacities alone: it has no viscosity or conductivity`,
    )
  }

  private noLiquid(): Problem {
    return new Problem('state', `${this.name} has no liquid`)
  }
}
