import type { Path } from '../paths/kinds'
import type { Draw, Heat, Run, Stops } from '../run'
import type { Supply } from '../supply'

export interface Numerics {
  /** Local error allowed in a step, relative; default 1e-6. */
  readonly rtol?: number
  /** A stop that is not reached by then is an error; default 30 days. */
  readonly horizon_s?: number
}

export interface ChargeRequest extends Numerics {
  readonly from: Run
  readonly supply: Supply
  /** Without a path a charge is the balance alone, with no time in it. */
  readonly through?: Path
  /** Default: until settled. */
  readonly stops?: Stops
  /** Default: by the vessel's coefficients with a path, adiabatic without. */
  readonly heat?: Heat
}

export interface VentRequest extends Numerics {
  readonly from: Run
  readonly through?: Path
  /** The pressure it goes to; default 101 325 Pa. */
  readonly back_Pa?: number
  /** Default: mixed. */
  readonly draw?: Draw
  readonly stops?: Stops
  readonly heat?: Heat
}

export interface HoldRequest extends Numerics {
  readonly from: Run
  /** Everything at this temperature, however long that takes. */
  readonly to_T_K?: number
  readonly stops?: Stops
}

export interface EqualiseRequest extends Numerics {
  readonly a: Run
  readonly b: Run
  readonly through?: Path
  /** `until_…` refer to a. */
  readonly stops?: Stops
  readonly heat?: Heat
}

export interface EvacuateRequest extends Numerics {
  readonly from: Run
  /** A pump, or an orifice to a vacuum … */
  readonly through: Path
  /** Default: until settled. */
  readonly stops?: Stops
  readonly heat?: Heat
}
