import type { Database } from '@/db/database'
import { membershipsOf } from '@/db/queries/memberships'
import { environment } from '@/lib/env'
import type { Actor, Role } from '../policies'

/** People with their roles as they are now; without those whose account is gone, or belongs to a demo that is off. */
export async function loadActors(db: Database, userIds: readonly string[]): Promise<ReadonlyMap<string, Actor>> {
  const rolesOf = new Map<string, Map<string, Role>>()
  const actors = new Map<string, Actor>()
  for (const { userId: id, name, email, demo, workspaceId, role } of await membershipsOf(db, userIds)) {
    if (demo && !environment().demo) continue
    const roles = rolesOf.get(id) ?? new Map<string, Role>()
    rolesOf.set(id, roles)
    if (workspaceId && role) roles.set(workspaceId, role)
    actors.set(id, { id, name, email, roles })
  }
  return actors
}

/** One person, or null. */
export async function loadActor(db: Database, userId: string): Promise<Actor | null> {
  return (await loadActors(db, [userId])).get(userId) ?? null
}
