import type { Fluid, State } from '@/lib/fluids'
import type { Inside } from '../vessel'
import type { FaceHeat } from './outside'

/** Standard gravity (ISO 80000-3), m/s². */
const G = 9.80665

/** The gas film on the inner face: its coefficient at the state and the inflow it was last given. */
export interface Film {
  /** `gas` is a single-phase state: in two phases that of the vapour. Transport properties are worked out here. */
  setGas(gas: State): void
  setInflow(inflow_kg_s: number): void
  /** W/(m² K) at a difference between gas and face of ±difference_K. */
  coefficient(difference_K: number): number
}

export function film(inside: Inside, fluid: Fluid): Film {
  switch (inside.kind) {
    case 'fixed':
      return { setGas: () => undefined, setInflow: () => undefined, coefficient: () => inside.coefficient_W_m2K }
    case 'free':
      return new FreeConvection(fluid, inside.height_m)
    case 'jet':
      return new JetMixed(fluid, inside.inletDiameter_m, inside.diameter_m)
  }
}

/** Rayleigh number of a difference of 1 K over a length of 1 m, from the bulk state: g β ρ² cp / (μ λ). */
function unitRayleigh(gas: State, viscosity: number, conductivity: number) {
  const expansion = gas.dpdT_rho_Pa_K / (gas.rho_kg_m3 * gas.dpdrho_T_Pa_m3_kg)
  return (G * expansion * gas.rho_kg_m3 ** 2 * gas.cp_J_kgK) / (viscosity * conductivity)
}

/**
 * Free convection on a vertical face, laminar and turbulent in one:
 * S. W. Churchill, H. H. S. Chu, Int. J. Heat Mass Transfer 18 (1975) 1323-1329, doi:10.1016/0017-9310(75)90243-4,
 * eq. for all Ra up to 1e12. Properties are those of the bulk.
 */
class FreeConvection implements Film {
  private rayleigh = 0
  private prandtlPart = 0
  private conductance = 0

  constructor(
    private readonly fluid: Fluid,
    private readonly height_m: number,
  ) {}

  setInflow() {}

  setGas(gas: State) {
    const viscosity = this.fluid.viscosity_Pa_s(gas)
    const conductivity = this.fluid.conductivity_W_mK(gas)
    const prandtl = (viscosity * gas.cp_J_kgK) / conductivity
    this.prandtlPart = 0.387 / (1 + (0.492 / prandtl) ** (9 / 16)) ** (8 / 27)
    this.rayleigh = Math.abs(unitRayleigh(gas, viscosity, conductivity)) * this.height_m ** 3
    this.conductance = conductivity / this.height_m
  }

  coefficient(difference_K: number) {
    const nusselt = (0.825 + this.prandtlPart * (this.rayleigh * Math.abs(difference_K)) ** (1 / 6)) ** 2
    return nusselt * this.conductance
  }
}

/**
 * A jet stirring the gas of a vessel of inner diameter D through an inlet of diameter d:
 * Nu_D = 0.56 Re_d^0.67 + 0.104 Ra_D^0.352, the first part while gas flows in.
 * P. L. Woodfield, M. Monde, Y. Mitsutake, J. Therm. Sci. Technol. 2 (2007) 180-191, doi:10.1299/jtst.2.180: measured
 * with hydrogen, nitrogen and argon while filling small vessels through short inlets. Properties are those of the bulk.
 */
class JetMixed implements Film {
  /** At an inflow of 1 kg/s. */
  private forcedOfOne = 0
  private forced = 0
  private free = 0

  constructor(
    private readonly fluid: Fluid,
    private readonly inlet_m: number,
    private readonly diameter_m: number,
  ) {}

  setGas(gas: State) {
    const viscosity = this.fluid.viscosity_Pa_s(gas)
    const conductivity = this.fluid.conductivity_W_mK(gas)
    const conductance = conductivity / this.diameter_m
    const reynoldsOfOne = 4 / (Math.PI * this.inlet_m * viscosity)
    const rayleigh = Math.abs(unitRayleigh(gas, viscosity, conductivity)) * this.diameter_m ** 3
    this.forcedOfOne = conductance * 0.56 * reynoldsOfOne ** 0.67
    this.free = conductance * 0.104 * rayleigh ** 0.352
  }

  setInflow(inflow_kg_s: number) {
    this.forced = inflow_kg_s > 0 ? this.forcedOfOne * inflow_kg_s ** 0.67 : 0
  }

  coefficient(difference_K: number) {
    return this.forced + this.free * Math.abs(difference_K) ** 0.352
  }
}

/**
 * Heat from the shell's innermost cell (at `cell_K`, half a cell of `resistance_K_W` under the face) to the gas.
 */
export function heatIn(
  film: Film,
  area_m2: number,
  gas_K: number,
  cell_K: number,
  resistance_K_W: number,
  out: FaceHeat,
): void {
  const whole = cell_K - gas_K
  let difference = whole
  let h = film.coefficient(difference)
  if (resistance_K_W > 0) {
    const ratio = resistance_K_W * area_m2
    for (let count = 0; count < 40; count++) {
      // h goes at most as the cube root of the difference or so: this slope is near enough for a fast approach.
      const step = (whole - difference * (1 + ratio * h)) / (1 + 1.3 * ratio * h)
      difference += step
      h = film.coefficient(difference)
      if (Math.abs(step) <= 1e-13 * gas_K) break
    }
  }
  out.heat_W = area_m2 * h * difference
  out.face_K = gas_K + difference
}
