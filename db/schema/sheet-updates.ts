import { bigint, pgTable, primaryKey, timestamp, uuid } from 'drizzle-orm/pg-core'
import { bytea } from '../columns'
import { sheets } from './sheets'
import { users } from './users'

/** Every change of a sheet's document, in order and for ever: who changed what, when, is read from here. */
export const sheetUpdates = pgTable(
  'sheet_updates',
  {
    sheetId: uuid('sheet_id')
      .notNull()
      .references(() => sheets.id),
    /** 1, 2, 3 … within a sheet. */
    sequence: bigint({ mode: 'number' }).notNull(),
    /** A Yjs update (version 1 encoding). */
    bytes: bytea().notNull(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id),
    at: timestamp({ withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [primaryKey({ columns: [table.sheetId, table.sequence] })],
)
