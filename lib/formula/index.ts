/** The formula language: reading, checking, making ready to run, and showing. It knows dimensions; fluids and vessels it meets only in the vocabulary it is handed. */
export { parse, LONGEST_FORMULA, type Parsed } from './parse'
export { print } from './print'
export { bind, show, shownSpan } from './bind'
export { reservedWords, written } from './names'
export { compile, type Expectation } from './compile'
export { commonType, fits, typeWords } from './typing'
export { children, type Ast, type FormulaProblem } from './ast'
export { analyse, callAt, complete, signature, type CallAt, type Completion, type Completions } from './editor'
export { highlightedParser } from './highlight'
export { STANDARD_FUNCTIONS, STANDARD_WORDS } from './standard'
export { STARTS_FROM_NONE, isFault, isThing } from './values'
export type {
  Arguments,
  Compilation,
  Fault,
  FieldSpec,
  FunctionSpec,
  Parameter,
  Read,
  RowRef,
  Scale,
  Scope,
  Surroundings,
  Thing,
  ThingKind,
  ThingSpec,
  Type,
  Value,
  Vocabulary,
} from './types'
