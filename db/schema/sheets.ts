import { bigint, foreignKey, index, pgTable, text, timestamp, uuid } from 'drizzle-orm/pg-core'
import { projects } from './projects'
import { users } from './users'

export const sheets = pgTable(
  'sheets',
  {
    id: uuid().primaryKey().defaultRandom(),
    workspaceId: uuid('workspace_id').notNull(),
    projectId: uuid('project_id').notNull(),
    title: text().notNull(),
    createdBy: uuid('created_by')
      .notNull()
      .references(() => users.id),
    createdAt: timestamp('created_at', { withTimezone: true }).notNull().defaultNow(),
    /** The number of the last update: the row is locked while one is added, so that numbers have no gaps. */
    sequence: bigint({ mode: 'number' }).notNull().default(0),
    editedBy: uuid('edited_by').references(() => users.id),
    editedAt: timestamp('edited_at', { withTimezone: true }),
    /** A deleted sheet is hidden from everyone; what it held stays for the record. */
    deletedBy: uuid('deleted_by').references(() => users.id),
    deletedAt: timestamp('deleted_at', { withTimezone: true }),
  },
  (table) => [
    foreignKey({ columns: [table.workspaceId, table.projectId], foreignColumns: [projects.workspaceId, projects.id] }),
    index('sheets_project').on(table.workspaceId, table.projectId),
  ],
)
