import { styleTags, tags } from '@lezer/highlight'
import { parser } from './parser'

/** The parser with what each part of a formula is, for the editor's colours. */
export const highlightedParser = parser.configure({
  props: [
    styleTags({
      FunctionName: tags.function(tags.name),
      ArgumentName: tags.propertyName,
      FieldName: tags.attributeName,
      'Reference/Name Reference/Bracketed Identity': tags.variableName,
      'RowReference/...': tags.labelName,
      Number: tags.number,
      'UnitName Quantity/Bracketed': tags.unit,
      Text: tags.string,
      'Plus Minus Times Divide Power Join Compare "%"': tags.operator,
    }),
  ],
})
