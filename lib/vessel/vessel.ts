import type { HeatCapacity } from './shell/heatCapacity'

/** How heat passes between the gas and the shell's inner face. */
export type Inside =
  | { readonly kind: 'fixed'; readonly coefficient_W_m2K: number }
  /** Free convection in a vessel of this inner height (or diameter, lying). */
  | { readonly kind: 'free'; readonly height_m: number }
  /** A jet through an inlet stirs the gas while it flows in; free convection otherwise. */
  | { readonly kind: 'jet'; readonly inletDiameter_m: number; readonly diameter_m: number }

/** How heat passes between the shell's outer face and what surrounds it. */
export type Outside =
  | { readonly kind: 'fixed'; readonly coefficient_W_m2K: number; readonly emissivity?: number }
  /** Fire: the outer face takes up this flux whatever its temperature. */
  | { readonly kind: 'absorbed'; readonly flux_W_m2: number }

export interface Layer {
  readonly thickness_m: number
  readonly conductivity_W_mK: number
  readonly density_kg_m3: number
  readonly heatCapacity: HeatCapacity
  /** Into how many cells the layer is cut; by default as its share of the wall needs. */
  readonly cells?: number
}

export type Shell =
  /** Adiabatic: the gas exchanges no heat. */
  | { readonly kind: 'none' }
  /** One temperature; one area, inside and out, unless an outside area is given. */
  | {
      readonly kind: 'lumped'
      readonly mass_kg: number
      readonly heatCapacity: HeatCapacity
      readonly area_m2: number
      readonly outsideArea_m2?: number
    }
  /** Conduction through layers, innermost first. With an inner diameter the wall is a cylinder's, else plane. */
  | {
      readonly kind: 'layers'
      readonly layers: readonly Layer[]
      readonly area_m2: number
      readonly innerDiameter_m?: number
    }

export interface Limits {
  readonly p_high_Pa?: number
  readonly shell_high_K?: number
  readonly shell_low_K?: number
}

/** A rigid vessel. What is in it, and how warm its shell is, is a run's. */
export interface Vessel {
  readonly volume_m3: number
  readonly shell: Shell
  /** Unused without a shell. */
  readonly inside?: Inside
  /** Default: the outer face is insulated. */
  readonly outside?: Outside
  /** Temperature around the vessel. */
  readonly ambient_T_K: number
  readonly limits?: Limits
}

/** So many equal vessels that act as one. */
export function together(vessel: Vessel, count: number): Vessel {
  const { shell } = vessel
  const volume_m3 = vessel.volume_m3 * count
  switch (shell.kind) {
    case 'none':
      return { ...vessel, volume_m3 }
    case 'lumped':
      return {
        ...vessel,
        volume_m3,
        shell: {
          ...shell,
          mass_kg: shell.mass_kg * count,
          area_m2: shell.area_m2 * count,
          ...(shell.outsideArea_m2 === undefined ? {} : { outsideArea_m2: shell.outsideArea_m2 * count }),
        },
      }
    case 'layers':
      return { ...vessel, volume_m3, shell: { ...shell, area_m2: shell.area_m2 * count } }
  }
}
