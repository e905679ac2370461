import { LRUCache } from 'lru-cache'
import { Problem } from '@/lib/errors'
import type { Arguments, FunctionSpec, Parameter, Surroundings, Thing, ThingKind, Value } from '@/lib/formula'
import { charge, hold, start, vent } from '@/lib/vessel'
import type { Draw, Heat, Path, Run, Stops, Supply } from '@/lib/vessel'
import { TEXT, thingType } from '../../types'
import { contentKey, thing } from '../content'
import { GAS, fluidOf, numberParameter, optionalNumber, optionalValue, thingParameter, valueOf } from './arguments'
import { shown } from './shown'
import { STATE_PARAMETERS, needsPair, pairOf } from './state-pair'
import type { RigVessel } from './vessels'

/** Runs by content: one serves every cell that asks for the same. A run with its trace is some tens of kilobytes. */
const runs = new LRUCache<string, Thing>({ max: 5_000 })

const optional = { optional: true }
export const FROM = thingParameter('from', 'run', 'the run it starts from: run@from')
export const THROUGH = thingParameter(
  'through',
  'path',
  'what the gas flows through; left out: the balance alone, with no time in it',
  optional,
)

export const STOPS: readonly Parameter[] = [
  numberParameter('until_p', 'pressure', 'stop at this pressure', optional),
  numberParameter('until_T', 'temperature', 'stop at this gas temperature', optional),
  numberParameter('until_m', 'mass', 'stop at this mass of gas', optional),
  numberParameter('until_x', 'fraction', 'of two phases: stop at this quality; 1: when no liquid is left', optional),
  numberParameter('until_flow', 'mass_flow', 'stop when the flow has fallen to this', optional),
  numberParameter('for', 'time', 'stop after this time', optional),
  {
    name: 'until',
    type: TEXT,
    optional: true,
    named: true,
    choices: ['level', 'settled'],
    help: 'level: when pressures are equal; settled: when nothing changes any more, temperatures neither',
  },
]

export function stopsOf(args: Arguments): Stops {
  return {
    until_p_Pa: optionalNumber(args, 'until_p'),
    until_T_K: optionalNumber(args, 'until_T'),
    until_m_kg: optionalNumber(args, 'until_m'),
    until_x: optionalNumber(args, 'until_x'),
    until_flow_kg_s: optionalNumber(args, 'until_flow'),
    for_s: optionalNumber(args, 'for'),
    ...(args.until === 'level' && { level: true }),
    ...(args.until === 'settled' && { settled: true }),
  }
}

type Operation = Omit<FunctionSpec, 'group' | 'result' | 'evaluate'> & {
  readonly run: (args: Arguments, surroundings: Surroundings) => Run
}

export function operation({ run, ...spec }: Operation): FunctionSpec {
  return {
    ...spec,
    group: 'Operations',
    result: thingType('run'),
    evaluate: (args, surroundings): Value =>
      operationThing(spec.name, 'run', args, surroundings, (key) => {
        const result = run(args, surroundings)
        if (result.supply)
          thing('supply', contentKey(`left in ${key}`, {}), 'what is left in the supply', result.supply)
        return { value: result, shown: runWords(result) }
      }),
  }
}

/** What an operation makes, by its content: worked out once. */
export function operationThing(
  name: string,
  kind: ThingKind,
  args: Arguments,
  surroundings: Surroundings,
  make: (key: string) => { readonly value: object; readonly shown: string },
): Thing {
  const key = contentKey(name, { ...args, around_T: surroundings.T_K, around_p: surroundings.p_Pa })
  let made = runs.get(key)
  if (!made) {
    const { value, shown: words } = make(key)
    made = thing(kind, key, words, value)
    runs.set(key, made)
  }
  return made
}

export function runWords(run: Run): string {
  const state = `${shown(run.p_Pa, 'pressure', 'bar', 1)}, ${shown(run.T_K, 'temperature', '°C', 1)}`
  return run.time_s ? `${state} in ${timeWords(run.time_s)}` : state
}

function timeWords(time_s: number): string {
  if (time_s < 120) return shown(time_s, 'time', 's', 1)
  return time_s < 7200 ? shown(time_s, 'time', 'min', 1) : shown(time_s, 'time', 'h', 1)
}

const HEATS: Readonly<Record<string, Heat>> = {
  none: 'adiabatic',
  shell: 'shell_at_gas_temperature',
  held: 'isothermal',
}
export const HEAT: Parameter = {
  name: 'heat',
  type: TEXT,
  optional: true,
  named: true,
  choices: Object.keys(HEATS),
  help: 'none; shell: the shell is at the gas’s temperature; held: the gas stays at its temperature. Left out: none without a path, by the vessel’s coefficients with one',
}
export const heatOf = (args: Arguments) => (args.heat === undefined ? undefined : HEATS[args.heat as string])

const DRAWS: readonly Draw[] = ['mixed', 'vapour', 'liquid']

export const operationFunctions: readonly FunctionSpec[] = [
  operation({
    name: 'start',
    parameters: [
      thingParameter('vessel', 'vessel', 'the vessel', { named: false }),
      { ...GAS, optional: true, help: 'the gas in it; left out: the one the vessel is for' },
      ...STATE_PARAMETERS,
      numberParameter('shell_T', 'temperature', 'temperature of the shell, where it is not that of the gas', optional),
    ],
    help: 'a vessel as received; p: 0 bar is an evacuated one',
    example: { formula: 'start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C).m', shown: '0.28966 kg' },
    run: (args, surroundings) => {
      const vessel = valueOf<RigVessel>(args, 'vessel')
      const fluid = args.gas === undefined ? vessel.gas : fluidOf(args)
      if (!fluid) throw new Problem('argument', 'start needs a gas: the vessel names none')
      const shellT_K = optionalNumber(args, 'shell_T')
      if (args.p === 0)
        return start(vessel, fluid, 'evacuated', optionalNumber(args, 'T') ?? shellT_K ?? surroundings.T_K)
      needsPair(Object.keys(args).filter((name) => args[name] !== undefined))
      const [pair, a, b] = pairOf(args)
      return start(vessel, fluid, { pair, a, b }, shellT_K)
    },
  }),
  operation({
    name: 'charge',
    parameters: [FROM, thingParameter('supply', 'supply', 'what it is charged from'), THROUGH, ...STOPS, HEAT],
    help: 'gas flows in from a supply until a stop is reached',
    example: {
      formula:
        'charge(from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), supply: header(nitrogen, p: 300 bar, T: 15 °C), until_p: 200 bar).T',
      shown: '106.73 °C',
    },
    run: (args) =>
      charge({
        from: valueOf<Run>(args, 'from'),
        supply: valueOf<Supply>(args, 'supply'),
        through: optionalValue<Path>(args, 'through'),
        stops: stopsOf(args),
        heat: heatOf(args),
      }),
  }),
  operation({
    name: 'vent',
    parameters: [
      FROM,
      THROUGH,
      ...STOPS,
      numberParameter('back', 'pressure', 'the pressure it goes to; left out: that of the surroundings', optional),
      {
        name: 'draw',
        type: TEXT,
        optional: true,
        named: true,
        default: '"mixed"',
        choices: DRAWS,
        help: 'of two phases: mixed, vapour or liquid',
      },
      HEAT,
    ],
    help: 'gas flows out until a stop is reached',
    example: {
      formula: 'vent(from: start(vessel(50 L), nitrogen, p: 200 bar, T: 18 °C), until_p: 20 bar).T',
      shown: '−126.54 °C',
    },
    run: (args, surroundings) =>
      vent({
        from: valueOf<Run>(args, 'from'),
        through: optionalValue<Path>(args, 'through'),
        back_Pa: optionalNumber(args, 'back') ?? surroundings.p_Pa,
        draw: args.draw as Draw,
        stops: stopsOf(args),
        heat: heatOf(args),
      }),
  }),
  operation({
    name: 'hold',
    parameters: [
      FROM,
      numberParameter('to_T', 'temperature', 'everything comes to this temperature, however long that takes', optional),
      ...STOPS.filter((stop) => !['until_m', 'until_flow', 'until_x'].includes(stop.name)),
    ],
    help: 'closed, while heat passes between gas, shell and surroundings',
    example: {
      formula: 'hold(from: start(vessel(50 L), nitrogen, p: 200 bar, T: 80 °C), to_T: 18 °C).p',
      shown: '155.66 bar',
    },
    run: (args) =>
      hold({ from: valueOf<Run>(args, 'from'), to_T_K: optionalNumber(args, 'to_T'), stops: stopsOf(args) }),
  }),
]
