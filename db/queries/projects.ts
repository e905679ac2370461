import { asc, eq } from 'drizzle-orm'
import type { Database } from '../database'
import { projects } from '../schema'

export type ProjectRow = typeof projects.$inferSelect

export async function findProject(db: Database, id: string): Promise<ProjectRow | undefined> {
  const [row] = await db.select().from(projects).where(eq(projects.id, id))
  return row
}

export async function projectsOf(db: Database, workspaceId: string): Promise<readonly ProjectRow[]> {
  return db.select().from(projects).where(eq(projects.workspaceId, workspaceId)).orderBy(asc(projects.name))
}

export async function addProject(
  db: Database,
  project: { readonly workspaceId: string; readonly name: string; readonly createdBy: string },
): Promise<ProjectRow> {
  const [row] = await db.insert(projects).values(project).returning()
  return row!
}
