import { sql } from 'drizzle-orm'
import type { Database } from '../database'

/** Throws where the database does not answer. */
export async function ping(db: Database): Promise<void> {
  await db.execute(sql`select 1`)
}
