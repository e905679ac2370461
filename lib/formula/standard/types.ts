import { Problem } from '@/lib/errors'
import { dimensionWords } from '@/lib/units'
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
  const items = types.map((type) => (type.kind === 'list' ? type.of : type)).map((type) => quantityOnly(type, what))
  const common = commonType(items)
  if (common) return common as QuantityType
  const kinds = [...new Set(items.map((type) => dimensionWords(type.dimension, type.scale)))]
  throw new Problem('dimension', `${what} takes numbers of one quantity, not ${kinds.join(' and ')} together`)
}

export function quantityOnly(type: Type, what: string): QuantityType {
  if (type.kind !== 'quantity') throw new Problem('dimension', `${what} takes numbers`)
  return type
}

/** A reading on a scale is no amount: it cannot be summed, and has no size or sign. */
export function noReading(type: QuantityType, why: string): QuantityType {
  if (type.scale === 'point') throw new Problem('dimension', why)
  return type
}
