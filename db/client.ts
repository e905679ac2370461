import type { Database, OpenDatabase } from './database'

/*
 * The process has one database, opened by the server before it serves. It hangs on globalThis under a shared symbol,
 * since Next bundles a copy of this module of its own.
 */
const KEY = Symbol.for('chargehand.database')
const shared = globalThis as { [KEY]?: OpenDatabase }

export function setDatabase(open: OpenDatabase | undefined): void {
  shared[KEY] = open
}

/** The open database. Throws where no server has opened it: `next start` alone does not serve Chargehand. */
export function database(): Database {
  const open = shared[KEY]
  if (!open) throw new Error('No database is open in this process: start Chargehand with npm start or npm run dev.')
  return open.db
}
