import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { FunctionSpec } from '@/lib/formula'
import { quantityType } from '../../types'
import { GAS, fluidOf, numberOf, numberParameter } from './arguments'
import { STATE_PARAMETERS, needsPair, pairOf } from './state-pair'

const EQUATION_OF_STATE = 'the equation of state of the gas; its paper is named with the gas'
const CORRELATION = 'the correlation for the gas; its paper is named with the gas'

interface Property {
  readonly name: string
  readonly quantity: string
  readonly help: string
  readonly of: (state: State, fluid: Fluid) => number
  readonly example: { readonly formula: string; readonly shown: string }
  readonly source?: string
}

const at = (name: string, shown: string) => ({ formula: `${name}(nitrogen, p: 200 bar, T: 15 °C)`, shown })

const PROPERTIES: readonly Property[] = [
  {
    name: 'density',
    quantity: 'density',
    help: 'density',
    of: (s) => s.rho_kg_m3,
    example: at('density', '223.19 kg/m³'),
  },
  {
    name: 'specific_volume',
    quantity: 'specific_volume',
    help: 'specific volume',
    of: (s) => 1 / s.rho_kg_m3,
    example: at('specific_volume', '0.0044805 m³/kg'),
  },
  {
    name: 'pressure',
    quantity: 'pressure',
    help: 'pressure',
    of: (s) => s.p_Pa,
    example: { formula: 'pressure(nitrogen, rho: 220 [kg/m^3], T: 15 °C)', shown: '196.69 bar' },
  },
  {
    name: 'temperature',
    quantity: 'temperature',
    help: 'temperature',
    of: (s) => s.T_K,
    example: { formula: 'temperature(water, p: 1 MPa, u: enthalpy(water, p: 1 MPa, T: 300 °C))', shown: '456.45 °C' },
  },
  {
    name: 'enthalpy',
    quantity: 'specific_energy',
    help: 'specific enthalpy',
    of: (s) => s.h_J_kg,
    example: at('enthalpy', '263.52 kJ/kg'),
  },
  {
    name: 'internal_energy',
    quantity: 'specific_energy',
    help: 'specific internal energy',
    of: (s) => s.u_J_kg,
    example: at('internal_energy', '173.91 kJ/kg'),
  },
  {
    name: 'entropy',
    quantity: 'specific_entropy',
    help: 'specific entropy',
    of: (s) => s.s_J_kgK,
    example: at('entropy', '5.11 kJ/(kg K)'),
  },
  {
    name: 'cp',
    quantity: 'specific_entropy',
    help: 'specific heat capacity at constant pressure',
    of: (s) => s.cp_J_kgK,
    example: at('cp', '1.3304 kJ/(kg K)'),
  },
  {
    name: 'cv',
    quantity: 'specific_entropy',
    help: 'specific heat capacity at constant volume',
    of: (s) => s.cv_J_kgK,
    example: at('cv', '0.78427 kJ/(kg K)'),
  },
  {
    name: 'heat_capacity_ratio',
    quantity: 'dimensionless',
    help: 'heat capacity ratio cp/cv',
    of: (s) => s.cp_J_kgK / s.cv_J_kgK,
    example: at('heat_capacity_ratio', '1.6964'),
  },
  {
    name: 'speed_of_sound',
    quantity: 'velocity',
    help: 'speed of sound',
    of: (s) => s.w_m_s,
    example: at('speed_of_sound', '420.55 m/s'),
  },
  {
    name: 'compressibility_factor',
    quantity: 'dimensionless',
    help: 'compressibility factor p/(ρRT)',
    of: (s, fluid) => s.p_Pa / (s.rho_kg_m3 * fluid.info.gasConstant_J_kgK * s.T_K),
    example: at('compressibility_factor', '1.0478'),
  },
  {
    name: 'quality',
    quantity: 'fraction',
    help: 'quality: the mass fraction of vapour',
    of: (s) => s.x,
    example: { formula: 'quality(water, T: 260 °C, rho: 30 [kg/m^3])', shown: '0.78385' },
  },
  {
    name: 'viscosity',
    quantity: 'dynamic_viscosity',
    help: 'dynamic viscosity',
    of: (s, fluid) => fluid.viscosity_Pa_s(s),
    example: at('viscosity', '23.049 µPa s'),
    source: CORRELATION,
  },
  {
    name: 'thermal_conductivity',
    quantity: 'thermal_conductivity',
    help: 'thermal conductivity',
    of: (s, fluid) => fluid.conductivity_W_mK(s),
    example: at('thermal_conductivity', '0.037383 W/(m K)'),
    source: CORRELATION,
  },
]

function propertyFunction({ name, quantity, help, of, example, source = EQUATION_OF_STATE }: Property): FunctionSpec {
  return {
    name,
    group: 'Properties',
    parameters: [GAS, ...STATE_PARAMETERS],
    result: quantityType(quantity),
    help,
    example,
    source,
    together: needsPair,
    evaluate: (args) => {
      const fluid = fluidOf(args)
      const value = of(fluid.state(...pairOf(args)), fluid)
      // cp is unbounded in two phases, and a quality has no meaning in one: say so, rather than hand on a number that is none
      if (!Number.isFinite(value)) throw new Problem('state', `${fluid.name} has no ${help} in this state`)
      return value
    },
  }
}

const saturation: readonly FunctionSpec[] = [
  {
    name: 'saturation_pressure',
    group: 'Properties',
    parameters: [GAS, numberParameter('T', 'temperature', 'temperature')],
    result: quantityType('pressure'),
    help: 'pressure at which liquid and vapour stand in equilibrium',
    example: { formula: 'saturation_pressure(water, T: 100 °C)', shown: '1.0142 bar' },
    source: EQUATION_OF_STATE,
    evaluate: (args) => fluidOf(args).saturationAtT(numberOf(args, 'T')).p_Pa,
  },
  {
    name: 'saturation_temperature',
    group: 'Properties',
    parameters: [GAS, numberParameter('p', 'pressure', 'absolute pressure')],
    result: quantityType('temperature'),
    help: 'temperature at which liquid and vapour stand in equilibrium',
    example: { formula: 'saturation_temperature(water, p: 1 MPa)', shown: '179.88 °C' },
    source: EQUATION_OF_STATE,
    evaluate: (args) => fluidOf(args).saturationAtP(numberOf(args, 'p')).T_K,
  },
]

export const propertyFunctions: readonly FunctionSpec[] = [...PROPERTIES.map(propertyFunction), ...saturation]
