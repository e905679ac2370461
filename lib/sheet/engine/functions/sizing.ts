import { Problem } from '@/lib/errors'
import type { Arguments, FunctionSpec, Parameter, Surroundings, Value } from '@/lib/formula'
import { charge, sizePath, vent } from '@/lib/vessel'
import type { Path, Run, Supply, Target } from '@/lib/vessel'
import { thingType } from '../../types'
import { numberOf, numberParameter, optionalNumber, optionalValue, thingParameter, valueOf } from './arguments'
import { FROM, HEAT, STOPS, heatOf, operationThing, stopsOf } from './operations'
import { pathWords } from './paths'

const optional = { optional: true }

/** What a path can be sized for, by the field of a run that is to come out so. */
const TARGETS = {
  time: ['time', 'time_s', 'the time it is to take'],
  T_peak: ['temperature', 'T_peak_K', 'the gas temperature it may reach'],
  T_low: ['temperature', 'T_low_K', 'the gas temperature it may fall to'],
  shell_peak: ['temperature', 'shell_peak_K', 'the shell temperature it may reach'],
  shell_low: ['temperature', 'shell_low_K', 'the shell temperature it may fall to'],
  flow_peak: ['mass_flow', 'flow_peak_kg_s', 'the greatest flow'],
} as const
type TargetName = keyof typeof TARGETS
const isTarget = (name: string): name is TargetName => name in TARGETS

const COMMON: readonly Parameter[] = [
  FROM,
  thingParameter('supply', 'supply', 'what it is charged from; left out: it is vented', optional),
  numberParameter(
    'back',
    'pressure',
    'where it is vented, the pressure it goes to; left out: that of the surroundings',
    optional,
  ),
  ...STOPS,
  HEAT,
  ...Object.entries(TARGETS).map(([name, [quantity, , help]]) => numberParameter(name, quantity, help, optional)),
]

function oneTarget(given: readonly string[]) {
  if (given.filter(isTarget).length !== 1) {
    throw new Problem('argument', `it is sized for one of these: ${Object.keys(TARGETS).join(', ')}`)
  }
}

function targetOf(args: Arguments): Target {
  const name = Object.keys(args).find((key) => isTarget(key) && args[key] !== undefined) as TargetName
  return { [TARGETS[name][1]]: numberOf(args, name) } as unknown as Target
}

function sized(name: string, args: Arguments, surroundings: Surroundings, path: Parameters<typeof sizePath>[0]): Value {
  const from = valueOf<Run>(args, 'from')
  const supply = optionalValue<Supply>(args, 'supply')
  const common = { from, stops: stopsOf(args), heat: heatOf(args) }
  const operation = (through: Path) =>
    supply
      ? charge({ ...common, supply, through })
      : vent({ ...common, through, back_Pa: optionalNumber(args, 'back') ?? surroundings.p_Pa })
  return operationThing(name, 'path', args, surroundings, () => {
    const found = sizePath(path, operation, targetOf(args)).path
    return { value: found, shown: pathWords(found) }
  })
}

const EXAMPLE =
  'from: start(vessel(50 L), nitrogen, p: 5 bar, T: 18 °C), supply: header(nitrogen, p: 300 bar, T: 15 °C), until_p: 200 bar, time: 2 min'

export const sizingFunctions: readonly FunctionSpec[] = [
  {
    name: 'orifice_for',
    group: 'Sizing',
    parameters: [
      ...COMMON,
      numberParameter('cd', 'dimensionless', 'discharge coefficient', { ...optional, default: '0.84' }),
    ],
    together: oneTarget,
    result: thingType('path'),
    help: 'the orifice through which a charge or a vent comes out as wished',
    example: { formula: `orifice_for(${EXAMPLE}).diameter`, shown: '1.1525 mm' },
    evaluate: (args, surroundings) =>
      sized('orifice_for', args, surroundings, { kind: 'orifice', dischargeCoefficient: numberOf(args, 'cd') }),
  },
  {
    name: 'valve_for',
    group: 'Sizing',
    parameters: [
      ...COMMON,
      numberParameter('xt', 'dimensionless', 'pressure drop ratio at choked flow', { ...optional, default: '0.72' }),
    ],
    together: oneTarget,
    result: thingType('path'),
    help: 'the valve through which a charge or a vent comes out as wished',
    example: { formula: `valve_for(${EXAMPLE}).kv`, shown: '0.044367 m³/h' },
    evaluate: (args, surroundings) =>
      sized('valve_for', args, surroundings, { kind: 'valve', xT: numberOf(args, 'xt') }),
  },
]
