import type { Instrumentation } from 'next'

/** Logs what goes wrong while a page or an action is worked out; people see only the digest. */
export const onRequestError: Instrumentation.onRequestError = async (error, request, context) => {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return
  const { log } = await import('./lib/log')
  const digest = error instanceof Error && 'digest' in error ? error.digest : undefined
  const id = request.headers['x-request-id']
  log().error({ err: error, digest, request: id, method: request.method, route: context.routePath }, 'request failed')
}
