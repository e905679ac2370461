import { Problem } from '@/lib/errors'
import { findFluid } from '@/lib/fluids'
import type { Fluid } from '@/lib/fluids'
import { isThing } from '@/lib/formula'
import type { Arguments, FunctionSpec, Parameter, Thing, ThingKind, Type } from '@/lib/formula'
import { TEXT, quantityType, thingType } from '../../types'
import { contentKey, thing } from '../content'

/*
 * Short words for the rows of the function table: parameters, and reading arguments that the table has checked already.
 */

export const numberParameter = (
  name: string,
  quantity: string,
  help: string,
  more: Partial<Parameter> = {},
): Parameter => ({
  name,
  type: quantityType(quantity),
  named: true,
  help,
  ...more,
})

export const thingParameter = (
  name: string,
  kind: ThingKind,
  help: string,
  more: Partial<Parameter> = {},
): Parameter => ({
  name,
  type: thingType(kind),
  named: true,
  help,
  ...more,
})

/** A gas by its identifier, by a rig thing that stands for it, or by any of its names in quotes. */
export const GAS: Parameter = {
  name: 'gas',
  type: [thingType('gas'), TEXT] satisfies Type[],
  help: 'a gas: nitrogen, "CO2", ideal(air) …',
}

export function numberOf(args: Arguments, name: string): number {
  const value = args[name]
  if (typeof value !== 'number') throw new Error(`the table lets ${name} pass without a number`)
  return value
}

export function optionalNumber(args: Arguments, name: string): number | undefined {
  return args[name] === undefined ? undefined : numberOf(args, name)
}

/** A number above zero: what a volume, a diameter or a mass has to be. */
export function positive(args: Arguments, name: string, words: string): number {
  const value = numberOf(args, name)
  if (!(value > 0)) throw new Problem('range', `${words} has to be more than zero`)
  return value
}

export function valueOf<T>(args: Arguments, name: string): T {
  const value = args[name]
  if (!isThing(value)) throw new Error(`the table lets ${name} pass without a thing`)
  return value.value as T
}

export function valuesOf<T>(args: Arguments, name: string): T[] {
  return ((args[name] ?? []) as readonly Thing[]).map((item) => item.value as T)
}

export function optionalValue<T>(args: Arguments, name: string): T | undefined {
  return args[name] === undefined ? undefined : valueOf<T>(args, name)
}

export function fluidOf(args: Arguments, name = 'gas'): Fluid {
  const value = args[name]
  if (typeof value !== 'string') return valueOf<Fluid>(args, name)
  const fluid = findFluid(value)
  if (!fluid) throw new Problem('name', `no gas is called “${value}” here`)
  return fluid
}

/** A row of the table that makes a thing of its arguments: the same arguments make the same thing. */
export function constructor<T extends object>(
  spec: Omit<FunctionSpec, 'evaluate' | 'result'> & {
    readonly makes: ThingKind
    readonly make: (args: Arguments, surroundings: Parameters<FunctionSpec['evaluate']>[1]) => T
    /** A few words for a card or a cell; a line break parts two lines. */
    readonly shown: (value: T, args: Arguments) => string
  },
): FunctionSpec {
  const { makes, make, shown, ...rest } = spec
  return {
    ...rest,
    result: thingType(makes),
    evaluate: (args, surroundings) => {
      const value = make(args, surroundings)
      return thing(
        makes,
        contentKey(spec.name, { ...args, ambient: args.ambient ?? surroundings.T_K, around: surroundings.p_Pa }),
        shown(value, args),
        value,
      )
    },
  }
}
