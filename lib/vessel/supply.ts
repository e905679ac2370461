import type { Fluid } from '@/lib/fluids'
import type { Run } from './run'

/** What a vessel is charged from. */
export type Supply =
  /** Steady pressure and temperature, whatever is drawn. */
  | { readonly kind: 'header'; readonly fluid: Fluid; readonly p_Pa: number; readonly T_K: number }
  /** The air around. */
  | { readonly kind: 'room_air'; readonly fluid: Fluid; readonly p_Pa: number; readonly T_K: number }
  /** `count` vessels, each as the run says; runs down as it is drawn from. */
  | { readonly kind: 'bank'; readonly count: number; readonly contents: Run }
  /** A compressor: a steady flow, delivered at a temperature, up to a highest pressure. */
  | {
      readonly kind: 'machine'
      readonly fluid: Fluid
      readonly rate_kg_s: number
      readonly T_K: number
      readonly p_high_Pa: number
    }
