import { Problem } from '@/lib/errors'
import type { Fluid, State } from '@/lib/fluids'
import type { Arguments, FunctionSpec, Thing } from '@/lib/formula'
import { quantityType, thingType } from '../../types'
import { STATE_PARAMETERS, needsPair, pairOf } from './state-pair'

const GAS = { name: 'gas', type: thingType('gas'), help: 'a gas: nitrogen, carbon_dioxide, ideal(air) …' } as const
const EQUATIONS = 'the equation of state of the gas: its paper is named with the fluid'

export const fluidOf = (args: Arguments): Fluid => (args.gas as Thing).value as Fluid

interface Property {
  readonly name: string
  readonly quantity: string
  readonly help: string
  readonly of: (state: State, fluid: Fluid) => number
  readonly shown: string
  readonly example?: string
  readonly source?: string
}

const PROPERTIES: readonly Property[] = [
  { name: 'density', quantity: 'density', help: 'mass per volume', of: (s) => s.rho_kg_m3, shown: '' },
]

const STATE = 'nitrogen, p: 200 bar, T: 15 °C'

function propertyFunction({ name, quantity, help, of, shown, example, source }: Property): FunctionSpec {
  return {
    name,
    group: 'Properties',
    parameters: [GAS, ...STATE_PARAMETERS],
    result: quantityType(quantity),
    help,
    example: { formula: example ?? `${name}(${STATE})`, shown },
    source: source ?? EQUATIONS,
    together: needsPair,
    evaluate: (args) => {
      const fluid = fluidOf(args)
      const value = of(fluid.state(...pairOf(args)), fluid)
      // cp is unbounded and x has no meaning outside the dome: say so, rather than hand on a number that is none
      if (!Number.isFinite(value)) throw new Problem('state', `${fluid.name} has no ${help} in this state`)
      return value
    },
  }
}

export const propertyFunctions: readonly FunctionSpec[] = PROPERTIES.map(propertyFunction)
