import { Problem } from '@/lib/errors'
import { findFluid } from '@/lib/fluids'
import type { FunctionSpec } from '@/lib/formula'
import { start } from '@/lib/vessel'
import type { Supply, Vessel } from '@/lib/vessel'
import {
  GAS,
  constructor,
  fluidOf,
  numberOf,
  numberParameter,
  optionalNumber,
  optionalValue,
  positive,
  thingParameter,
} from './arguments'
import { shown } from './shown'

const AT_PRESSURE = numberParameter('p', 'pressure', 'absolute pressure')
const AT_TEMPERATURE = numberParameter('T', 'temperature', 'temperature')

export const supplyFunctions: readonly FunctionSpec[] = [
  constructor<Supply>({
    name: 'header',
    group: 'Supplies',
    makes: 'supply',
    parameters: [GAS, AT_PRESSURE, AT_TEMPERATURE],
    help: 'a supply at a steady pressure and temperature, whatever is drawn',
    example: { formula: 'header(nitrogen, p: 300 bar, T: 15 °C)', shown: 'nitrogen, 300 bar at 15 °C\nsteady' },
    make: (args) => {
      const fluid = fluidOf(args)
      // asked now, so that a header outside the fluid's range says so on its own card
      fluid.state('pT', positive(args, 'p', 'the pressure of a header'), numberOf(args, 'T'))
      return { kind: 'header', fluid, p_Pa: numberOf(args, 'p'), T_K: numberOf(args, 'T') }
    },
    shown: (_, args) =>
      `${fluidOf(args).name}, ${shown(args.p, 'pressure', 'bar')} at ${shown(args.T, 'temperature', '°C')}\nsteady`,
  }),
  constructor<Supply>({
    name: 'bank',
    group: 'Supplies',
    makes: 'supply',
    parameters: [
      GAS,
      numberParameter('count', 'dimensionless', 'number of vessels'),
      numberParameter('volume', 'volume', 'volume of each', { optional: true }),
      thingParameter('vessel', 'vessel', 'each of them, instead of a volume: with its shell', { optional: true }),
      AT_PRESSURE,
      AT_TEMPERATURE,
    ],
    together: (given) => {
      if (given.includes('volume') === given.includes('vessel'))
        throw new Problem('argument', 'a bank needs either the volume of its vessels or a vessel')
    },
    help: 'equal vessels side by side, which run down as they are drawn from',
    example: {
      formula: 'bank(nitrogen, count: 12, volume: 80 L, p: 280 bar, T: 15 °C)',
      shown: '12 × 80 L of nitrogen at 280 bar, 15 °C\nruns down',
    },
    make: (args, surroundings) => {
      const count = positive(args, 'count', 'the number of vessels')
      if (!Number.isInteger(count)) throw new Problem('range', `a bank has a whole number of vessels, not ${count}`)
      const vessel: Vessel = optionalValue<Vessel>(args, 'vessel') ?? {
        volume_m3: positive(args, 'volume', 'the volume of a vessel'),
        shell: { kind: 'none' },
        ambient_T_K: surroundings.T_K,
      }
      const contents = start(vessel, fluidOf(args), {
        pair: 'pT',
        a: positive(args, 'p', 'the pressure of a bank'),
        b: numberOf(args, 'T'),
      })
      return { kind: 'bank', count, contents }
    },
    shown: (supply, args) => {
      const volume = supply.kind === 'bank' ? shown(supply.contents.vessel.volume_m3, 'volume', 'L') : ''
      return `${args.count} × ${volume} of ${fluidOf(args).name} at ${shown(args.p, 'pressure', 'bar')}, ${shown(args.T, 'temperature', '°C')}\nruns down`
    },
  }),
  constructor<Supply>({
    name: 'room_air',
    group: 'Supplies',
    makes: 'supply',
    parameters: [
      { ...AT_PRESSURE, optional: true, help: 'absolute pressure; left out: that of the surroundings' },
      { ...AT_TEMPERATURE, optional: true, help: 'temperature; left out: that of the surroundings' },
    ],
    help: 'the air around',
    example: { formula: 'room_air(p: 1.013 bar, T: 18 °C)', shown: 'air, 1.013 bar at 18 °C' },
    make: (args, surroundings) => ({
      kind: 'room_air',
      fluid: findFluid('air')!,
      p_Pa: optionalNumber(args, 'p') ?? surroundings.p_Pa,
      T_K: optionalNumber(args, 'T') ?? surroundings.T_K,
    }),
    shown: (supply) =>
      supply.kind === 'room_air'
        ? `air, ${shown(supply.p_Pa, 'pressure', 'bar')} at ${shown(supply.T_K, 'temperature', '°C')}`
        : '',
  }),
  constructor<Supply>({
    name: 'machine',
    group: 'Supplies',
    makes: 'supply',
    parameters: [
      GAS,
      numberParameter('rate', 'mass_flow', 'mass flow delivered'),
      { ...AT_TEMPERATURE, help: 'delivery temperature' },
      numberParameter('p_high', 'pressure', 'highest delivery pressure'),
    ],
    help: 'a compressor: a steady flow, delivered at a temperature, up to a highest pressure',
    example: {
      formula: 'machine(air, rate: 12 [kg/h], T: 45 °C, p_high: 330 bar)',
      shown: 'air, 12 kg/h at 45 °C\nto 330 bar',
    },
    make: (args) => ({
      kind: 'machine',
      fluid: fluidOf(args),
      rate_kg_s: positive(args, 'rate', 'the flow of a machine'),
      T_K: numberOf(args, 'T'),
      p_high_Pa: positive(args, 'p_high', 'the highest pressure of a machine'),
    }),
    shown: (_, args) =>
      `${fluidOf(args).name}, ${shown(args.rate, 'mass_flow', 'kg/h')} at ${shown(args.T, 'temperature', '°C')}\nto ${shown(args.p_high, 'pressure', 'bar')}`,
  }),
]
