import type { Surroundings } from '@/lib/formula'

/** Where a sheet names no surroundings: the standard atmosphere at sea level (ISO 2533), 15 °C and 1.01325 bar. */
export const STANDARD_SURROUNDINGS: Surroundings = { p_Pa: 101_325, T_K: 288.15 }
