import { FLUID_DATA } from './data'
import type { Fluid } from './fluid'
import { HelmholtzFluid } from './helmholtz-fluid'

/**
 * Properties of pure fluids from published equations of state. SI throughout, per kilogram; temperatures in K (ITS-90),
 * pressures absolute in Pa. A state that does not exist, or that no equation here describes, throws a Problem.
 */
export const FLUIDS: readonly Fluid[] = FLUID_DATA.map((data) => new HelmholtzFluid(data))

/** Changes with every figure in data/, so that a record can say which it was made with. */
export const FLUID_DATA_VERSION = '1'

const plain = (name: string) =>
  name
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, ' ')

const byName = new Map(FLUIDS.flatMap((fluid) => namesOf(fluid).map((name) => [plain(name), fluid] as const)))

/** A fluid by any of its names, whatever the case: nitrogen, "N2", "carbon dioxide", "steam". */
export function findFluid(name: string): Fluid | undefined {
  return byName.get(plain(name))
}

function namesOf(fluid: Fluid): readonly string[] {
  return [fluid.id, fluid.name, ...fluid.info.otherNames]
}

export {
  createState,
  PAIRS,
  type Fluid,
  type FluidInfo,
  type Pair,
  type Phase,
  type Saturation,
  type State,
} from './fluid'
export { idealGas, type IdealGasOf } from './ideal-gas'
export type { Source } from './equation-data'
