import type { Layer, Shell } from '../vessel'
import { caloric, type Caloric } from './heatCapacity'

/** Cells over all layers of a wall, unless the layers say. */
const DEFAULT_CELLS = 20
const FEWEST_CELLS = 3

/**
 * A shell as a chain of cells from the inner to the outer face, each with one temperature in its middle. Energies are
 * those of whole cells, J. A lumped shell is one cell without resistance.
 */
export interface Wall {
  readonly cells: number
  readonly innerArea_m2: number
  readonly outerArea_m2: number
  readonly mass_kg: readonly number[]
  readonly caloric: readonly Caloric[]
  /** Between the middles of cell i and i + 1, W/K. */
  readonly conductance_W_K: readonly number[]
  /** Half a cell, between the face and the first (last) middle, K/W. */
  readonly innerResistance_K_W: number
  readonly outerResistance_K_W: number
}

export const NO_WALL: Wall = {
  cells: 0,
  innerArea_m2: 0,
  outerArea_m2: 0,
  mass_kg: [],
  caloric: [],
  conductance_W_K: [],
  innerResistance_K_W: 0,
  outerResistance_K_W: 0,
}

export function wallOf(shell: Shell): Wall {
  switch (shell.kind) {
    case 'none':
      return NO_WALL
    case 'lumped':
      return {
        cells: 1,
        innerArea_m2: shell.area_m2,
        outerArea_m2: shell.outsideArea_m2 ?? shell.area_m2,
        mass_kg: [shell.mass_kg],
        caloric: [caloric(shell.heatCapacity)],
        conductance_W_K: [],
        innerResistance_K_W: 0,
        outerResistance_K_W: 0,
      }
    case 'layers':
      return layered(shell.layers, shell.area_m2, shell.innerDiameter_m)
  }
}

function layered(layers: readonly Layer[], area_m2: number, innerDiameter_m: number | undefined): Wall {
  const innerRadius = innerDiameter_m === undefined ? Infinity : innerDiameter_m / 2
  const mass_kg: number[] = []
  const calorics: Caloric[] = []
  /** Resistance of the inner and the outer half of each cell. */
  const halves: [number, number][] = []
  let depth = 0
  for (const layer of layers) {
    const cells = layer.cells ?? cellsOf(layer, layers)
    const width = layer.thickness_m / cells
    const material = caloric(layer.heatCapacity)
    for (let i = 0; i < cells; i++) {
      const [low, middle, high] = [depth, depth + width / 2, depth + width]
      mass_kg.push(layer.density_kg_m3 * area_m2 * spread(low, high, innerRadius))
      calorics.push(material)
      halves.push([
        resistance(low, middle, innerRadius) / (layer.conductivity_W_mK * area_m2),
        resistance(middle, high, innerRadius) / (layer.conductivity_W_mK * area_m2),
      ])
      depth = high
    }
  }
  const conductance_W_K = halves.slice(1).map(([inner], i) => 1 / (halves[i][1] + inner))
  return {
    cells: mass_kg.length,
    innerArea_m2: area_m2,
    outerArea_m2: area_m2 * (innerRadius === Infinity ? 1 : 1 + depth / innerRadius),
    mass_kg,
    caloric: calorics,
    conductance_W_K,
    innerResistance_K_W: halves[0][0],
    outerResistance_K_W: halves[halves.length - 1][1],
  }
}

/** Volume between two depths, per unit of inner area. */
const spread = (low: number, high: number, radius: number) =>
  radius === Infinity ? high - low : (high - low) * (1 + (high + low) / (2 * radius))

/** Thickness between two depths as conduction feels it, referred to the inner area. */
const resistance = (low: number, high: number, radius: number) =>
  radius === Infinity ? high - low : radius * Math.log1p((high - low) / (radius + low))

/** A layer's share of the cells goes with the root of the time heat needs to cross it. */
function cellsOf(layer: Layer, layers: readonly Layer[]): number {
  const weight = (l: Layer) =>
    l.thickness_m * Math.sqrt((l.density_kg_m3 * caloric(l.heatCapacity).capacity_J_kgK(293.15)) / l.conductivity_W_mK)
  const whole = layers.reduce((sum, l) => sum + weight(l), 0)
  return Math.max(FEWEST_CELLS, Math.round((DEFAULT_CELLS * weight(layer)) / whole))
}
