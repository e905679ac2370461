import type { FunctionSpec, Vocabulary } from '../types'
import { LOGICAL } from '../typing'
import { logicFunctions } from './logic'
import { listFunctions } from './lists'
import { numberFunctions } from './numbers'
import { roundingFunctions } from './rounding'

/** Functions that keep the names of the open standard for spreadsheets, with our rules of dimensions. */
export const STANDARD_FUNCTIONS: readonly FunctionSpec[] = [
  ...listFunctions,
  ...numberFunctions,
  ...roundingFunctions,
  ...logicFunctions,
]

export const STANDARD_WORDS: Vocabulary['words'] = new Map([
  ['true', { type: LOGICAL, value: true, help: 'yes' }],
  ['false', { type: LOGICAL, value: false, help: 'no' }],
])
