/**
 * Filling, venting and holding gas in rigid vessels. Everything is plain data in SI; an operation takes a run and gives a
 * run. A wish that cannot be met throws a Problem with the reason.
 */
export { together, type Inside, type Layer, type Limits, type Outside, type Shell, type Vessel } from './vessel'
export type { HeatCapacity, HeatCapacityTable } from './shell/heatCapacity'
export { ALUMINIUM, POLYMER, STEEL } from './shell/materials'
export { KV_PER_CV, type Path } from './paths/kinds'
export type { Supply } from './supply'
export type { Draw, Heat, Operation, Run, ShellState, StoppedBy, Stops, Trace } from './run'
export type { ChargeRequest, EqualiseRequest, EvacuateRequest, HoldRequest, VentRequest } from './operations/requests'
export { charge } from './operations/charge'
export { equalise } from './operations/equalise'
export { hold } from './operations/hold'
export { start, type Given } from './operations/start'
export { evacuate, vent } from './operations/vent'
export { cascade, type Cascade, type CascadeRequest } from './operations/cascade'
export { flowThrough } from './operations/flow'
export { serve, type Served, type ServeRequest } from './operations/serve'
export { sizePath, type Sized, type Target } from './operations/sizing'
