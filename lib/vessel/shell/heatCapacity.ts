/** Specific heat capacity of a solid: a constant in J/(kg K), or a table over temperature. */
export type HeatCapacity = number | HeatCapacityTable

/** Straight lines between points, constant beyond the ends. */
export interface HeatCapacityTable {
  readonly name: string
  readonly source: string
  /** Rising. */
  readonly T_K: readonly number[]
  readonly c_J_kgK: readonly number[]
}

/** Energies of solids are counted from here. */
const ZERO_T_K = 273.15

/**
 * Specific energy of a solid, e(T) = ∫ c dT, its inverse and its slope. Energy, not temperature, is what a shell's cell
 * carries through an integration, so that what passes between cells is conserved exactly.
 */
export interface Caloric {
  energy_J_kg(T_K: number): number
  temperature_K(e_J_kg: number): number
  capacity_J_kgK(T_K: number): number
}

export function caloric(c: HeatCapacity): Caloric {
  if (typeof c === 'number') {
    return {
      energy_J_kg: (T) => c * (T - ZERO_T_K),
      temperature_K: (e) => ZERO_T_K + e / c,
      capacity_J_kgK: () => c,
    }
  }
  return new TabulatedCaloric(c)
}

class TabulatedCaloric implements Caloric {
  private readonly T: readonly number[]
  private readonly c: readonly number[]
  /** Energy at each point, counted from the first. */
  private readonly e: number[]
  private readonly offset: number

  constructor(table: HeatCapacityTable) {
    this.T = table.T_K
    this.c = table.c_J_kgK
    this.e = [0]
    for (let i = 1; i < this.T.length; i++) {
      this.e.push(this.e[i - 1] + ((this.c[i] + this.c[i - 1]) / 2) * (this.T[i] - this.T[i - 1]))
    }
    this.offset = this.fromFirst(ZERO_T_K)
  }

  energy_J_kg(T_K: number) {
    return this.fromFirst(T_K) - this.offset
  }

  capacity_J_kgK(T_K: number) {
    const { T, c } = this
    if (T_K <= T[0]) return c[0]
    const last = T.length - 1
    if (T_K >= T[last]) return c[last]
    const i = segment(T, T_K)
    return c[i] + this.slope(i) * (T_K - T[i])
  }

  temperature_K(e_J_kg: number) {
    const { T, c, e } = this
    const energy = e_J_kg + this.offset
    const last = T.length - 1
    if (energy <= 0) return T[0] + energy / c[0]
    if (energy >= e[last]) return T[last] + (energy - e[last]) / c[last]
    const i = segment(e, energy)
    const rest = energy - e[i]
    // c d + slope d²/2 = rest, in the form that does not cancel where the slope is small.
    return T[i] + (2 * rest) / (c[i] + Math.sqrt(c[i] * c[i] + 2 * this.slope(i) * rest))
  }

  private fromFirst(T_K: number) {
    const { T, c, e } = this
    const last = T.length - 1
    if (T_K <= T[0]) return c[0] * (T_K - T[0])
    if (T_K >= T[last]) return e[last] + c[last] * (T_K - T[last])
    const i = segment(T, T_K)
    const d = T_K - T[i]
    return e[i] + d * (c[i] + (this.slope(i) * d) / 2)
  }

  private slope(i: number) {
    return (this.c[i + 1] - this.c[i]) / (this.T[i + 1] - this.T[i])
  }
}

/** The i with points[i] ≤ value < points[i + 1]. */
function segment(points: readonly number[], value: number): number {
  let low = 0
  let high = points.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (points[middle] <= value) low = middle
    else high = middle
  }
  return low
}
