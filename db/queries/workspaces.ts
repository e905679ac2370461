import { eq } from 'drizzle-orm'
import type { Database } from '../database'
import { workspaces } from '../schema'

export type WorkspaceRow = typeof workspaces.$inferSelect

export async function findWorkspace(db: Database, id: string): Promise<WorkspaceRow | undefined> {
  const [row] = await db.select().from(workspaces).where(eq(workspaces.id, id))
  return row
}

export async function addWorkspace(db: Database, workspace: { readonly name: string }): Promise<WorkspaceRow> {
  const [row] = await db.insert(workspaces).values(workspace).returning()
  return row!
}
