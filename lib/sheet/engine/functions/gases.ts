import { Problem } from '@/lib/errors'
import { FLUIDS, idealGas } from '@/lib/fluids'
import type { Fluid } from '@/lib/fluids'
import type { FunctionSpec } from '@/lib/formula'
import { quantityType } from '../../types'
import { thing } from '../content'
import { GAS, constructor, fluidOf, numberOf, numberParameter, positive } from './arguments'

export const gasThing = (fluid: Fluid) => thing('gas', `fluid ${fluid.id}`, fluid.name, fluid)

/** Bare words for the fluids with an equation of state. */
export const GAS_WORDS: readonly { word: string; fluid: Fluid }[] = FLUIDS.map((fluid) => ({ word: fluid.id, fluid }))

const optional = { optional: true }

export const gasFunctions: readonly FunctionSpec[] = [
  {
    name: 'gas',
    group: 'Rig',
    parameters: [{ ...GAS, name: 'fluid' }],
    result: { kind: 'thing', thing: 'gas' },
    help: 'a gas for the rig, under a name of your own',
    example: { formula: 'gas("CO2")', shown: 'carbon dioxide' },
    evaluate: (args) => gasThing(fluidOf(args, 'fluid')),
  },
  constructor<Fluid>({
    name: 'ideal',
    group: 'Gases',
    makes: 'gas',
    parameters: [
      { ...GAS, optional: true },
      numberParameter('at', 'temperature', 'temperature at which the heat capacities of the gas are taken', {
        ...optional,
        default: '25 °C',
      }),
      numberParameter('k', 'dimensionless', 'heat capacity ratio, instead of a gas', optional),
      numberParameter('M', 'molar_mass', 'molar mass, with k', optional),
    ],
    together: (given) => {
      const named = given.includes('k') || given.includes('M')
      if (given.includes('gas') ? named : !(given.includes('k') && given.includes('M'))) {
        throw new Problem('argument', 'an ideal gas is made from a gas, or from k and M together')
      }
    },
    help: 'an ideal gas with constant heat capacities, to check with',
    example: { formula: 'ideal(air)', shown: 'ideal air' },
    make: (args) =>
      args.gas === undefined
        ? idealGas({
            k: positive(args, 'k', 'the heat capacity ratio'),
            molarMass_kg_mol: positive(args, 'M', 'the molar mass'),
          })
        : idealGas({ of: fluidOf(args), at_T_K: numberOf(args, 'at') }),
    shown: (fluid) => fluid.name,
  }),
]

interface Constant {
  readonly name: string
  readonly quantity: string
  readonly help: string
  readonly of: (fluid: Fluid) => number | undefined
  readonly example: { readonly formula: string; readonly shown: string }
}

const constant = ({ name, quantity, help, of, example }: Constant): FunctionSpec => ({
  name,
  group: 'Gases',
  parameters: [GAS],
  result: quantityType(quantity),
  help,
  example,
  evaluate: (args) => {
    const fluid = fluidOf(args)
    const value = of(fluid)
    if (value === undefined || !Number.isFinite(value)) throw new Problem('state', `${fluid.name} has no ${help}`)
    return value
  },
})

export const gasConstantFunctions: readonly FunctionSpec[] = [
  constant({
    name: 'molar_mass',
    quantity: 'molar_mass',
    help: 'molar mass',
    of: (fluid) => fluid.info.molarMass_kg_mol,
    example: { formula: 'molar_mass(nitrogen)', shown: '28.013 g/mol' },
  }),
  constant({
    name: 'critical_temperature',
    quantity: 'temperature',
    help: 'critical temperature',
    of: (fluid) => fluid.info.critical?.T_K,
    example: { formula: 'critical_temperature(carbon_dioxide)', shown: '30.978 °C' },
  }),
  constant({
    name: 'critical_pressure',
    quantity: 'pressure',
    help: 'critical pressure',
    of: (fluid) => fluid.info.critical?.p_Pa,
    example: { formula: 'critical_pressure(carbon_dioxide)', shown: '73.773 bar' },
  }),
]
