import type { Scope } from '@/lib/formula'
import { formatNumber, formatQuantity } from '@/lib/units'
import { isTypedValue, nameOf, typedFromStored } from './entry'
import { COLUMN_KINDS } from './types'
import type { CellView, ColumnView } from './view'
import type { CellValue, LimitMark, Limits } from './values'

export interface CellParts {
  readonly stored: string | null
  readonly column: ColumnView
  readonly value: CellValue
  readonly limits: Limits
  readonly scope: Scope
  readonly ambient_Pa: number
}

/** One cell of the grid. What costs something to word is worded when it is looked at: of 15,000 cells few ever are. */
export class Cell implements CellView {
  private shownText: string | undefined
  private editText: string | undefined

  constructor(private readonly parts: CellParts) {}

  isMadeOf(parts: CellParts): boolean {
    const mine = this.parts
    return (
      mine.stored === parts.stored &&
      mine.column === parts.column &&
      mine.value === parts.value &&
      mine.limits === parts.limits &&
      mine.scope === parts.scope &&
      mine.ambient_Pa === parts.ambient_Pa
    )
  }

  get value(): CellValue {
    return this.parts.value
  }

  get shown(): string {
    return (this.shownText ??= shownValue(this.parts))
  }

  get spoken(): string {
    const { value, column, ambient_Pa } = this.parts
    if (value.kind !== 'number' || column.quantity in COLUMN_KINDS) return this.shown
    return formatQuantity(value.si, {
      quantity: column.quantity,
      unit: column.unit,
      decimals: column.decimals,
      ambient_Pa,
    })
  }

  get edit(): string {
    return (this.editText ??= this.worded())
  }

  get origin(): CellView['origin'] {
    const { stored, column } = this.parts
    if (stored === null) return column.formula === null ? 'empty' : 'formula'
    if (column.formula !== null) return 'override'
    return isTypedValue(stored) ? 'typed' : 'formula'
  }

  get mark(): LimitMark | undefined {
    const { value, limits, column } = this.parts
    if (value.kind !== 'number') return undefined
    if (column.display === 'margin') return value.si < 0 ? 'over' : undefined
    if (limits.high !== undefined && value.si > limits.high) return 'over'
    if (limits.low !== undefined && value.si < limits.low) return 'under'
    return undefined
  }

  get used(): number | undefined {
    const { value, limits, column } = this.parts
    if (column.display !== 'margin' || value.kind !== 'number') return undefined
    if (value.si < 0) return 1
    // in a margin column the upper limit is the whole allowance
    if (limits.high === undefined || limits.high <= 0) return undefined
    return Math.min(1, Math.max(0, 1 - value.si / limits.high))
  }

  private worded(): string {
    const { stored, column, scope } = this.parts
    if (stored !== null) return typedFromStored(stored, column, scope)
    return column.formula === null ? '' : `=${column.formula}`
  }
}

function shownValue({ stored, scope, value, column, ambient_Pa }: CellParts): string {
  switch (value.kind) {
    case 'empty':
      return ''
    case 'number':
      return formatNumber(value.si, {
        quantity: column.quantity,
        unit: column.unit,
        decimals: column.decimals,
        ambient_Pa,
      })
    case 'text':
      return value.text
    case 'logical':
      return value.value ? 'yes' : 'no'
    case 'thing':
      return nameOf(stored, scope) ?? value.shown
    case 'error':
      return value.reason
  }
}
