import { Problem } from '@/lib/errors'
import { isThing } from '@/lib/formula'
import type { Arguments, FunctionSpec } from '@/lib/formula'
import { ALUMINIUM, POLYMER, STEEL } from '@/lib/vessel'
import type { HeatCapacity, HeatCapacityTable, Inside, Layer, Outside, Shell } from '@/lib/vessel'
import { quantityType, thingType } from '../../types'
import { thing } from '../content'
import { constructor, numberParameter, optionalNumber, positive, thingParameter, valueOf, valuesOf } from './arguments'
import { shown } from './shown'

const heatCapacityParameter = {
  name: 'heat_capacity',
  type: [quantityType('specific_heat_capacity'), thingType('material')],
  named: true,
  help: 'specific heat capacity of the wall, or steel, aluminium or polymer for one that depends on temperature',
}

function heatCapacityOf(args: Arguments): HeatCapacity {
  const value = args.heat_capacity
  return isThing(value)
    ? (value.value as HeatCapacityTable)
    : positive(args, 'heat_capacity', 'the heat capacity of the wall')
}

/** Bare words for what walls are made of. */
export const MATERIALS: readonly { word: string; table: HeatCapacityTable }[] = [
  { word: 'steel', table: STEEL },
  { word: 'aluminium', table: ALUMINIUM },
  { word: 'polymer', table: POLYMER },
]

export const materialThing = ({ word, table }: (typeof MATERIALS)[number]) =>
  thing('material', `material ${word}`, word, table)

export const shellFunctions: readonly FunctionSpec[] = [
  constructor<Shell>({
    name: 'lumped',
    group: 'Shells',
    makes: 'shell',
    parameters: [
      numberParameter('mass', 'mass', 'mass of the shell'),
      heatCapacityParameter,
      numberParameter('area', 'area', 'area of the shell, inside and out'),
      numberParameter('outside_area', 'area', 'area outside, where it differs', { optional: true }),
    ],
    help: 'a shell that has one temperature throughout',
    example: { formula: 'lumped(mass: 52 kg, heat_capacity: 470 [J/(kg K)], area: 0.75 [m^2])', shown: 'shell 52 kg' },
    make: (args) => ({
      kind: 'lumped',
      mass_kg: positive(args, 'mass', 'the mass of the shell'),
      heatCapacity: heatCapacityOf(args),
      area_m2: positive(args, 'area', 'the area of the shell'),
      ...(args.outside_area !== undefined && { outsideArea_m2: positive(args, 'outside_area', 'the area outside') }),
    }),
    shown: (_, args) => `shell ${shown(args.mass, 'mass', 'kg')}`,
  }),
  constructor<Layer>({
    name: 'layer',
    group: 'Shells',
    makes: 'layer',
    parameters: [
      numberParameter('thickness', 'length', 'thickness'),
      numberParameter('conductivity', 'thermal_conductivity', 'thermal conductivity'),
      numberParameter('density', 'density', 'density'),
      heatCapacityParameter,
      numberParameter('cells', 'dimensionless', 'into how many cells it is cut for the calculation', {
        optional: true,
      }),
    ],
    help: 'one layer of a wall, for layers()',
    example: {
      formula: 'layer(thickness: 4 mm, conductivity: 0.4 [W/(m K)], density: 960 [kg/m^3], heat_capacity: polymer)',
      shown: '4 mm layer',
    },
    make: (args) => {
      const cells = optionalNumber(args, 'cells')
      if (cells !== undefined && !(Number.isInteger(cells) && cells >= 1 && cells <= 200)) {
        throw new Problem('range', 'a layer is cut into 1 to 200 cells')
      }
      return {
        thickness_m: positive(args, 'thickness', 'the thickness of a layer'),
        conductivity_W_mK: positive(args, 'conductivity', 'the conductivity of a layer'),
        density_kg_m3: positive(args, 'density', 'the density of a layer'),
        heatCapacity: heatCapacityOf(args),
        ...(cells !== undefined && { cells }),
      }
    },
    shown: (_, args) => `${shown(args.thickness, 'length', 'mm')} layer`,
  }),
  constructor<Shell>({
    name: 'layers',
    group: 'Shells',
    makes: 'shell',
    parameters: [
      { name: 'layer', type: thingType('layer'), repeats: true, help: 'a layer, the innermost first' },
      numberParameter('area', 'area', 'area of the inner face'),
      numberParameter('inner_diameter', 'length', 'inner diameter of a cylinder; left out: a plane wall', {
        optional: true,
      }),
    ],
    help: 'a shell of layers, through which heat is conducted',
    example: {
      formula:
        'layers(layer(thickness: 4 mm, conductivity: 0.4 [W/(m K)], density: 960 [kg/m^3], heat_capacity: polymer), layer(thickness: 20 mm, conductivity: 0.7 [W/(m K)], density: 1550 [kg/m^3], heat_capacity: 920 [J/(kg K)]), area: 1.1 [m^2], inner_diameter: 0.3 m)',
      shown: 'shell of 2 layers, 24 mm',
    },
    make: (args) => ({
      kind: 'layers',
      layers: valuesOf<Layer>(args, 'layer'),
      area_m2: positive(args, 'area', 'the area of the inner face'),
      ...(args.inner_diameter !== undefined && {
        innerDiameter_m: positive(args, 'inner_diameter', 'the inner diameter'),
      }),
    }),
    shown: (shell) => {
      const layers = shell.kind === 'layers' ? shell.layers : []
      const thickness = layers.reduce((sum, layer) => sum + layer.thickness_m, 0)
      return `shell of ${layers.length} ${layers.length === 1 ? 'layer' : 'layers'}, ${shown(thickness, 'length', 'mm')}`
    },
  }),
  constructor<Inside>({
    name: 'free_convection',
    group: 'Shells',
    makes: 'inside',
    parameters: [numberParameter('height', 'length', 'inner height of the vessel; of a lying one its diameter')],
    help: 'inside coefficient by free convection, worked out from the gas and its temperature',
    example: { formula: 'free_convection(height: 1.4 m)', shown: 'free convection' },
    make: (args) => ({ kind: 'free', height_m: positive(args, 'height', 'the height') }),
    shown: () => 'free convection',
  }),
  constructor<Inside>({
    name: 'jet_mixing',
    group: 'Shells',
    makes: 'inside',
    parameters: [
      numberParameter('inlet', 'length', 'inner diameter of the inlet'),
      numberParameter('diameter', 'length', 'inner diameter of the vessel'),
    ],
    help: 'inside coefficient while a jet stirs the gas, free convection when none does',
    example: { formula: 'jet_mixing(inlet: 5 mm, diameter: 230 mm)', shown: 'jet mixing' },
    make: (args) => ({
      kind: 'jet',
      inletDiameter_m: positive(args, 'inlet', 'the inlet diameter'),
      diameter_m: positive(args, 'diameter', 'the diameter of the vessel'),
    }),
    shown: () => 'jet mixing',
  }),
  constructor<Outside>({
    name: 'convection',
    group: 'Shells',
    makes: 'outside',
    parameters: [
      numberParameter('coefficient', 'heat_transfer_coefficient', 'outside coefficient'),
      numberParameter('emissivity', 'dimensionless', 'emissivity of the outer face, 0 to 1, for radiation besides', {
        optional: true,
      }),
    ],
    help: 'heat to the surroundings by a coefficient, and by radiation where an emissivity is given',
    example: { formula: 'convection(coefficient: 6 [W/(m^2 K)], emissivity: 0.8)', shown: 'convection and radiation' },
    make: (args) => {
      const emissivity = optionalNumber(args, 'emissivity')
      if (emissivity !== undefined && !(emissivity >= 0 && emissivity <= 1))
        throw new Problem('range', 'an emissivity lies between 0 and 1')
      return {
        kind: 'fixed',
        coefficient_W_m2K: positive(args, 'coefficient', 'the outside coefficient'),
        ...(emissivity !== undefined && { emissivity }),
      }
    },
    shown: (_, args) => (args.emissivity === undefined ? 'convection' : 'convection and radiation'),
  }),
  constructor<Outside>({
    name: 'absorbed',
    group: 'Shells',
    makes: 'outside',
    parameters: [numberParameter('flux', 'heat_flux', 'heat flux that the outer face takes up')],
    help: 'fire exposure: the outer face takes up a heat flux whatever its temperature',
    example: { formula: 'absorbed(flux: 60 [kW/m^2])', shown: 'absorbs 60 kW/m²' },
    make: (args) => ({ kind: 'absorbed', flux_W_m2: positive(args, 'flux', 'the heat flux') }),
    shown: (_, args) => `absorbs ${shown(args.flux, 'heat_flux', 'kW/m²')}`,
  }),
]

/** A shell coefficient given as a plain number, or as a way of working it out. */
export function insideOf(args: Arguments): Inside | undefined {
  if (args.inside === undefined) return undefined
  if (isThing(args.inside)) return valueOf<Inside>(args, 'inside')
  return { kind: 'fixed', coefficient_W_m2K: positive(args, 'inside', 'the inside coefficient') }
}

export function outsideOf(args: Arguments): Outside | undefined {
  if (args.outside === undefined) return undefined
  if (isThing(args.outside)) return valueOf<Outside>(args, 'outside')
  return { kind: 'fixed', coefficient_W_m2K: positive(args, 'outside', 'the outside coefficient') }
}

export const INSIDE = {
  ...thingParameter('inside', 'inside', 'heat-transfer coefficient inside, or free_convection(), jet_mixing()', {
    optional: true,
  }),
  type: [quantityType('heat_transfer_coefficient'), thingType('inside')],
}

export const OUTSIDE = {
  ...thingParameter('outside', 'outside', 'heat-transfer coefficient outside, or convection(), absorbed()', {
    optional: true,
  }),
  type: [quantityType('heat_transfer_coefficient'), thingType('outside')],
}
