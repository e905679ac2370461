import { Problem } from '@/lib/errors'
import type { Arguments, FunctionSpec, Surroundings, Value } from '@/lib/formula'
import { cascade, equalise, evacuate, flowThrough, serve } from '@/lib/vessel'
import type { Cascade, Path, Run, Supply } from '@/lib/vessel'
import { quantityType, thingType } from '../../types'
import { contentKey, thing, thingOf } from '../content'
import {
  GAS,
  fluidOf,
  numberOf,
  numberParameter,
  optionalNumber,
  optionalValue,
  thingParameter,
  valueOf,
  valuesOf,
} from './arguments'
import { FROM, HEAT, STOPS, THROUGH, heatOf, operation, operationThing, runWords, stopsOf } from './operations'
import { STATE_PARAMETERS, needsPair, pairOf } from './state-pair'

/** Both vessels of an equalisation. */
export interface Pair {
  readonly a: Run
  readonly b: Run
}

const optional = { optional: true }

/** Several runs made together: the run things that their fields hand out are made here, so that they have keys. */
function together<T extends object>(
  name: string,
  kind: string,
  args: Arguments,
  surroundings: Surroundings,
  make: () => { value: T; runs: Readonly<Record<string, Run>>; supplies?: readonly Supply[]; shown: string },
): Value {
  return operationThing(name, kind, args, surroundings, (key) => {
    const { value, runs, supplies = [], shown } = make()
    for (const [part, run] of Object.entries(runs))
      thing('run', contentKey(`${part} of ${key}`, {}), runWords(run), run)
    supplies.forEach((supply, i) =>
      thing('supply', contentKey(`supply ${i} of ${key}`, {}), 'what is left in a supply', supply),
    )
    return { value, shown }
  })
}

export const transferFunctions: readonly FunctionSpec[] = [
  {
    name: 'equalise',
    group: 'Operations',
    parameters: [
      thingParameter('a', 'run', 'one vessel'),
      thingParameter('b', 'run', 'the other'),
      THROUGH,
      ...STOPS,
      HEAT,
    ],
    result: thingType('pair'),
    help: 'two vessels are opened to each other; stops refer to the first',
    example: {
      formula:
        'equalise(a: start(vessel(50 L), nitrogen, p: 200 bar, T: 18 °C), b: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C)).p',
      shown: '87.938 bar',
    },
    evaluate: (args, surroundings) =>
      together('equalise', 'pair', args, surroundings, () => {
        const value = equalise({
          a: valueOf<Run>(args, 'a'),
          b: valueOf<Run>(args, 'b'),
          through: optionalValue<Path>(args, 'through'),
          stops: stopsOf(args),
          heat: heatOf(args),
        })
        return { value, runs: { ...value }, shown: `${runWords(value.a)}\n${runWords(value.b)}` }
      }),
  },
  operation({
    name: 'evacuate',
    parameters: [FROM, thingParameter('through', 'path', 'a pump, or a path to a vacuum'), ...STOPS, HEAT],
    help: 'a vessel is drawn empty',
    example: {
      formula:
        'evacuate(from: start(vessel(50 L), ideal(air), p: 1 bar, T: 18 °C), through: pump(speed: 8 [m^3/h], lowest_p: 2 mbar), until_p: 10 mbar).time',
      shown: '77.566 s',
    },
    run: (args) =>
      evacuate({
        from: valueOf<Run>(args, 'from'),
        through: valueOf<Path>(args, 'through'),
        stops: stopsOf(args),
        heat: heatOf(args),
      }),
  }),
  {
    name: 'cascade',
    group: 'Operations',
    parameters: [
      FROM,
      THROUGH,
      numberParameter(
        'switch_flow',
        'mass_flow',
        'goes on to the next when the flow has fallen to this; left out: when pressures are equal',
        optional,
      ),
      ...STOPS.filter((stop) => ['until_p', 'until_T', 'until_m'].includes(stop.name)),
      HEAT,
      {
        name: 'supply',
        type: thingType('supply'),
        repeats: true,
        help: 'a supply, in the order in which they are opened',
      },
    ],
    result: thingType('cascade'),
    help: 'gas flows in from one supply after another',
    example: {
      formula:
        'cascade(from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), bank(nitrogen, count: 4, volume: 50 L, p: 120 bar, T: 15 °C), bank(nitrogen, count: 4, volume: 50 L, p: 300 bar, T: 15 °C), until_p: 200 bar).T',
      shown: '106.71 °C',
    },
    evaluate: (args, surroundings) =>
      together<Cascade>('cascade', 'cascade', args, surroundings, () => {
        const { until_p_Pa, until_T_K, until_m_kg } = stopsOf(args)
        const value = cascade({
          from: valueOf<Run>(args, 'from'),
          supplies: valuesOf<Supply>(args, 'supply'),
          through: optionalValue<Path>(args, 'through'),
          switchFlow_kg_s: optionalNumber(args, 'switch_flow'),
          stops: { until_p_Pa, until_T_K, until_m_kg },
          heat: heatOf(args),
        })
        return { value, runs: { whole: value.run }, supplies: value.supplies, shown: runWords(value.run) }
      }),
  },
  {
    name: 'left_in',
    group: 'Operations',
    parameters: [
      thingParameter('cascade', 'cascade', 'a cascade', { named: false }),
      numberParameter('number', 'dimensionless', 'which of its supplies: 1 for the first', { named: false }),
    ],
    result: thingType('supply'),
    help: 'what is left in a supply of a cascade',
    example: {
      formula:
        'left_in(cascade(from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), bank(nitrogen, count: 4, volume: 50 L, p: 120 bar, T: 15 °C), bank(nitrogen, count: 4, volume: 50 L, p: 300 bar, T: 15 °C), until_p: 200 bar), 1).p',
      shown: '93.859 bar',
    },
    evaluate: (args) => {
      const { supplies } = valueOf<Cascade>(args, 'cascade')
      const supply = supplies[numberOf(args, 'number') - 1]
      if (!supply) throw new Problem('range', `the cascade has the supplies 1 to ${supplies.length}`)
      return thingOf(supply)
    },
  },
  {
    name: 'vessels_filled',
    group: 'Operations',
    parameters: [
      thingParameter('bank', 'supply', 'a bank'),
      thingParameter('from', 'run', 'each of the vessels as it is brought'),
      THROUGH,
      numberParameter('until_p', 'pressure', 'the pressure that each is to be filled to'),
      HEAT,
    ],
    result: quantityType('dimensionless'),
    help: 'how many vessels a bank fills to a pressure, one after another',
    example: {
      formula:
        'vessels_filled(bank: bank(nitrogen, count: 12, volume: 50 L, p: 300 bar, T: 15 °C), from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), until_p: 200 bar)',
      shown: '3',
    },
    evaluate: (args) => {
      const bank = valueOf<Supply>(args, 'bank')
      if (bank.kind !== 'bank')
        throw new Problem('argument', 'only a bank runs down: any other supply fills without end')
      return serve({
        bank,
        from: valueOf<Run>(args, 'from'),
        through: optionalValue<Path>(args, 'through'),
        until_p_Pa: numberOf(args, 'until_p'),
        heat: heatOf(args),
      }).count
    },
  },
  {
    name: 'flow_through',
    group: 'Paths',
    parameters: [
      thingParameter('path', 'path', 'what the gas flows through', { named: false }),
      GAS,
      ...STATE_PARAMETERS,
      numberParameter('back', 'pressure', 'the pressure it flows to; left out: that of the surroundings', optional),
    ],
    together: needsPair,
    result: quantityType('mass_flow'),
    help: 'mass flow of a path at a moment, from a gas at rest',
    example: {
      formula: 'flow_through(orifice(diameter: 2.5 mm), nitrogen, p: 200 bar, T: 15 °C, back: 1 bar)',
      shown: '205.52 g/s',
    },
    evaluate: (args, surroundings) => {
      const fluid = fluidOf(args)
      return flowThrough(
        valueOf<Path>(args, 'path'),
        fluid,
        fluid.state(...pairOf(args)),
        optionalNumber(args, 'back') ?? surroundings.p_Pa,
      )
    },
  },
]
