import { FunctionPlugin, HyperFormula } from 'hyperformula'
import type { GraphScalar, GraphValue } from './intern'

/** Works out formula number `k` from the values of the cells it reads, in the order it reads them. */
export type Work = (k: number, reads: readonly GraphValue[]) => GraphScalar

interface GraphContext {
  readonly work: Work
}

/**
 * Our formulas in HyperFormula: `=WORK(k, cells…)` is compiled formula number k, applied to the cells that it reads.
 * HyperFormula knows which cells need which, finds rings and recalculates what a change touches, in order; the compiled
 * formula knows units, things, laziness and the words of an error.
 */
class WorkPlugin extends FunctionPlugin {
  static override implementedFunctions = { WORK: { method: 'work', parameters: [] } }

  // the graph's own syntax tree and state only pass through: never is the type of what is not looked into
  work(ast: { readonly args: readonly never[] }, state: never): GraphScalar {
    const [k, ...reads] = ast.args.map((argument) => this.evaluateAst(argument, state) as GraphValue)
    return (this.config.context as GraphContext).work(k as number, reads)
  }
}

HyperFormula.registerFunctionPlugin(WorkPlugin, { enGB: { WORK: 'WORK' } })

export const GRAPH_SHEETS = ['states', 'limits', 'rig'] as const
export type GraphSheet = (typeof GRAPH_SHEETS)[number]

export function createGraph(licenseKey: string, work: Work): HyperFormula {
  return HyperFormula.buildFromSheets(
    { states: [], limits: [], rig: [] },
    // rounding would show 0.1 + 0.2 − 0.3 as 0 and round products
    { licenseKey, smartRounding: false, context: { work } satisfies GraphContext, maxRows: 100_000 },
  )
}
