import { bigint, pgTable, timestamp, uuid } from 'drizzle-orm/pg-core'
import { bytea } from '../columns'
import { sheets } from './sheets'

/** A sheet's document up to an update, in one piece: a short cut for opening it. The updates themselves stay. */
export const sheetStates = pgTable('sheet_states', {
  sheetId: uuid('sheet_id')
    .primaryKey()
    .references(() => sheets.id),
  /** The last update that the bytes hold. */
  sequence: bigint({ mode: 'number' }).notNull(),
  bytes: bytea().notNull(),
  at: timestamp({ withTimezone: true }).notNull().defaultNow(),
})
