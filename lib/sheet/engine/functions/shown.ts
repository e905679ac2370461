import type { Value } from '@/lib/formula'
import { formatQuantity } from '@/lib/units'
import { STANDARD_SURROUNDINGS } from '../surroundings'

/** A number as a card or a cell words it, in a unit that people in the trade read. */
export function shown(si: Value | undefined, quantity: string, unit: string, decimals?: number): string {
  return typeof si === 'number'
    ? formatQuantity(si, {
        quantity,
        unit,
        ...(decimals !== undefined && { decimals }),
        ambient_Pa: STANDARD_SURROUNDINGS.p_Pa,
      })
    : ''
}
