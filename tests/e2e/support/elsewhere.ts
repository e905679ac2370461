import { openFolder } from '@/db/pglite'
import { addMembership } from '@/db/queries/memberships'
import { addProject } from '@/db/queries/projects'
import { addSheet } from '@/db/queries/sheets'
import { addUser } from '@/db/queries/users'
import { addWorkspace } from '@/db/queries/workspaces'
import { hashPassword } from '@/lib/auth/server/passwords'

/** An account of another workspace, and a sheet there. */
export interface Elsewhere {
  readonly email: string
  readonly password: string
  readonly workspaceId: string
  readonly sheetId: string
}

/** Puts a second workspace into a new data folder, before a server opens it. */
export async function seedElsewhere(folder: string): Promise<Elsewhere> {
  const { db, close } = await openFolder(folder)
  try {
    const email = 'lead@elsewhere.example'
    const password = 'another workspace entirely'
    const user = await addUser(db, { email, name: 'Edda Wick', passwordHash: await hashPassword(password) })
    const { id: workspaceId } = await addWorkspace(db, { name: 'Elsewhere' })
    await addMembership(db, { workspaceId, userId: user.id, role: 'lead' })
    const project = await addProject(db, { workspaceId, name: 'Secret rig', createdBy: user.id })
    const place = { workspaceId, projectId: project.id, createdBy: user.id }
    const sheet = await addSheet(db, { ...place, title: 'Secret sheet' })
    return { email, password, workspaceId, sheetId: sheet.id }
  } finally {
    await close()
  }
}
