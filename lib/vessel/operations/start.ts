import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { Run } from '../run'
import { evenShell } from '../shell/temperatures'
import { wallOf } from '../shell/wall'
import type { Vessel } from '../vessel'

/** A pair of properties that fixes a state: its name and both values, in SI. */
export interface Given {
  readonly pair: Parameters<Fluid['state']>[0]
  readonly a: number
  readonly b: number
}

/**
 * A vessel as received, with contents or with nothing in it. The shell is at the temperature given for it, else at that of
 * the contents, or of the surroundings where there are none.
 */
export function start(vessel: Vessel, fluid: Fluid, contents: Given | 'evacuated', shellT_K?: number): Run {
  checkVessel(vessel)
  if (contents === 'evacuated') return empty(vessel, fluid, shellT_K ?? vessel.ambient_T_K)
  const state = fluid.state(contents.pair, contents.a, contents.b)
  return still(vessel, fluid, state, shellT_K ?? state.T_K)
}

function empty(vessel: Vessel, fluid: Fluid, T_K: number): Run {
  return {
    ...unmoved(vessel, fluid, 0, T_K, T_K),
    m_kg: 0,
    rho_kg_m3: 0,
    u_J_kg: NaN,
    h_J_kg: NaN,
    s_J_kgK: NaN,
    x: NaN,
    phase: 'vacuum',
    counts: { steps: 0, rejected: 0, rates: 0, evaluations: 0 },
  }
}

function still(vessel: Vessel, fluid: Fluid, state: State, shellT_K: number): Run {
  return {
    ...unmoved(vessel, fluid, state.p_Pa, state.T_K, shellT_K),
    m_kg: state.rho_kg_m3 * vessel.volume_m3,
    rho_kg_m3: state.rho_kg_m3,
    u_J_kg: state.u_J_kg,
    h_J_kg: state.h_J_kg,
    s_J_kgK: state.s_J_kgK,
    x: state.x,
    phase: state.phase,
    counts: { steps: 0, rejected: 0, rates: 0, evaluations: state.evaluations },
  }
}

function unmoved(vessel: Vessel, fluid: Fluid, p_Pa: number, T_K: number, shellT_K: number) {
  const shell = evenShell(wallOf(vessel.shell), shellT_K)
  return {
    operation: 'start',
    vessel,
    fluid,
    p_Pa,
    T_K,
    shell,
    T_peak_K: T_K,
    T_low_K: T_K,
    p_peak_Pa: p_Pa,
    p_low_Pa: p_Pa,
    shell_peak_K: shell.mean_K,
    shell_low_K: shell.mean_K,
    flow_peak_kg_s: 0,
    moved_kg: 0,
    heat_J: 0,
    time_s: 0,
    stoppedBy: 'start',
    balance: { energy: 0, mass: 0 },
    trace: null,
  } as const
}

function checkVessel(vessel: Vessel) {
  const positive = (value: number | undefined, words: string) => {
    if (value !== undefined && !(value > 0 && Number.isFinite(value)))
      throw new Problem('range', `${words} must be more than nothing`)
  }
  positive(vessel.volume_m3, "the vessel's volume")
  positive(vessel.ambient_T_K, 'the temperature around the vessel')
  const { shell } = vessel
  switch (shell.kind) {
    case 'none':
      return
    case 'lumped':
      positive(shell.mass_kg, "the shell's mass")
      positive(shell.area_m2, "the shell's area")
      positive(shell.outsideArea_m2, "the shell's outside area")
      return positiveCapacity(shell.heatCapacity)
    case 'layers':
      if (shell.layers.length === 0) throw new Problem('argument', 'a shell of layers needs one at least')
      positive(shell.area_m2, "the shell's area")
      positive(shell.innerDiameter_m, "the shell's inner diameter")
      for (const layer of shell.layers) {
        positive(layer.thickness_m, "a layer's thickness")
        positive(layer.conductivity_W_mK, "a layer's conductivity")
        positive(layer.density_kg_m3, "a layer's density")
        positiveCapacity(layer.heatCapacity)
      }
  }
  function positiveCapacity(c: number | object) {
    if (typeof c === 'number') positive(c, "the shell's heat capacity")
  }
}
