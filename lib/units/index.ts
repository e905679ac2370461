/** Quantities, units, and reading and printing of values. SI inside; temperatures in K, pressures absolute in Pa. */
export {
  DIMENSIONLESS,
  dimensionText,
  divide,
  isDimensionless,
  multiply,
  power,
  sameDimension,
  type Dimension,
} from './dimension'
export {
  QUANTITIES,
  columnUnit,
  isQuantity,
  isUnitOf,
  quantity,
  quantityOf,
  unitOf,
  type Quantity,
  type QuantityScale,
} from './quantities'
export { readUnit, type Unit } from './unit'
export { fromSI, toSI } from './convert'
export {
  belowZero,
  formulaOf,
  readQuantity,
  unitInFormula,
  unknownUnit,
  type Reading,
  type ReadingContext,
} from './read'
export { formatNumber, formatQuantity, type Formatting } from './format'
export { dimensionWords } from './words'
