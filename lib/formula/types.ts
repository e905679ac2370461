import type { ProblemCode, Span } from '@/lib/errors'
import type { Dimension } from '@/lib/units'

/**
 * How a quantity may be added and subtracted.
 * - `ratio`: has a true zero and adds freely (a mass, an absolute pressure).
 * - `point`: a reading on a scale (15 °C, 5 bar(g)): two cannot be added, their difference is a `difference`.
 * - `difference`: the distance between two points (a temperature difference).
 * - `open`: may stand for either (15 K).
 */
export type Scale = 'ratio' | 'point' | 'difference' | 'open'

/** What an expression is, known before it runs. */
export type Type =
  | { readonly kind: 'quantity'; readonly dimension: Dimension; readonly scale: Scale }
  | { readonly kind: 'text' }
  | { readonly kind: 'logical' }
  | { readonly kind: 'thing'; readonly thing: ThingKind }
  | { readonly kind: 'list'; readonly of: Type }
  | { readonly kind: 'any' }

/** Kinds of things (gas, vessel, shell, supply, path, run …). The formula language does not know them: a table names them. */
export type ThingKind = string

/** A thing as a value: content-addressed, so that equal things are one. */
export interface Thing {
  readonly thing: ThingKind
  /** Equal content, equal key, on any machine. */
  readonly key: string
  /** A few words for a cell: "nitrogen, 300 bar at 15 °C". */
  readonly shown: string
  readonly value: unknown
}

/** An error as a value: where and why, in a person's words. */
export interface Fault {
  readonly fault: ProblemCode
  readonly reason: string
  /** Where in the formula that was asked. */
  readonly span?: Span
}

/** What a formula gives. Numbers are SI (temperatures in kelvin, pressures absolute in pascal). */
export type Value = number | string | boolean | null | Thing | Fault | readonly Value[]

/** Which cell or thing a formula reads, by identity. */
export type Read =
  | { readonly kind: 'cell'; readonly column: string; readonly row: RowRef }
  | { readonly kind: 'thing'; readonly thing: string }

export type RowRef =
  | { readonly at: 'self' }
  | { readonly at: 'from' }
  | { readonly at: 'all' }
  | { readonly at: 'row'; readonly row: string }

export interface Parameter {
  readonly name: string
  readonly type: Type | readonly Type[]
  readonly optional?: boolean
  /** A formula that stands in when the argument is left out, or its cell is empty. */
  readonly default?: string
  /** May be given only by name. Arguments that are not named are given in the order of the table. */
  readonly named?: boolean
  /** The last parameter may repeat: sum(a, b, c). */
  readonly repeats?: boolean
  /** A text that is one of these words, written bare or in quotes: `draw: vapour`. */
  readonly choices?: readonly string[]
  readonly help: string
}

export interface Surroundings {
  readonly p_Pa: number
  readonly T_K: number
}

/** Arguments as a function receives them: by parameter name, already checked, in SI; absent ones are undefined. */
export type Arguments = Readonly<Record<string, Value | undefined>>

export interface FunctionSpec {
  readonly name: string
  /** Heading in the reference: "Properties", "Operations", "Paths" … */
  readonly group: string
  readonly parameters: readonly Parameter[]
  /** The result's type, or a rule that works it out from the argument types (by parameter name). May throw Problem('dimension'). */
  readonly result: Type | ((types: Readonly<Record<string, Type | readonly Type[] | undefined>>) => Type)
  /** One line. */
  readonly help: string
  readonly example: { readonly formula: string; readonly shown: string }
  /** A paper, a standard. */
  readonly source?: string
  /** Extra rule on which arguments go together ("give two of p, T, …"): throws Problem('argument'). `given` are the names present. */
  readonly together?: (given: readonly string[]) => void
  /** Gets faults as arguments instead of passing the first on (iferror, count). */
  readonly takesFaults?: boolean
  /** Arguments are handed over as functions to call when needed (if, iferror); they may give a fault, or null for an empty cell. */
  readonly lazy?: boolean
  readonly evaluate: (args: Arguments, surroundings: Surroundings) => Value
  readonly evaluateLazy?: (args: Readonly<Record<string, (() => Value) | undefined>>) => Value
}

export interface FieldSpec {
  readonly name: string
  readonly type: Type
  readonly help: string
  readonly get: (value: never) => Value
}

/** The fields of one kind of thing: A1.volume, run.T_peak. */
export interface ThingSpec {
  readonly thing: ThingKind
  /** In words: "a gas", "a run". */
  readonly words: string
  readonly fields: readonly FieldSpec[]
}

/** The one table from which evaluation, checking, completion, signature help and the reference are made. */
export interface Vocabulary {
  readonly functions: ReadonlyMap<string, FunctionSpec>
  readonly things: ReadonlyMap<ThingKind, ThingSpec>
  /** Bare words that are values: fluids by their identifier, the words liquid, vapour, mixed, settled … */
  readonly words: ReadonlyMap<string, { readonly type: Type; readonly value: Value; readonly help: string }>
}

/** What names mean in one sheet, now. Ids are those of the document. */
export interface Scope {
  readonly columns: readonly { readonly id: string; readonly symbol: string; readonly type: Type }[]
  /** In the order shown: `@3` is the third. */
  readonly rows: readonly { readonly id: string; readonly label: string }[]
  readonly things: readonly { readonly id: string; readonly name: string; readonly type: Type }[]
  /**
   * The words of the language (see reservedWords): a name that is one of them is that word, so that no new name in a
   * sheet changes what a formula means; the sheet's own thing of that name is written in brackets, [air]. Left out: the
   * sheet's names go first.
   */
  readonly words?: ReadonlySet<string>
}

/** A formula made ready to run, or why it cannot be. */
export type Compilation =
  | {
      readonly ok: true
      readonly type: Type
      /** What `run` is handed the values of, in this order. */
      readonly reads: readonly Read[]
      /** Only a value, a text or a name: nothing is worked out. */
      readonly literal: boolean
      /** Never throws for a user's mistake: that comes back as a Fault. */
      readonly run: (values: readonly Value[], surroundings: Surroundings) => Value
    }
  | { readonly ok: false; readonly fault: Fault }
