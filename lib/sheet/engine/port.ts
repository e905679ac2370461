import type { FromEngine, ToEngine } from './host'

/** The way to an engine, wherever it runs. */
export interface EnginePort {
  send(message: ToEngine): void
  listen(listener: (message: FromEngine) => void): void
  close(): void
}
