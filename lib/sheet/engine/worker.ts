import { EngineHost } from './host'
import type { FromEngine, ToEngine } from './host'

/** The engine in a web worker, so that the page never waits for it. */
const host = new EngineHost(
  (message: FromEngine) => postMessage(message),
  (task) => setTimeout(task, 0),
)

onmessage = (event: MessageEvent<ToEngine>) => host.take(event.data)
