import type { FluidData } from '../equation-data'
import air from './air.json'
import ammonia from './ammonia.json'
import argon from './argon.json'
import carbon_dioxide from './carbon_dioxide.json'
import carbon_monoxide from './carbon_monoxide.json'
import chlorine from './chlorine.json'
import deuterium from './deuterium.json'
import dimethyl_ether from './dimethyl_ether.json'
import ethane from './ethane.json'
import ethylene from './ethylene.json'
import helium from './helium.json'
import hydrogen from './hydrogen.json'
import hydrogen_sulfide from './hydrogen_sulfide.json'
import isobutane from './isobutane.json'
import krypton from './krypton.json'
import methane from './methane.json'
import n_butane from './n_butane.json'
import n_pentane from './n_pentane.json'
import neon from './neon.json'
import nitrogen from './nitrogen.json'
import nitrous_oxide from './nitrous_oxide.json'
import oxygen from './oxygen.json'
import parahydrogen from './parahydrogen.json'
import propane from './propane.json'
import r1234yf from './r1234yf.json'
import r134a from './r134a.json'
import r32 from './r32.json'
import sulfur_hexafluoride from './sulfur_hexafluoride.json'
import water from './water.json'
import xenon from './xenon.json'

/** Every fluid with an equation of state here, by name. The type of a JSON file is too wide for a union of terms: tests read each through its own check. */
export const FLUID_DATA = [
  air,
  ammonia,
  argon,
  carbon_dioxide,
  carbon_monoxide,
  chlorine,
  deuterium,
  dimethyl_ether,
  ethane,
  ethylene,
  helium,
  hydrogen,
  hydrogen_sulfide,
  isobutane,
  krypton,
  methane,
  n_butane,
  n_pentane,
  neon,
  nitrogen,
  nitrous_oxide,
  oxygen,
  parahydrogen,
  propane,
  r1234yf,
  r134a,
  r32,
  sulfur_hexafluoride,
  water,
  xenon,
] as unknown as readonly FluidData[]
