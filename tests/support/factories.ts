import { and, eq } from 'drizzle-orm'
import type { Database } from '@/db/database'
import { addMembership } from '@/db/queries/memberships'
import { addProject } from '@/db/queries/projects'
import { addSheet } from '@/db/queries/sheets'
import { addUser } from '@/db/queries/users'
import { addWorkspace } from '@/db/queries/workspaces'
import { memberships } from '@/db/schema'
import type { Actor, Role } from '@/lib/auth/policies'
import { loadActor } from '@/lib/auth/server/actor'

/*
 * Rows with whatever they need around them. Names are counted, so that tests of one file share a database without
 * getting into each other's way.
 */
let count = 0
const numbered = (word: string) => `${word} ${++count}`

export async function makeUser(db: Database, given: { email?: string; passwordHash?: string; demo?: boolean } = {}) {
  const name = numbered('Person')
  const email = `${name.replace(' ', '')}@test.example`
  return addUser(db, { email, name, passwordHash: 'no password', ...given })
}

export const makeWorkspace = (db: Database) => addWorkspace(db, { name: numbered('Workspace') })

/** A person with a role in a workspace. */
export async function makeMember(db: Database, workspaceId: string, role: Role): Promise<Actor> {
  const user = await makeUser(db)
  await addMembership(db, { workspaceId, userId: user.id, role })
  return (await loadActor(db, user.id))!
}

/** A person who belongs to a workspace of their own, and to no other. */
export async function makeStranger(db: Database): Promise<Actor> {
  return makeMember(db, (await makeWorkspace(db)).id, 'lead')
}

/** A sheet in a workspace with a lead, an engineer and a viewer, and somebody from elsewhere. */
export async function makeSheet(db: Database) {
  const workspace = await makeWorkspace(db)
  const lead = await makeMember(db, workspace.id, 'lead')
  const engineer = await makeMember(db, workspace.id, 'engineer')
  const viewer = await makeMember(db, workspace.id, 'viewer')
  const stranger = await makeStranger(db)
  const place = { workspaceId: workspace.id, createdBy: lead.id }
  const project = await addProject(db, { ...place, name: numbered('Project') })
  const sheet = await addSheet(db, { ...place, projectId: project.id, title: numbered('Sheet') })
  return { workspace, project, sheet, lead, engineer, viewer, stranger }
}

export async function changeRole(db: Database, workspaceId: string, userId: string, role: Role): Promise<void> {
  await db
    .update(memberships)
    .set({ role })
    .where(and(eq(memberships.workspaceId, workspaceId), eq(memberships.userId, userId)))
}

export async function removeMember(db: Database, workspaceId: string, userId: string): Promise<void> {
  await db.delete(memberships).where(and(eq(memberships.workspaceId, workspaceId), eq(memberships.userId, userId)))
}
