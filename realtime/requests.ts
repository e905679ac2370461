import { randomUUID } from 'node:crypto'
import type { IncomingMessage, ServerResponse } from 'node:http'
import type { Logger } from 'pino'

/** What only a proxy in front may say about a request. */
const FORWARDED = ['forwarded', 'x-forwarded-for', 'x-forwarded-host', 'x-forwarded-port', 'x-forwarded-proto']

/**
 * Readies a request for Next and logs it when it is answered: a request id, and the caller's address in
 * X-Forwarded-For, which is its own invention unless a proxy is in front. Of a request, the log has the method, the
 * path without its query, the status and the time: no header, no body.
 */
export function ready(request: IncomingMessage, response: ServerResponse, log: Logger, behindProxy: boolean): void {
  const started = performance.now()
  const id = randomUUID()
  if (!behindProxy) for (const header of FORWARDED) delete request.headers[header]
  request.headers['x-forwarded-for'] ??= request.socket.remoteAddress ?? 'unknown'
  request.headers['x-request-id'] = id
  response.setHeader('X-Request-Id', id)
  const path = (request.url ?? '/').split('?')[0]
  if (path?.startsWith('/_next/')) return
  response.on('close', () => {
    const ms = Math.round(performance.now() - started)
    log.info({ request: id, method: request.method, path, status: response.statusCode, ms }, 'request')
  })
}
