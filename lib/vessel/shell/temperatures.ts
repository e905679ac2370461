import type { ShellState } from '../run'
import type { Wall } from './wall'

/** Total energy of a wall at the given cell temperatures, J. */
export function wallEnergy(wall: Wall, cells_K: ArrayLike<number>): number {
  let sum = 0
  for (let i = 0; i < wall.cells; i++) sum += wall.mass_kg[i] * wall.caloric[i].energy_J_kg(cells_K[i])
  return sum
}

/** Energy and heat capacity of a wall that is at one temperature throughout. */
export function evenWall(wall: Wall, T_K: number): { energy_J: number; capacity_J_K: number } {
  let energy_J = 0
  let capacity_J_K = 0
  for (let i = 0; i < wall.cells; i++) {
    energy_J += wall.mass_kg[i] * wall.caloric[i].energy_J_kg(T_K)
    capacity_J_K += wall.mass_kg[i] * wall.caloric[i].capacity_J_kgK(T_K)
  }
  return { energy_J, capacity_J_K }
}

/** Mean over the cells, weighted by heat capacity. */
export function meanTemperature_K(wall: Wall, cells_K: ArrayLike<number>): number {
  let heat = 0
  let capacity = 0
  for (let i = 0; i < wall.cells; i++) {
    const cell = wall.mass_kg[i] * wall.caloric[i].capacity_J_kgK(cells_K[i])
    capacity += cell
    heat += cell * cells_K[i]
  }
  return heat / capacity
}

/** A shell at one temperature; NaN where there is no shell. */
export function evenShell(wall: Wall, T_K: number): ShellState {
  const T = wall.cells > 0 ? T_K : NaN
  return { mean_K: T, inner_K: T, outer_K: T, cells_K: Array.from({ length: wall.cells }, () => T) }
}
