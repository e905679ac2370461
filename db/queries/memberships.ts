import { asc, eq, inArray } from 'drizzle-orm'
import type { Role } from '@/lib/auth/policies'
import type { Database } from '../database'
import { memberships, users } from '../schema'

/** A person in one of their workspaces; a person who belongs to none has one row without workspace and role. */
export interface MembershipRow {
  readonly userId: string
  readonly name: string
  readonly email: string
  readonly demo: boolean
  readonly workspaceId: string | null
  readonly role: Role | null
}

/** People and the workspaces they belong to, in one go; the workspace that each joined first leads. */
export async function membershipsOf(db: Database, userIds: readonly string[]): Promise<readonly MembershipRow[]> {
  return db
    .select({
      userId: users.id,
      name: users.name,
      email: users.email,
      demo: users.demo,
      workspaceId: memberships.workspaceId,
      role: memberships.role,
    })
    .from(users)
    .leftJoin(memberships, eq(memberships.userId, users.id))
    .where(inArray(users.id, [...userIds]))
    .orderBy(asc(memberships.createdAt), asc(memberships.workspaceId))
}

export async function addMembership(
  db: Database,
  membership: { readonly workspaceId: string; readonly userId: string; readonly role: Role },
): Promise<void> {
  await db.insert(memberships).values(membership)
}
