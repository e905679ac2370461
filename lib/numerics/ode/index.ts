export { integrate, type IntegrationOptions, type Method, type Outcome, type StepView } from './integrate'
export { fallToZero } from './root'
export { turningPoint } from './turningPoint'
export type { OdeSystem } from './system'
