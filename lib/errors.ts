/** Every kind of mistake a user can make, and what kind of thing is wrong. Types and checks derive from this table. */
export const PROBLEMS = {
  syntax: 'the formula cannot be read',
  name: 'a name is not known, or means two things',
  deleted: 'what the formula read was deleted',
  dimension: 'a quantity of another kind is needed',
  argument: 'an argument is missing, unknown or given twice',
  range: 'a value lies outside what is known or allowed',
  state: 'no such state of the fluid exists',
  impossible: 'the operation cannot happen as asked',
  unreached: 'the stop was not reached within the horizon',
  unconverged: 'the calculation did not settle',
  unsupported: 'not worked out here',
  cycle: 'cells need one another',
  dependency: 'something this needs has an error',
} as const

export type ProblemCode = keyof typeof PROBLEMS

/** A stretch of a formula's text, in characters from its start. */
export interface Span {
  readonly from: number
  readonly to: number
}

/**
 * A user's mistake, told in a person's words. It is thrown deep inside the numerics and becomes a value (a fault with
 * a place and a reason) where the formula engine calls them. Anything else that is thrown is a programmer's mistake.
 */
export class Problem extends Error {
  override readonly name = 'Problem'
  constructor(
    readonly code: ProblemCode,
    /** The sentence people read: names the thing, the value and the bound, in units. */
    readonly reason: string,
    readonly span?: Span,
  ) {
    super(reason)
  }
}
