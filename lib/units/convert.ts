import type { Unit } from './unit'

/** The SI value of a reading in a unit. Gauge units count from the ambient pressure, Pa. */
export function toSI(value: number, unit: Unit, ambient_Pa: number): number {
  return ((value + unit.offset) * unit.factor) / unit.divisor + (unit.gauge ? ambient_Pa : 0)
}

/** The reading in a unit of an SI value: the inverse of toSI. */
export function fromSI(si: number, unit: Unit, ambient_Pa: number): number {
  return ((si - (unit.gauge ? ambient_Pa : 0)) * unit.divisor) / unit.factor - unit.offset
}
