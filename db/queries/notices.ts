import { sql } from 'drizzle-orm'
import { z } from 'zod'
import type { Database, OpenDatabase } from '../database'

const CHANNEL = 'chargehand'

/** What the processes tell one another through the database. */
const noticeSchema = z.object({
  /** Who may see or change this sheet is to be decided anew. */
  type: z.literal('access'),
  sheetId: z.uuid(),
})
export type Notice = z.infer<typeof noticeSchema>

/** Tells every listening process, when the transaction is committed and not before. */
export async function notify(db: Database, notice: Notice): Promise<void> {
  await db.execute(sql`select pg_notify(${CHANNEL}, ${JSON.stringify(notice)})`)
}

export async function listen(open: OpenDatabase, hear: (notice: Notice) => void): Promise<void> {
  await open.listen(CHANNEL, (payload) => hear(noticeSchema.parse(JSON.parse(payload))))
}
