import type { PgDatabase, PgQueryResultHKT } from 'drizzle-orm/pg-core'

/** A connection or a transaction: a query is handed either and need not know which, nor which driver is behind it. */
export type Database = PgDatabase<PgQueryResultHKT, Record<string, never>>

/** An open database with what a driver does beyond queries. */
export interface OpenDatabase {
  readonly db: Database
  /** Hears what `notify` sends on a channel, from this process or another, once it is committed. */
  listen(channel: string, hear: (payload: string) => void): Promise<void>
  close(): Promise<void>
}
