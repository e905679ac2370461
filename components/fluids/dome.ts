import { Problem } from '@/lib/errors'
import type { Fluid } from '@/lib/fluids'

export interface DomePoint {
  readonly h_J_kg: number
  readonly p_Pa: number
}

/** The saturation curve over enthalpy and pressure: up the liquid side and down the vapour's. Null where the fluid has none here. */
export function domeOf(fluid: Fluid): readonly DomePoint[] | null {
  const { critical, triple } = fluid.info
  if (!critical || !triple) return null
  const liquid: DomePoint[] = []
  const vapour: DomePoint[] = []
  try {
    for (let i = 0; i <= POINTS; i++) {
      // closer together towards the critical point, where the curve bends
      const share = 1 - (1 - i / POINTS) ** 2
      const T_K = triple.T_K + (critical.T_K - triple.T_K) * Math.min(share, 0.99999)
      const at = fluid.saturationAtT(T_K)
      liquid.push({ h_J_kg: at.liquid.h_J_kg, p_Pa: at.p_Pa })
      vapour.push({ h_J_kg: at.vapour.h_J_kg, p_Pa: at.p_Pa })
    }
  } catch (mistake) {
    if (mistake instanceof Problem) return null
    throw mistake
  }
  return [...liquid, ...vapour.reverse()]
}

const POINTS = 60
