import type { Database } from '@/db/database'
import { membershipsOf } from '@/db/queries/memberships'
import { findUser } from '@/db/queries/users'
import { environment } from '@/lib/env'
import type { Actor } from '../policies'

/** A person with their roles as they are now; null where the account is gone, or belongs to a demo that is off. */
export async function loadActor(db: Database, userId: string): Promise<Actor | null> {
  const user = await findUser(db, userId)
  if (!user || (user.demo && !environment().demo)) return null
  const memberships = await membershipsOf(db, user.id)
  return {
    id: user.id,
    name: user.name,
    email: user.email,
    roles: new Map(memberships.map((membership) => [membership.workspaceId, membership.role])),
  }
}
