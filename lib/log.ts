import pino from 'pino'
import { environment } from './env'

const KEY = Symbol.for('chargehand.log')
const shared = globalThis as { [KEY]?: pino.Logger }

/**
 * The log of this process, a JSON object a line. It hangs on globalThis since Next bundles a copy of this module of its
 * own. Never hand it a request, a form or a cookie: only fields that are named.
 */
export function log(): pino.Logger {
  return (shared[KEY] ??= pino({
    level: environment().logLevel,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['*.password', '*.passwordHash', '*.cookie', '*.authorization', '*.token', '*.secret'],
      censor: '-',
    },
  }))
}
