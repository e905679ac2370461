import { describe, expect, it } from 'vitest'
import { findFluid, FLUIDS } from '@/lib/fluids'

/*
 * u, h (J/kg) and s (J/(kg K)) of each fluid at 300 K and 101 325 Pa with the published constants, worked out by another
 * implementation of the same equations: whether coefficients and reference states were read rightly.
 */
const ANCHORS: readonly (readonly [id: string, u: number, h: number, s: number])[] = [
  ['air', 214149.902984, 300237.736277, 6864.93608493],
  ['ammonia', 1551340.65812, 1696298.93561, 7098.34828294],
  ['argon', -61630.0382476, 771.539262563, 2.70996307761],
  ['carbon_dioxide', -55759.8062577, 637.257203031, 3.07254757541],
  ['carbon_monoxide', 355306.110793, 444327.273632, 4005.88449607],
  ['chlorine', 281836.746225, 316578.312187, 1309.98067335],
  ['deuterium', 1653954.7344, 2273532.04116, 30128.3276731],
  ['dimethyl_ether', 485393.736972, 538566.216024, 2141.13187208],
  ['ethane', -81004.2197396, 1331.00776836, 6.52665931444],
  ['ethylene', -87139.7158876, 1272.57323412, 5.93199243994],
  ['helium', 940033.200584, 1563511.9185, 27951.5372729],
  ['hydrogen', 2720201.47094, 3958280.60179, 53464.5049635],
  ['hydrogen_sulfide', 562305.790748, 634946.091394, 2915.86231153],
  ['isobutane', -42299.9879477, -497.241588117, 2.03403113728],
  ['krypton', 123070.388819, 152776.052294, 1128.35970688],
  ['methane', -152071.399523, 3143.33959466, 11.4086744258],
  ['n_butane', -42734.1328764, -1080.93545543, 0.572018785306],
  ['n_pentane', -21772.2502058, -21608.651659, -70.9420732916],
  ['neon', 244910.242133, 368578.924063, 5681.84380792],
  ['nitrogen', 222168.543238, 311193.445526, 6841.73441421],
  ['nitrous_oxide', 413817.868753, 470187.126837, 2428.22441185],
  ['oxygen', 194810.521587, 272711.49333, 6412.85242389],
  ['parahydrogen', 3217695.4896, 4455774.29985, 56792.175395],
  ['propane', 577790.113304, 633458.664941, 2854.91636803],
  ['r1234yf', 370779.563453, 392179.871375, 1777.61518473],
  ['r134a', 402146.309729, 426102.819869, 1905.87597344],
  ['r32', 514357.379466, 561722.127927, 2632.7494534],
  ['sulfur_hexafluoride', -16274.0753833, 614.34723925, 2.68993563262],
  ['water', 112553.224581, 112654.899655, 393.062068441],
  ['xenon', 98791.8390733, 117691.478938, 677.383485509],
]

describe('each fluid at 300 K and 101 325 Pa, by another implementation', () => {
  it('covers every fluid', () => {
    expect(ANCHORS.map(([id]) => id).sort()).toEqual(FLUIDS.map(({ id }) => id).sort())
  })

  it.each(ANCHORS)('%s', (id, u, h, s) => {
    const state = findFluid(id)!.state('pT', 101_325, 300)
    // on the scale of the gas constant: values near their own zero have few digits of their own
    const R = findFluid(id)!.info.gasConstant_J_kgK
    expect(Math.abs(state.u_J_kg - u) / (300 * R)).toBeLessThan(1e-10)
    expect(Math.abs(state.h_J_kg - h) / (300 * R)).toBeLessThan(1e-10)
    expect(Math.abs(state.s_J_kgK - s) / R).toBeLessThan(1e-10)
  })
})
