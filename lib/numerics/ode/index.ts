export { integrate, type IntegrationOptions, type Method, type Outcome, type StepView } from './integrate'
export { fallToZero } from './root'
export type { OdeSystem } from './system'
