import { Problem } from '@/lib/errors'
import { commonType } from '../typing'
import type { QuantityType } from '../typing'
import type { FunctionSpec, Type } from '../types'

type Types = Parameters<Extract<FunctionSpec['result'], (...args: never[]) => Type>>[0]

export const one = (types: Types, name: string): Type => {
  const type = types[name]
  if (type === undefined || Array.isArray(type)) throw new Error(`${name} is no single argument`)
  return type as Type
}

export const many = (types: Types, name: string): readonly Type[] => {
  const type = types[name] ?? []
  return Array.isArray(type) ? type : [type as Type]
}

/** The items of lists and single arguments, all quantities of one kind. */
export function sameQuantity(types: readonly Type[], what: string): QuantityType {
  const items = types.map((type) => (type.kind === 'list' ? type.of : type))
  const common = commonType(items)
  if (!common || common.kind !== 'quantity') throw new Problem('dimension', `${what} takes numbers of one quantity`)
  return common
}

export function quantityOnly(type: Type, what: string): QuantityType {
  if (type.kind !== 'quantity') throw new Problem('dimension', `${what} takes a number`)
  return type
}
