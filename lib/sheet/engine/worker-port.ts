import type { FromEngine } from './host'
import type { EnginePort } from './port'

/** The engine in a web worker of the page. */
export function workerPort(): EnginePort {
  const worker = new Worker(new URL('./worker.ts', import.meta.url), { type: 'module' })
  return {
    send: (message) => worker.postMessage(message),
    listen: (listener) => (worker.onmessage = (event: MessageEvent<FromEngine>) => listener(event.data)),
    close: () => worker.terminate(),
  }
}
