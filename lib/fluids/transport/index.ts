import type { Source } from '../equation-data'
import DATA from '../data/transport.json'
import { correlatedConductivity } from './conductivity'
import { generalConductivity, generalDiluteViscosity, generalViscosity } from './general-method'
import type { TransportData, TransportFluid, TransportState } from './types'
import { correlatedViscosity, diluteViscosity } from './viscosity'
import { WATER_CONDUCTIVITY, WATER_VISCOSITY, waterConductivity, waterViscosity } from './water'

/** How a transport property is worked out, and how far it is to be trusted. */
export interface TransportMethod {
  readonly source: Source
  readonly uncertainty: string
}

/** Viscosity and thermal conductivity of one fluid. */
export interface Transport {
  readonly viscosity_Pa_s: (state: TransportState) => number
  readonly conductivity_W_mK: (state: TransportState) => number
  readonly viscosityMethod: TransportMethod
  readonly conductivityMethod: TransportMethod
}

const GENERAL: TransportMethod = {
  source: {
    title: 'Generalized multiparameter correlation for nonpolar and polar fluid transport properties',
    authors: ['T.-H. Chung', 'M. Ajlan', 'L. L. Lee', 'K. E. Starling'],
    journal: 'Ind. Eng. Chem. Res.',
    year: 1988,
    volume: '27',
    pages: '671-679',
    doi: '10.1021/ie00076a024',
  },
  uncertainty: 'a general method: some 10 % in the gas, more in the liquid and for quantum gases',
}
const CORRELATED = 'a few per cent in the dense region, about 1 % in the dilute gas'
const WITHOUT_CRITICAL = 'a few per cent; without the rise close to the critical point'
const IAPWS = '1 to 3 % over most of the range'

export function transportOf(id: string, fluid: TransportFluid): Transport {
  if (id === 'water') {
    return {
      viscosity_Pa_s: (state) => waterViscosity(fluid, state),
      conductivity_W_mK: (state) => waterConductivity(fluid, state),
      viscosityMethod: { source: WATER_VISCOSITY, uncertainty: IAPWS },
      conductivityMethod: { source: WATER_CONDUCTIVITY, uncertainty: IAPWS },
    }
  }
  const { viscosity, conductivity } = (DATA as unknown as Readonly<Record<string, TransportData>>)[id] ?? {}
  const viscosity_Pa_s = viscosity
    ? (state: TransportState) => correlatedViscosity(viscosity, fluid, state)
    : (state: TransportState) => generalViscosity(fluid, state)
  const dilute_Pa_s = viscosity
    ? (T_K: number) => diluteViscosity(viscosity, T_K)
    : (T_K: number) => generalDiluteViscosity(fluid, T_K)
  return {
    viscosity_Pa_s,
    conductivity_W_mK: conductivity
      ? (state) =>
          correlatedConductivity(conductivity, fluid, state, {
            dilute_Pa_s: dilute_Pa_s(state.T_K),
            full_Pa_s: viscosity_Pa_s(state),
          })
      : (state) => generalConductivity(fluid, state),
    viscosityMethod: viscosity ? { source: viscosity.source, uncertainty: CORRELATED } : GENERAL,
    conductivityMethod: conductivity
      ? { source: conductivity.source, uncertainty: conductivity.critical ? CORRELATED : WITHOUT_CRITICAL }
      : GENERAL,
  }
}
