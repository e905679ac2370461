import type { FunctionSpec, Parameter, Type, Value } from '../types'

export const GROUP = 'Standard'
export const SOURCE = 'named as in OASIS OpenFormula 1.2'
export const ANY: Type = { kind: 'any' }
export const X: Parameter = { name: 'x', type: ANY, help: 'a number' }
export const VALUES: Parameter = { name: 'values', type: ANY, repeats: true, help: 'numbers, or whole columns' }

export type Example = FunctionSpec['example']

/** The numbers among the arguments; empty cells and texts are passed over. */
export const numbersOf = (value: Value | undefined): readonly number[] =>
  ((value as readonly Value[] | undefined) ?? []).filter((item): item is number => typeof item === 'number')
