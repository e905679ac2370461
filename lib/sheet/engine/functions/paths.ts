import { Problem } from '@/lib/errors'
import type { FunctionSpec } from '@/lib/formula'
import { KV_PER_CV } from '@/lib/vessel'
import type { Path } from '@/lib/vessel'
import { thingType } from '../../types'
import { constructor, numberOf, numberParameter, optionalNumber, positive, valuesOf } from './arguments'
import { shown } from './shown'

const between0and1 = (value: number, words: string) => {
  if (!(value > 0 && value <= 1)) throw new Problem('range', `${words} lies above 0 and not above 1`)
  return value
}

/** Kv in m³/h as the standard counts it: the table's quantity is SI, m³/s at a pressure drop of 1 bar of water. */
export const M3_S_PER_M3_H = 1 / 3600

/** A path that was found by sizing, in few words. */
export function pathWords(path: Path): string {
  if (path.kind === 'orifice') return `${shown(path.diameter_m, 'length', 'mm')}, Cd ${path.dischargeCoefficient}`
  if (path.kind === 'valve') return `Kv ${Number(path.Kv_m3_h.toPrecision(4))} m³/h, xT ${path.xT}`
  return path.kind
}

export const pathFunctions: readonly FunctionSpec[] = [
  constructor<Path>({
    name: 'orifice',
    group: 'Paths',
    makes: 'path',
    parameters: [
      numberParameter('diameter', 'length', 'bore'),
      { ...numberParameter('cd', 'dimensionless', 'discharge coefficient'), optional: true, default: '0.84' },
    ],
    help: 'an orifice: isentropic flow of the real fluid, choked at its maximum',
    example: { formula: 'orifice(diameter: 2.5 mm, cd: 0.84)', shown: '2.5 mm, Cd 0.84' },
    make: (args) => ({
      kind: 'orifice',
      diameter_m: positive(args, 'diameter', 'the bore of an orifice'),
      dischargeCoefficient: between0and1(numberOf(args, 'cd'), 'a discharge coefficient'),
    }),
    shown: (_, args) => `${shown(args.diameter, 'length', 'mm')}, Cd ${args.cd}`,
  }),
  constructor<Path>({
    name: 'valve',
    group: 'Paths',
    makes: 'path',
    parameters: [
      numberParameter('kv', 'flow_coefficient', 'flow coefficient Kv', { optional: true }),
      numberParameter('cv', 'dimensionless', 'flow coefficient Cv, instead of Kv', { optional: true }),
      {
        ...numberParameter('xt', 'dimensionless', 'pressure drop ratio at choked flow'),
        optional: true,
        default: '0.72',
      },
    ],
    together: (given) => {
      if (given.includes('kv') === given.includes('cv')) throw new Problem('argument', 'a valve needs either kv or cv')
    },
    help: 'a valve by its flow coefficient',
    source: 'IEC 60534-2-1, compressible fluids',
    example: { formula: 'valve(kv: 0.035 [m^3/h], xt: 0.72)', shown: 'Kv 0.035 m³/h, xT 0.72' },
    make: (args) => {
      const cv = optionalNumber(args, 'cv')
      const Kv_m3_h =
        cv === undefined ? positive(args, 'kv', 'Kv') / M3_S_PER_M3_H : positive(args, 'cv', 'Cv') * KV_PER_CV
      return { kind: 'valve', Kv_m3_h, xT: between0and1(numberOf(args, 'xt'), 'xT') }
    },
    shown: (path, args) =>
      path.kind === 'valve' ? `Kv ${Number(path.Kv_m3_h.toPrecision(4))} m³/h, xT ${args.xt}` : '',
  }),
  constructor<Path>({
    name: 'sonic',
    group: 'Paths',
    makes: 'path',
    parameters: [
      numberParameter('c', 'sonic_conductance', 'sonic conductance C'),
      { ...numberParameter('b', 'dimensionless', 'critical pressure ratio b'), optional: true, default: '0.5' },
      { ...numberParameter('m', 'dimensionless', 'subsonic index m'), optional: true, default: '0.5' },
    ],
    help: 'a pneumatic component by its sonic conductance',
    source: 'ISO 6358-1',
    example: { formula: 'sonic(c: 2 [L/(s bar)], b: 0.3, m: 0.5)', shown: 'C 2 L/(s bar), b 0.3' },
    make: (args) => ({
      kind: 'sonic',
      C_m3_sPa: positive(args, 'c', 'the sonic conductance'),
      b: between0and1(numberOf(args, 'b'), 'the critical pressure ratio'),
      m: between0and1(numberOf(args, 'm'), 'the subsonic index'),
    }),
    shown: (_, args) => `C ${shown(args.c, 'sonic_conductance', 'L/(s bar)')}, b ${args.b}`,
  }),
  constructor<Path>({
    name: 'fixed_flow',
    group: 'Paths',
    makes: 'path',
    parameters: [numberParameter('rate', 'mass_flow', 'mass flow')],
    help: 'a steady mass flow',
    example: { formula: 'fixed_flow(rate: 5 [g/s])', shown: '5 g/s' },
    make: (args) => ({ kind: 'fixed_flow', rate_kg_s: positive(args, 'rate', 'the flow') }),
    shown: (_, args) => shown(args.rate, 'mass_flow', 'g/s'),
  }),
  constructor<Path>({
    name: 'ramp',
    group: 'Paths',
    makes: 'path',
    parameters: [numberParameter('rate', 'pressure_rate', 'change of pressure in a time')],
    help: 'the vessel’s pressure changes at a steady rate, as a controller holds it',
    example: { formula: 'ramp(rate: 20 [bar/min])', shown: '20 bar/min' },
    make: (args) => ({ kind: 'ramp', rate_Pa_s: positive(args, 'rate', 'the rate') }),
    shown: (_, args) => shown(args.rate, 'pressure_rate', 'bar/min'),
  }),
  constructor<Path>({
    name: 'pump',
    group: 'Paths',
    makes: 'path',
    parameters: [
      numberParameter('speed', 'volume_flow', 'pumping speed: volume swept at the inlet'),
      numberParameter('lowest_p', 'pressure', 'lowest pressure, towards which the speed falls to nothing'),
    ],
    help: 'a vacuum pump',
    example: { formula: 'pump(speed: 8 [m^3/h], lowest_p: 2 mbar)', shown: '8 m³/h to 2 mbar' },
    make: (args) => ({
      kind: 'pump',
      speed_m3_s: positive(args, 'speed', 'the pumping speed'),
      p_low_Pa: positive(args, 'lowest_p', 'the lowest pressure of a pump'),
    }),
    shown: (_, args) => `${shown(args.speed, 'volume_flow', 'm³/h')} to ${shown(args.lowest_p, 'pressure', 'mbar')}`,
  }),
  constructor<Path>({
    name: 'series',
    group: 'Paths',
    makes: 'path',
    parameters: [
      { name: 'path', type: thingType('path'), repeats: true, help: 'a path; the flow passes them in this order' },
    ],
    help: 'paths one behind the other',
    example: { formula: 'series(valve(kv: 0.035 [m^3/h]), orifice(diameter: 2.5 mm))', shown: '2 paths in series' },
    make: (args) => ({ kind: 'series', paths: valuesOf<Path>(args, 'path') }),
    shown: (path) => (path.kind === 'series' ? `${path.paths.length} paths in series` : ''),
  }),
]
