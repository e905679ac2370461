/**
 * What gas flows through. `check: false` lets it flow back; by default a charge, a vent and an evacuation
 * pass one way only, as through a check valve, and two vessels that equalise pass both ways.
 */
export type Path = PathKind & { readonly check?: boolean }

export type PathKind =
  /** Homogeneous isentropic flow of the real fluid from rest upstream, choked at the greatest mass flux. */
  | { readonly kind: 'orifice'; readonly diameter_m: number; readonly dischargeCoefficient: number }
  /** IEC 60534-2-1. Kv in m³/h; xT the pressure drop ratio at which it chokes. */
  | { readonly kind: 'valve'; readonly Kv_m3_h: number; readonly xT: number }
  /** ISO 6358: sonic conductance for air, m³/(s Pa), critical pressure ratio, subsonic index. */
  | { readonly kind: 'sonic'; readonly C_m3_sPa: number; readonly b: number; readonly m: number }
  | { readonly kind: 'fixed_flow'; readonly rate_kg_s: number }
  /** The vessel's pressure changes at this rate (its magnitude), as a controller holds it. */
  | { readonly kind: 'ramp'; readonly rate_Pa_s: number }
  /** Volume swept at the inlet, falling to nothing at the lowest pressure as 1 - p_low/p. */
  | { readonly kind: 'pump'; readonly speed_m3_s: number; readonly p_low_Pa: number }
  | { readonly kind: 'series'; readonly paths: readonly Path[] }

/** Kv of a valve whose Cv is given (IEC 60534-1: Cv = 1.156 Kv). */
export const KV_PER_CV = 1 / 1.156
