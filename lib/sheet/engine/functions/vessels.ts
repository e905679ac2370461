import type { FunctionSpec, Surroundings } from '@/lib/formula'
import { Problem } from '@/lib/errors'
import type { Fluid } from '@/lib/fluids'
import type { Limits, Shell, Vessel } from '@/lib/vessel'
import {
  constructor,
  fluidOf,
  numberParameter,
  optionalNumber,
  optionalValue,
  positive,
  thingParameter,
  GAS,
} from './arguments'
import { shown } from './shown'
import { INSIDE, OUTSIDE, insideOf, outsideOf } from './shells'

/** A vessel of the sheet: the solver's, with the gas it is meant for. */
export interface RigVessel extends Vessel {
  readonly gas?: Fluid
}

const optional = { optional: true }

export const vesselFunctions: readonly FunctionSpec[] = [
  constructor<RigVessel>({
    name: 'vessel',
    group: 'Rig',
    makes: 'vessel',
    parameters: [
      numberParameter('volume', 'volume', 'water volume', { named: false }),
      thingParameter('shell', 'shell', 'lumped(…) or layers(…); left out: the gas exchanges no heat', optional),
      INSIDE,
      OUTSIDE,
      numberParameter('ambient', 'temperature', 'temperature around it; left out: that of the surroundings', optional),
      numberParameter('p_high', 'pressure', 'highest pressure allowed', optional),
      numberParameter('shell_high', 'temperature', 'highest shell temperature allowed', optional),
      numberParameter('shell_low', 'temperature', 'lowest shell temperature allowed', optional),
      { ...GAS, named: true, optional: true, help: 'the gas it holds' },
    ],
    help: 'a rigid vessel, with its shell and its limits',
    example: { formula: 'vessel(volume: 50 L, p_high: 250 bar)', shown: '50 L, no shell\nto 250 bar' },
    make: (args, surroundings) => {
      const limits: Limits = {
        ...(args.p_high !== undefined && { p_high_Pa: optionalNumber(args, 'p_high') }),
        ...(args.shell_high !== undefined && { shell_high_K: optionalNumber(args, 'shell_high') }),
        ...(args.shell_low !== undefined && { shell_low_K: optionalNumber(args, 'shell_low') }),
      }
      if (
        limits.shell_low_K !== undefined &&
        limits.shell_high_K !== undefined &&
        limits.shell_low_K >= limits.shell_high_K
      ) {
        throw new Problem('range', 'the lowest shell temperature has to lie below the highest')
      }
      return {
        volume_m3: positive(args, 'volume', 'the volume of a vessel'),
        shell: optionalValue<Shell>(args, 'shell') ?? { kind: 'none' },
        inside: insideOf(args),
        outside: outsideOf(args),
        ambient_T_K: optionalNumber(args, 'ambient') ?? surroundings.T_K,
        limits,
        ...(args.gas !== undefined && { gas: fluidOf(args) }),
      }
    },
    shown: (vessel, args) =>
      [`${shown(args.volume, 'volume', 'L')}, ${shellWords(vessel.shell)}`, limitWords(vessel.limits ?? {})]
        .filter(Boolean)
        .join('\n'),
  }),
  constructor<Surroundings>({
    name: 'surroundings',
    group: 'Rig',
    makes: 'surroundings',
    parameters: [
      numberParameter('T', 'temperature', 'temperature'),
      {
        ...numberParameter('p', 'pressure', 'absolute pressure: gauge readings count from it'),
        default: '1.01325 bar',
        optional: true,
      },
    ],
    help: 'what is around the rig: gauge pressures and ambient temperature count from it',
    example: { formula: 'surroundings(T: 18 °C, p: 1.013 bar)', shown: '18 °C, 1.013 bar' },
    make: (args) => ({
      T_K: positive(args, 'T', 'the absolute temperature'),
      p_Pa: positive(args, 'p', 'the pressure of the surroundings'),
    }),
    shown: ({ T_K, p_Pa }) => `${shown(T_K, 'temperature', '°C')}, ${shown(p_Pa, 'pressure', 'bar')}`,
  }),
]

function shellWords(shell: Shell): string {
  switch (shell.kind) {
    case 'none':
      return 'no shell'
    case 'lumped':
      return `shell ${shown(shell.mass_kg, 'mass', 'kg')}`
    case 'layers':
      return `shell of ${shell.layers.length} ${shell.layers.length === 1 ? 'layer' : 'layers'}`
  }
}

function limitWords({ p_high_Pa, shell_low_K, shell_high_K }: Limits): string {
  const celsius = (T_K: number) => shown(T_K, 'temperature', '°C')
  const pressure = p_high_Pa === undefined ? '' : `to ${shown(p_high_Pa, 'pressure', 'bar')}`
  const shell =
    shell_low_K !== undefined && shell_high_K !== undefined
      ? `${celsius(shell_low_K)} to ${celsius(shell_high_K)}`
      : shell_high_K !== undefined
        ? `up to ${celsius(shell_high_K)}`
        : shell_low_K !== undefined
          ? `down to ${celsius(shell_low_K)}`
          : ''
  return [pressure, shell].filter(Boolean).join(', ')
}
