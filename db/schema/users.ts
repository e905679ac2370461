import { sql } from 'drizzle-orm'
import { boolean, check, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core'

export const users = pgTable(
  'users',
  {
    id: uuid().primaryKey().defaultRandom(),
    /** In small letters: people type it as they like. */
    email: text().notNull().unique(),
    name: text().notNull(),
    passwordHash: text('password_hash').notNull(),
    /** An account of the demo, whose password stands on the sign-in page: it is of no use while the demo is off. */
    demo: boolean().notNull().default(false),
    createdAt: timestamp('created_at', { withTimezone: true }).notNull().defaultNow(),
  },
  (table) => [check('users_email_small', sql`${table.email} = lower(${table.email})`)],
)
