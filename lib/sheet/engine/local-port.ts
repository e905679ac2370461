import { EngineHost } from './host'
import type { FromEngine } from './host'
import type { EnginePort } from './port'

/** The engine in the same thread, for tests and tools. */
export function localPort(later: (task: () => void) => void = (task) => task()): EnginePort {
  let listener: (message: FromEngine) => void = () => {}
  const host = new EngineHost((message) => listener(message), later)
  return {
    send: (message) => host.take(message),
    listen: (next) => (listener = next),
    close: () => {},
  }
}
