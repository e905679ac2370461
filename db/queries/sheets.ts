import { and, desc, eq, isNull, sql } from 'drizzle-orm'
import type { Database } from '../database'
import { projects, sheets, users, workspaces } from '../schema'

export type SheetRow = typeof sheets.$inferSelect

/** A sheet that is not deleted, with the names of where it stands. */
export interface PlacedSheet {
  readonly id: string
  readonly title: string
  readonly workspaceId: string
  readonly workspaceName: string
  readonly projectId: string
  readonly projectName: string
}

export async function findSheet(db: Database, id: string): Promise<PlacedSheet | undefined> {
  const [row] = await db
    .select({
      id: sheets.id,
      title: sheets.title,
      workspaceId: sheets.workspaceId,
      workspaceName: workspaces.name,
      projectId: sheets.projectId,
      projectName: projects.name,
    })
    .from(sheets)
    .innerJoin(projects, eq(projects.id, sheets.projectId))
    .innerJoin(workspaces, eq(workspaces.id, sheets.workspaceId))
    .where(and(eq(sheets.id, id), isNull(sheets.deletedAt)))
  return row
}

export interface ListedSheet {
  readonly id: string
  readonly projectId: string
  readonly title: string
  /** Of the last change, or of its making where there was none. */
  readonly changedAt: Date
  readonly changedBy: string
}

/** The sheets of a workspace, the one changed last leading. */
export async function sheetsOf(db: Database, workspaceId: string): Promise<readonly ListedSheet[]> {
  const changedAt = sql<Date>`coalesce(${sheets.editedAt}, ${sheets.createdAt})`.mapWith(sheets.createdAt)
  return db
    .select({ id: sheets.id, projectId: sheets.projectId, title: sheets.title, changedAt, changedBy: users.name })
    .from(sheets)
    .innerJoin(users, eq(users.id, sql`coalesce(${sheets.editedBy}, ${sheets.createdBy})`))
    .where(and(eq(sheets.workspaceId, workspaceId), isNull(sheets.deletedAt)))
    .orderBy(desc(changedAt), desc(sheets.id))
}

export async function addSheet(
  db: Database,
  sheet: {
    readonly workspaceId: string
    readonly projectId: string
    readonly title: string
    readonly createdBy: string
  },
): Promise<SheetRow> {
  const [row] = await db.insert(sheets).values(sheet).returning()
  return row!
}

export async function renameSheet(db: Database, id: string, title: string): Promise<void> {
  await db.update(sheets).set({ title }).where(eq(sheets.id, id))
}

/** Hides a sheet; its document stays. */
export async function deleteSheet(db: Database, id: string, userId: string): Promise<void> {
  await db
    .update(sheets)
    .set({ deletedAt: sql`now()`, deletedBy: userId })
    .where(and(eq(sheets.id, id), isNull(sheets.deletedAt)))
}
