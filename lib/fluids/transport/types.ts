import type { Source } from '../equation-data'

type List = readonly number[]

/** Viscosity as the sum of its parts, Pa s. Units of the figures stand in their names; T in K. */
export interface ViscosityData {
  readonly source: Source
  readonly epsilonOverK_K?: number
  readonly sigma_m?: number
  readonly dilute:
    | {
        readonly type: 'collision_integral'
        readonly C: number
        readonly molar_mass_kg_per_mol: number
        readonly a: List
        readonly t: List
      }
    | { readonly type: 'powers'; readonly T_reducing: number; readonly a: List; readonly t: List }
    | {
        readonly type: 'root_over_powers'
        readonly T_reducing: number
        readonly C: number
        readonly a: List
        readonly t: List
      }
    | { readonly type: 'carbon_dioxide_2017'; readonly a: List; readonly factor: number }
  readonly initial_density?: { readonly type: 'rainwater_friend'; readonly b: List; readonly t: List }
  readonly residual: FreeVolume | FrictionTheory | Hydrogen2013 | CarbonDioxide2017
}

export interface FreeVolume {
  readonly type: 'free_volume'
  readonly T_reducing: number
  readonly rho_reducing_mol_per_m3: number
  readonly n: List
  readonly d: List
  readonly t: List
  readonly gamma: List
  readonly l: List
  readonly f: List
  readonly fd: List
  readonly ft: List
  readonly g: List
  readonly h: List
  readonly p: List
  readonly q: List
}

export interface FrictionTheory {
  readonly type: 'friction_theory'
  readonly T_reducing: number
  readonly c1: number
  readonly c2: number
  readonly Aa: List
  readonly Na: number
  readonly Ar: List
  readonly Nr: number
  readonly Ai: List
  readonly Aaa: List
  readonly Naa: number
  readonly Arr?: List
  readonly Adrdr?: List
  readonly Nrr: number
  readonly Aii?: List
  readonly Nii?: number
  readonly Arrr?: List
  readonly Nrrr?: number
  readonly Aaaa?: List
  readonly Naaa?: number
}

export interface Hydrogen2013 {
  readonly type: 'hydrogen_2013'
  readonly T_reducing: number
  readonly inverse_rho_reducing_m3_per_kg: number
  readonly c: List
}

export interface CarbonDioxide2017 {
  readonly type: 'carbon_dioxide_2017'
  readonly c1: number
  readonly c2: number
  readonly gamma: number
  readonly rho_triple_liquid_kg_per_m3: number
  readonly divisor: number
}

/** Thermal conductivity as the sum of its parts, W/(m K). */
export interface ConductivityData {
  readonly source: Source
  readonly dilute:
    | {
        readonly type: 'ratio_of_polynomials'
        readonly T_reducing: number
        readonly A: List
        readonly n: List
        readonly B: List
        readonly m: List
      }
    | { readonly type: 'viscosity_and_powers'; readonly A: List; readonly t: List }
    | { readonly type: 'carbon_dioxide_2016'; readonly l: List }
  readonly residual:
    | {
        readonly type: 'powers'
        readonly T_reducing: number
        readonly rho_reducing_kg_per_m3: number
        readonly n: List
        readonly d: List
        readonly t: List
      }
    | {
        readonly type: 'powers_exponential'
        readonly n: List
        readonly d: List
        readonly t: List
        readonly gamma: List
        readonly l: List
      }
  readonly critical?: CriticalEnhancement
}

/** The simplified crossover model of G. A. Olchowy and J. V. Sengers, Int. J. Thermophys. 10 (1989) 417. */
export interface CriticalEnhancement {
  readonly type: 'simplified_olchowy_sengers'
  readonly R0: number
  readonly gamma: number
  readonly nu: number
  readonly Gamma: number
  readonly zeta0_m: number
  readonly qD_per_m: number
  readonly T_ref_K?: number
  readonly p_reducing_Pa: number
}

export interface TransportData {
  readonly viscosity?: ViscosityData
  readonly conductivity?: ConductivityData
}

/** A state of one phase, as the correlations read it. */
export interface TransportState {
  readonly T_K: number
  readonly rho_kg_m3: number
  readonly p_Pa: number
  readonly cp_J_kgK: number
  readonly cv_J_kgK: number
  readonly dpdT_rho_Pa_K: number
  readonly dpdrho_T_Pa_m3_kg: number
}

/** What the correlations need to know of the fluid. */
export interface TransportFluid {
  readonly T_reducing_K: number
  readonly rho_reducing_kg_m3: number
  readonly molarMass_kg_mol: number
  readonly gasConstant_J_kgK: number
  readonly T_critical_K: number
  readonly rho_critical_kg_m3: number
  readonly T_triple_K: number
  readonly acentricFactor: number
  /** ∂p/∂ρ at constant temperature, Pa m³/kg, at another temperature. */
  readonly dpdrhoAt: (T_K: number, rho_kg_m3: number) => number
  readonly idealCp_J_kgK: (T_K: number) => number
}
