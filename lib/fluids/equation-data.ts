/** A fluid as its file in data/ holds it: published figures, molar, SI. */
export interface FluidData {
  readonly id: string
  readonly name: string
  readonly otherNames: readonly string[]
  readonly formula: string
  readonly cas: string
  readonly molarMass_kg_mol: number
  /** The value this equation was fitted with. */
  readonly gasConstant_J_molK: number
  /** As stated with the equation. */
  readonly critical: MolarPoint
  /** Where dp/dρ and d²p/dρ² of the equation itself are zero; a saturation curve ends here. Null for air. */
  readonly criticalOfEquation: MolarPoint | null
  readonly reducing: { readonly T_K: number; readonly rho_mol_m3: number }
  readonly triple: { readonly T_K: number; readonly p_Pa: number }
  /** To where the equation is ordinarily used, sensible extrapolation included. */
  readonly limits: { readonly T_min_K: number; readonly T_max_K: number; readonly p_max_Pa: number }
  /** What the source itself claims. */
  readonly claimedRange: {
    readonly T_min_K: number | null
    readonly T_max_K: number | null
    readonly p_max_Pa: number | null
  }
  readonly acentricFactor: number | null
  readonly sources: readonly Source[]
  readonly ideal: readonly IdealTerm[]
  readonly residual: readonly ResidualTerm[]
}

export interface MolarPoint {
  readonly T_K: number
  readonly p_Pa: number
  readonly rho_mol_m3: number
}

export interface Source {
  readonly title: string
  readonly authors?: readonly string[]
  readonly journal?: string
  readonly year?: number
  readonly volume?: string
  readonly pages?: string
  readonly doi?: string
}

type List = readonly number[]

/** Contributions to the ideal part; arrays with the same index belong together and are summed. */
export type IdealTerm =
  | { readonly type: 'lead'; readonly a1: number; readonly a2: number }
  | { readonly type: 'log'; readonly a: number }
  | { readonly type: 'power'; readonly n: List; readonly t: List }
  | { readonly type: 'planck_einstein'; readonly n: List; readonly theta: List }
  | {
      readonly type: 'planck_einstein_general'
      readonly n: List
      readonly theta: List
      readonly c: List
      readonly d: List
    }

/** Contributions to the residual part. */
export type ResidualTerm =
  | { readonly type: 'power'; readonly n: List; readonly d: List; readonly t: List; readonly l: List }
  | GaussianTerm
  | (Omit<GaussianTerm, 'type'> & { readonly type: 'gao_b'; readonly b: List })
  | {
      readonly type: 'nonanalytic'
      readonly n: List
      readonly a: List
      readonly b: List
      readonly beta: List
      readonly A: List
      readonly B: List
      readonly C: List
      readonly D: List
    }

interface GaussianTerm {
  readonly type: 'gaussian'
  readonly n: List
  readonly d: List
  readonly t: List
  readonly eta: List
  readonly beta: List
  readonly gamma: List
  readonly epsilon: List
}
