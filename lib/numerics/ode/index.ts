export { integrate, type IntegrationOptions, type Method, type Outcome, type StepView } from './integrate'
export type { OdeSystem } from './system'
