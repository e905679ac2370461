import { createState } from './fluid'
import type { State } from './fluid'
import type { HelmholtzFluid } from './helmholtz-fluid'
import type { SaturationTable } from './saturation-table'
import { LIQUID, VAPOUR } from './saturation-table'

/** What a state is looked for by, besides its pressure or density. */
export type Energy = 'u' | 'h' | 's'
export type Branch = 'gas' | 'liquid' | 'beyond'

/** Where to begin: reused, so that a search allocates nothing. */
export interface Start {
  T_K: number
  rho: number
  /** Colder than this the equation does not reach: the fluid is solid there. */
  T_low_K: number
}

/** One isotherm of one phase from its thinnest to its densest, as far as the equation behaves and p_max allows. */
interface Column {
  readonly T_K: number
  readonly rho: readonly number[]
  readonly p_Pa: readonly number[]
  readonly u: readonly number[]
  /** s + R ln ρ, which stays finite and nearly straight where the gas is thin. */
  readonly sigma: readonly number[]
  /** It ends at p_max, not where the equation ceases to behave. */
  readonly whole: boolean
}

const COLUMNS = 24
const GAS_NODES = 10
/** Densities of a liquid column stand this far apart, and of one beyond the critical temperature this many critical densities. */
const LIQUID_RATIO = 1.03
const STEP_BEYOND = 0.1
const DENSEST = 8

/**
 * A coarse chart of a fluid, some twenty-four isotherms on either side of its highest two-phase temperature, made once: from
 * it every search starts within a few per cent of its end, on the right side of every edge.
 */
export class Chart {
  private readonly gas: Column[] = []
  private readonly liquid: Column[] = []
  private readonly beyond: Column[] = []
  private readonly R: number
  private readonly probe = createState()

  constructor(
    private readonly fluid: HelmholtzFluid,
    private readonly table: SaturationTable,
  ) {
    this.R = fluid.scales.R_J_kgK
    const { T_min_K, T_max_K } = fluid.info
    const { T_top_K } = table
    for (let i = 0; i < COLUMNS; i++) {
      // denser towards the top, where the edges turn
      const T_K = T_min_K + (T_top_K - T_min_K) * (1 - (1 - i / COLUMNS) ** 2)
      this.gas.push(this.gasColumn(T_K))
      this.liquid.push(this.denseColumn(T_K, table.rho(LIQUID, T_K), (rho) => rho * LIQUID_RATIO))
    }
    const step = STEP_BEYOND * table.rho_top
    for (let i = 0; i <= COLUMNS; i++) {
      const T_K = T_top_K + (T_max_K - T_top_K) * (i / COLUMNS) ** 2.5
      this.beyond.push(this.denseColumn(T_K, 1e-9 * table.rho_top, (rho) => rho + step))
    }
  }

  /** Density at a temperature and pressure, and up to which density the branch reaches. */
  densityAt(T_K: number, p_Pa: number, branch: Branch): number {
    const columns = this.columns(branch)
    const i = placeOf(columns, T_K)
    const [a, b] = [columns[i], columns[i + 1]]
    const t = (T_K - a.T_K) / (b.T_K - a.T_K)
    const RT = this.R * T_K
    const Za = p_Pa / (rhoAtPressure(a, p_Pa, this.R) * this.R * a.T_K)
    const Zb = p_Pa / (rhoAtPressure(b, p_Pa, this.R) * this.R * b.T_K)
    return branch === 'liquid'
      ? rhoAtPressure(a, p_Pa, this.R) * (1 - t) + rhoAtPressure(b, p_Pa, this.R) * t
      : p_Pa / (RT * (Za + t * (Zb - Za)))
  }

  /** The densest state at a temperature: that of p_max, or to which the equation behaves. */
  densest(T_K: number, branch: Branch): number {
    const columns = this.columns(branch)
    const i = placeOf(columns, T_K)
    const [a, b] = [columns[i], columns[i + 1]]
    const whole = a.whole && b.whole
    return whole ? 1.03 * Math.max(a.rho.at(-1)!, b.rho.at(-1)!) : Math.min(a.rho.at(-1)!, b.rho.at(-1)!)
  }

  /**
   * Temperature and density at a pressure and an energy or entropy on one side of the two-phase region.
   * @param T_edge_K where the side begins at this pressure; NaN where the pressure has one phase at every temperature
   */
  atPressure(p_Pa: number, by: Energy, value: number, branch: Branch, T_edge_K: number, out: Start): void {
    const edgeSide = branch === 'liquid' ? LIQUID : VAPOUR
    const { table } = this
    const edge = Number.isNaN(T_edge_K)
      ? null
      : this.point(
          T_edge_K,
          table.rho(edgeSide, T_edge_K),
          p_Pa,
          table.u_J_kg(edgeSide, T_edge_K),
          table.s_J_kgK(edgeSide, T_edge_K),
        )
    const below = branch === 'gas' ? this.gas : this.liquid
    const has = (column: Column) => !edge || (branch === 'liquid' ? column.T_K < T_edge_K : column.T_K > T_edge_K)
    const all = [...below.filter(has), ...(branch === 'liquid' && edge ? [] : this.beyond)]
    const first = branch === 'gas' ? 0 : all.findIndex((column) => column.p_Pa.at(-1)! >= p_Pa)
    // between two columns the equation reaches somewhat further than the colder of them
    out.T_low_K = first > 1 ? all[first - 2].T_K : this.fluid.info.T_min_K
    const columns = first > 0 ? all.slice(first) : all
    const points = columns.map((column) => this.atColumn(column, rhoAtPressure(column, p_Pa, this.R), p_Pa))
    if (edge && branch === 'liquid') points.push(edge)
    else if (edge) points.unshift(edge)
    between(points, by, value, out)
  }

  /** Temperature at a density and an energy or pressure, from where the density leaves the two-phase region upward. */
  atDensity(rho: number, by: Energy | 'p', value: number, T_edge_K: number, out: Start): void {
    const { table } = this
    const side = rho < table.rho_top ? VAPOUR : LIQUID
    const points: Point[] = []
    out.T_low_K = out.T_K = this.fluid.info.T_min_K
    out.rho = rho
    let excluded = out.T_low_K
    if (!Number.isNaN(T_edge_K)) {
      const T = Math.min(T_edge_K, table.T_top_K)
      points.push(this.point(T, rho, table.p_Pa(side, T), table.u_J_kg(side, T), table.s_J_kgK(side, T)))
    }
    const below = side === VAPOUR ? this.gas : this.liquid
    for (const column of [...below, ...this.beyond]) {
      if (column.T_K < T_edge_K) continue
      if (rho > column.rho.at(-1)!) {
        if (points.length > 0 || column.whole) continue
        out.T_low_K = excluded
        excluded = column.T_K
        continue
      }
      if (rho < column.rho[0] && column.rho[0] > 0.1 * table.rho_top) continue
      const Z = valueAt(column, rho, column.p_Pa) / (rho * this.R * column.T_K)
      points.push(this.atColumn(column, rho, Z * rho * this.R * column.T_K))
    }
    between(points, by, value, out)
  }

  /** Density at a temperature and entropy on one branch. */
  atEntropy(T_K: number, s: number, branch: Branch): number {
    const columns = this.columns(branch)
    const i = placeOf(columns, T_K)
    const t = (T_K - columns[i].T_K) / (columns[i + 1].T_K - columns[i].T_K)
    const at = (column: Column, rho: number) => valueAt(column, rho, column.sigma)
    // the entropy falls as the fluid gets denser
    let low = Math.log(1e-14 * this.table.rho_top)
    let high = Math.log(this.densest(T_K, branch))
    for (let k = 0; k < 40; k++) {
      const middle = (low + high) / 2
      const rho = Math.exp(middle)
      const sigma = at(columns[i], rho) * (1 - t) + at(columns[i + 1], rho) * t
      if (sigma - this.R * middle > s) low = middle
      else high = middle
    }
    return Math.exp(high)
  }

  private columns(branch: Branch): readonly Column[] {
    return branch === 'gas' ? this.gas : branch === 'liquid' ? this.liquid : this.beyond
  }

  private atColumn(column: Column, rho: number, p_Pa: number): Point {
    const s = valueAt(column, rho, column.sigma) - this.R * Math.log(rho)
    return this.point(column.T_K, rho, p_Pa, valueAt(column, rho, column.u), s)
  }

  private point(T_K: number, rho: number, p: number, u: number, s: number): Point {
    return { T_K, rho, p, u, s, h: u + p / rho }
  }

  private gasColumn(T_K: number): Column {
    const column = emptyColumn(T_K)
    const top = this.table.rho(VAPOUR, T_K)
    for (let j = 0; j <= GAS_NODES; j++) this.add(column, Math.max(j / GAS_NODES, 1e-9) * top)
    return column
  }

  private denseColumn(T_K: number, first: number, next: (rho: number) => number): Column {
    const column = emptyColumn(T_K)
    const { p_max_Pa } = this.fluid.info
    for (let rho = first; rho < DENSEST * this.table.rho_top; rho = next(rho)) {
      const state = this.add(column, rho)
      if (column.rho.length > 2 && !isFluid(state, this.table)) {
        for (const list of [column.rho, column.p_Pa, column.u, column.sigma]) list.pop()
        column.whole = false
        break
      }
      if (state.p_Pa > 1.05 * p_max_Pa) break
    }
    return column
  }

  private add(column: MutableColumn, rho: number): State {
    const state = this.fluid.singlePhase(column.T_K, rho, this.probe)
    column.rho.push(rho)
    column.p_Pa.push(state.p_Pa)
    column.u.push(state.u_J_kg)
    column.sigma.push(state.s_J_kgK + this.R * Math.log(rho))
    return state
  }
}

/**
 * Whether an equation behaves as that of a fluid: heat capacities above zero, and the pressure rising with density and
 * temperature. Near its saturation a liquid may contract on warming; when it is well compressed none does.
 */
export function isFluid(state: State, table: SaturationTable): boolean {
  const { T_K: T, rho_kg_m3: rho, p_Pa: p, cv_J_kgK: cv, cp_J_kgK: cp } = state
  // next to the critical point rounding alone may turn a sign
  if (rho < 1.5 * table.rho_top) return true
  const { dpdrho_T_Pa_m3_kg: dpdrho, dpdT_rho_Pa_K: dpdT } = state
  if (!(cv > 0 && dpdrho > 0)) return false
  if (rho < 1.1 * table.rho(LIQUID, Math.min(T, table.T_top_K))) return true
  return dpdT > 0 && cp > (p * dpdT) / (rho * rho * dpdrho)
}

interface Point {
  readonly T_K: number
  readonly rho: number
  readonly p: number
  readonly u: number
  readonly h: number
  readonly s: number
}

interface MutableColumn {
  readonly T_K: number
  readonly rho: number[]
  readonly p_Pa: number[]
  readonly u: number[]
  readonly sigma: number[]
  whole: boolean
}

const emptyColumn = (T_K: number): MutableColumn => ({ T_K, rho: [], p_Pa: [], u: [], sigma: [], whole: true })

/** The last place from which a list of columns runs past a temperature; never the last of all. */
function placeOf(columns: readonly Column[], T_K: number): number {
  let [low, high] = [0, columns.length - 1]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (columns[middle].T_K <= T_K) low = middle
    else high = middle
  }
  return low
}

function indexIn(list: readonly number[], value: number): number {
  let [low, high] = [0, list.length - 1]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (list[middle] <= value) low = middle
    else high = middle
  }
  return low
}

function valueAt(column: Column, rho: number, list: readonly number[]): number {
  const j = indexIn(column.rho, rho)
  const t = (rho - column.rho[j]) / (column.rho[j + 1] - column.rho[j])
  return list[j] + t * (list[j + 1] - list[j])
}

/** Between two nodes of a thin gas the compressibility factor runs straight, of a liquid the density. */
function rhoAtPressure(column: Column, p_Pa: number, R: number): number {
  const { rho, p_Pa: p, T_K } = column
  const j = indexIn(p, p_Pa)
  const t = (p_Pa - p[j]) / (p[j + 1] - p[j])
  if (rho[j + 1] < 1.5 * rho[j]) return Math.max(rho[j] + t * (rho[j + 1] - rho[j]), 0.9 * rho[0])
  const RT = R * T_K
  const Z = p[j] / (rho[j] * RT)
  return p_Pa / (RT * (Z + t * (p[j + 1] / (rho[j + 1] * RT) - Z)))
}

/** Where a value lies among points in which it rises; from the nearest two it runs on beyond the ends. */
function between(points: readonly Point[], by: Energy | 'p', value: number, out: Start): void {
  if (points.length === 0) return
  if (points.length === 1) {
    out.T_K = points[0].T_K
    out.rho = points[0].rho
    return
  }
  let [low, high] = [0, points.length - 1]
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (points[middle][by] <= value) low = middle
    else high = middle
  }
  const [a, b] = [points[low], points[high]]
  const t = Math.min(Math.max((value - a[by]) / (b[by] - a[by]), -0.5), 1.5)
  if (!Number.isFinite(t)) return
  out.T_K = a.T_K + t * (b.T_K - a.T_K)
  out.rho = a.rho * Math.exp(t * Math.log(b.rho / a.rho))
}
