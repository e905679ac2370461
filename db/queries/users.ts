import { eq } from 'drizzle-orm'
import type { Database } from '../database'
import { users } from '../schema'

export type UserRow = typeof users.$inferSelect

/** Takes an address as it was typed. */
export async function findUserByEmail(db: Database, email: string): Promise<UserRow | undefined> {
  const [row] = await db.select().from(users).where(eq(users.email, email.trim().toLowerCase()))
  return row
}

export async function addUser(
  db: Database,
  user: { readonly email: string; readonly name: string; readonly passwordHash: string; readonly demo?: boolean },
): Promise<UserRow> {
  const [row] = await db
    .insert(users)
    .values({ ...user, email: user.email.trim().toLowerCase() })
    .returning()
  return row!
}
