import { Problem } from '@/lib/errors'
import type { FieldSpec, Surroundings, ThingSpec, Type, Value } from '@/lib/formula'
import type { Fluid } from '@/lib/fluids'
import type { Cascade, Path, Run, Supply } from '@/lib/vessel'
import { TEXT, quantityType, thingType } from '../types'
import { thingOf } from './content'
import { gasThing } from './functions/gases'
import { M3_S_PER_M3_H } from './functions/paths'
import type { Pair } from './functions/transfers'
import type { RigVessel } from './functions/vessels'

/** A number that a thing may not have: said in words where it is asked for. */
function present(value: number | undefined | null, words: string): number {
  if (value === undefined || value === null || !Number.isFinite(value)) throw new Problem('state', words)
  return value
}

function needed<T>(value: T | undefined, words: string): T {
  if (value === undefined) throw new Problem('state', `there is no ${words}`)
  return value
}

/** The table is read by kind of thing, so a getter meets only values of its own kind. */
const field = <T>(name: string, type: Type, help: string, of: (value: T) => Value): FieldSpec => ({
  name,
  type,
  help,
  get: of as (value: never) => Value,
})

const number = <T>(
  name: string,
  quantity: string,
  help: string,
  of: (value: T) => number | undefined | null,
): FieldSpec => field<T>(name, quantityType(quantity), help, (value) => present(of(value), `there is no ${help} here`))

const RUN_FIELDS: readonly FieldSpec[] = [
  number<Run>('p', 'pressure', 'pressure at the end', (run) => run.p_Pa),
  number<Run>('T', 'temperature', 'gas temperature at the end', (run) => run.T_K),
  number<Run>('m', 'mass', 'mass of gas at the end', (run) => run.m_kg),
  number<Run>('rho', 'density', 'density at the end', (run) => run.rho_kg_m3),
  number<Run>('u', 'specific_energy', 'specific internal energy at the end', (run) => run.u_J_kg),
  number<Run>('h', 'specific_energy', 'specific enthalpy at the end', (run) => run.h_J_kg),
  number<Run>('s', 'specific_entropy', 'specific entropy at the end', (run) => run.s_J_kgK),
  number<Run>('x', 'fraction', 'quality at the end', (run) => run.x),
  field<Run>('phase', TEXT, 'phase at the end', (run) => run.phase),
  number<Run>('shell_T', 'temperature', 'mean shell temperature at the end', (run) => run.shell.mean_K),
  number<Run>(
    'shell_inner',
    'temperature',
    'temperature of the shell’s inner face at the end',
    (run) => run.shell.inner_K,
  ),
  number<Run>(
    'shell_outer',
    'temperature',
    'temperature of the shell’s outer face at the end',
    (run) => run.shell.outer_K,
  ),
  number<Run>('T_peak', 'temperature', 'highest gas temperature', (run) => run.T_peak_K),
  number<Run>('T_low', 'temperature', 'lowest gas temperature', (run) => run.T_low_K),
  number<Run>('p_peak', 'pressure', 'highest pressure', (run) => run.p_peak_Pa),
  number<Run>('p_low', 'pressure', 'lowest pressure', (run) => run.p_low_Pa),
  number<Run>('shell_peak', 'temperature', 'highest shell temperature', (run) => run.shell_peak_K),
  number<Run>('shell_low', 'temperature', 'lowest shell temperature', (run) => run.shell_low_K),
  number<Run>('flow_peak', 'mass_flow', 'greatest flow', (run) => run.flow_peak_kg_s),
  number<Run>('moved', 'mass', 'mass that came in; negative where it went out', (run) => run.moved_kg),
  number<Run>('heat', 'energy', 'heat that the gas took up from its shell', (run) => run.heat_J),
  field<Run>('time', quantityType('time'), 'time it takes', (run) =>
    present(run.time_s, 'this run is a balance alone: it has no time in it'),
  ),
  field<Run>('stopped_by', TEXT, 'what stopped it', (run) => run.stoppedBy),
  number<Run>('balance', 'dimensionless', 'the larger of the relative residuals of energy and mass', (run) =>
    Math.max(run.balance.energy, run.balance.mass),
  ),
  field<Run>('vessel', thingType('vessel'), 'the vessel', (run) => thingOf(run.vessel)),
  field<Run>('gas', thingType('gas'), 'the gas', (run) => gasThing(run.fluid)),
  field<Run>('supply', thingType('supply'), 'what is left in a supply that ran down', (run) =>
    thingOf(needed(run.supply, 'supply that ran down')),
  ),
]

const VESSEL_FIELDS: readonly FieldSpec[] = [
  number<RigVessel>('volume', 'volume', 'volume', (vessel) => vessel.volume_m3),
  number<RigVessel>('ambient', 'temperature', 'ambient temperature', (vessel) => vessel.ambient_T_K),
  number<RigVessel>('p_high', 'pressure', 'highest pressure set', (vessel) => vessel.limits?.p_high_Pa),
  number<RigVessel>(
    'shell_high',
    'temperature',
    'highest shell temperature set',
    (vessel) => vessel.limits?.shell_high_K,
  ),
  number<RigVessel>('shell_low', 'temperature', 'lowest shell temperature set', (vessel) => vessel.limits?.shell_low_K),
  field<RigVessel>('gas', thingType('gas'), 'the gas it is for', (vessel) =>
    gasThing(needed(vessel.gas, 'gas set for this vessel')),
  ),
]

const SUPPLY_FIELDS: readonly FieldSpec[] = [
  number<Supply>('p', 'pressure', 'pressure', (supply) => {
    switch (supply.kind) {
      case 'bank':
        return supply.contents.p_Pa
      case 'machine':
        return supply.p_high_Pa
      default:
        return supply.p_Pa
    }
  }),
  number<Supply>('T', 'temperature', 'temperature', (supply) =>
    supply.kind === 'bank' ? supply.contents.T_K : supply.T_K,
  ),
  number<Supply>('m', 'mass', 'mass left', (supply) =>
    supply.kind === 'bank' ? supply.count * supply.contents.m_kg : null,
  ),
  field<Supply>('gas', thingType('gas'), 'the gas', (supply) =>
    gasThing(supply.kind === 'bank' ? supply.contents.fluid : supply.fluid),
  ),
]

const PATH_FIELDS: readonly FieldSpec[] = [
  number<Path>('diameter', 'length', 'bore', (path) => (path.kind === 'orifice' ? path.diameter_m : null)),
  number<Path>('kv', 'flow_coefficient', 'flow coefficient Kv', (path) =>
    path.kind === 'valve' ? path.Kv_m3_h * M3_S_PER_M3_H : null,
  ),
]

const PAIR_FIELDS: readonly FieldSpec[] = [
  number<Pair>('p', 'pressure', 'pressure at the end, of the first', ({ a }) => a.p_Pa),
  field<Pair>('a', thingType('run'), 'the first vessel', ({ a }) => thingOf(a)),
  field<Pair>('b', thingType('run'), 'the second vessel', ({ b }) => thingOf(b)),
  field<Pair>('time', quantityType('time'), 'time it takes', ({ a }) =>
    present(a.time_s, 'this is a balance alone: it has no time in it'),
  ),
  field<Pair>('stopped_by', TEXT, 'what stopped it', ({ a }) => a.stoppedBy),
]

const CASCADE_FIELDS: readonly FieldSpec[] = [
  field<Cascade>('run', thingType('run'), 'the whole as one run', ({ run }) => thingOf(run)),
  number<Cascade>('p', 'pressure', 'pressure at the end', ({ run }) => run.p_Pa),
  number<Cascade>('T', 'temperature', 'gas temperature at the end', ({ run }) => run.T_K),
  number<Cascade>('m', 'mass', 'mass of gas at the end', ({ run }) => run.m_kg),
  number<Cascade>('T_peak', 'temperature', 'highest gas temperature', ({ run }) => run.T_peak_K),
  field<Cascade>('time', quantityType('time'), 'time it takes', ({ run }) =>
    present(run.time_s, 'this cascade is balances alone: it has no time in it'),
  ),
  number<Cascade>('stages', 'dimensionless', 'how many supplies were opened', ({ stages }) => stages.length),
]

const SURROUNDINGS_FIELDS: readonly FieldSpec[] = [
  number<Surroundings>('T', 'temperature', 'temperature', (around) => around.T_K),
  number<Surroundings>('p', 'pressure', 'pressure', (around) => around.p_Pa),
]

const GAS_FIELDS: readonly FieldSpec[] = [
  number<Fluid>('molar_mass', 'molar_mass', 'molar mass', (fluid) => fluid.info.molarMass_kg_mol),
  field<Fluid>('name', TEXT, 'name', (fluid) => fluid.name),
]

/** Kinds of things that formulas deal in, in words, with what can be asked of each. */
export const THINGS: readonly ThingSpec[] = [
  { thing: 'run', words: 'a run', fields: RUN_FIELDS },
  { thing: 'pair', words: 'two vessels', fields: PAIR_FIELDS },
  { thing: 'cascade', words: 'a cascade', fields: CASCADE_FIELDS },
  { thing: 'vessel', words: 'a vessel', fields: VESSEL_FIELDS },
  { thing: 'supply', words: 'a supply', fields: SUPPLY_FIELDS },
  { thing: 'path', words: 'a path', fields: PATH_FIELDS },
  { thing: 'gas', words: 'a gas', fields: GAS_FIELDS },
  { thing: 'surroundings', words: 'surroundings', fields: SURROUNDINGS_FIELDS },
  { thing: 'shell', words: 'a shell', fields: [] },
  { thing: 'layer', words: 'a layer of a shell', fields: [] },
  { thing: 'material', words: 'a material', fields: [] },
  { thing: 'inside', words: 'a way of working out the inside coefficient', fields: [] },
  { thing: 'outside', words: 'a way of working out what passes outside', fields: [] },
]
