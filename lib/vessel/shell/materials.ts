import type { HeatCapacityTable } from './heatCapacity'

/*
 * What walls are made of. Each table is good to a few per cent: alloys of a kind differ by that much.
 */

/**
 * Carbon and low-alloy steel. From 20 °C: EN 1993-1-2:2005, 3.4.1.2, c = 425 + 0.773 θ - 0.00169 θ² + 2.22e-6 θ³ (θ in °C).
 * Below: iron, P. D. Desai, J. Phys. Chem. Ref. Data 15 (1986) 967-983, doi:10.1063/1.555761, rounded, from memory.
 */
export const STEEL: HeatCapacityTable = {
  name: 'steel',
  source: 'EN 1993-1-2; iron by Desai (1986) below 20 °C',
  T_K: [100, 150, 200, 250, 293.15, 373.15, 473.15, 573.15, 673.15, 773.15],
  c_J_kgK: [216, 323, 384, 420, 439.8, 487.6, 529.8, 564.7, 605.9, 666.5],
}

/**
 * Aluminium alloys. From 20 °C: EN 1999-1-2:2007, 3.3.1, c = 903 + 0.41 θ (θ in °C). Below: 6061-T6, the fit of the NIST
 * cryogenic materials collection (E. D. Marquardt, J. P. Le, R. Radebaugh, Cryocoolers 11 (2002) 681-687), joined to it.
 */
export const ALUMINIUM: HeatCapacityTable = {
  name: 'aluminium',
  source: 'EN 1999-1-2; NIST fit for 6061-T6 below 20 °C',
  T_K: [100, 150, 200, 250, 293.15, 373.15, 473.15, 573.15, 673.15, 773.15],
  c_J_kgK: [492, 713, 835, 880, 911.2, 944, 985, 1026, 1067, 1108],
}

/**
 * A liner of high-density polyethylene, some 70 % crystalline: U. Gaur, B. Wunderlich, J. Phys. Chem. Ref. Data 10 (1981)
 * 119-152, doi:10.1063/1.555636, rounded, from memory; good to some 5 %.
 */
export const POLYMER: HeatCapacityTable = {
  name: 'polymer',
  source: 'polyethylene by Gaur and Wunderlich (1981)',
  T_K: [200, 250, 300, 350],
  c_J_kgK: [1280, 1530, 1740, 1970],
}
