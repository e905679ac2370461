import type { Outside } from '../vessel'

/** CODATA 2018 (exact since the revision of the SI), W/(m² K⁴). */
const STEFAN_BOLTZMANN = 5.670374419e-8

export interface FaceHeat {
  /** Out of the shell, W. */
  heat_W: number
  face_K: number
}

/**
 * Heat from a shell's outermost cell (at `cell_K`, half a cell of `resistance_K_W` under the face) to what surrounds it.
 * Convection to the surroundings, with grey-body radiation to them where an emissivity is given; or an absorbed flux.
 */
export function heatOut(
  outside: Outside | undefined,
  area_m2: number,
  cell_K: number,
  resistance_K_W: number,
  ambient_K: number,
  out: FaceHeat,
): void {
  if (!outside) {
    out.heat_W = 0
    out.face_K = cell_K
    return
  }
  if (outside.kind === 'absorbed') {
    out.heat_W = -outside.flux_W_m2 * area_m2
    out.face_K = cell_K - out.heat_W * resistance_K_W
    return
  }
  const h = outside.coefficient_W_m2K
  const radiant = (outside.emissivity ?? 0) * STEFAN_BOLTZMANN
  const ambient4 = ambient_K ** 4
  // The face is where conduction through the half cell meets what leaves; without radiation Newton is there in one step.
  let face = cell_K
  for (let count = 0; count < 20; count++) {
    const leaving = area_m2 * (h * (face - ambient_K) + radiant * (face ** 4 - ambient4))
    const slope = area_m2 * (h + 4 * radiant * face ** 3)
    const step = (cell_K - face - resistance_K_W * leaving) / (1 + resistance_K_W * slope)
    face += step
    if (Math.abs(step) < 1e-12 * face) break
  }
  out.face_K = face
  out.heat_W = area_m2 * (h * (face - ambient_K) + radiant * (face ** 4 - ambient4))
}
