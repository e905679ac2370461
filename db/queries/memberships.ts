import { asc, eq } from 'drizzle-orm'
import type { Role } from '@/lib/auth/policies'
import type { Database } from '../database'
import { memberships, workspaces } from '../schema'

export interface MembershipRow {
  readonly workspaceId: string
  readonly workspaceName: string
  readonly role: Role
}

/** The workspaces a person belongs to, the one they joined first leading. */
export async function membershipsOf(db: Database, userId: string): Promise<readonly MembershipRow[]> {
  return db
    .select({ workspaceId: memberships.workspaceId, workspaceName: workspaces.name, role: memberships.role })
    .from(memberships)
    .innerJoin(workspaces, eq(workspaces.id, memberships.workspaceId))
    .where(eq(memberships.userId, userId))
    .orderBy(asc(memberships.createdAt), asc(memberships.workspaceId))
}

export async function addMembership(
  db: Database,
  membership: { readonly workspaceId: string; readonly userId: string; readonly role: Role },
): Promise<void> {
  await db.insert(memberships).values(membership)
}
