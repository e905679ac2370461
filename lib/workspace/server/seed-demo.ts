import type { Database } from '@/db/database'
import { addMembership } from '@/db/queries/memberships'
import { addProject } from '@/db/queries/projects'
import { appendUpdates } from '@/db/queries/sheet-documents'
import { addSheet } from '@/db/queries/sheets'
import { addUser, findUserByEmail } from '@/db/queries/users'
import { addWorkspace } from '@/db/queries/workspaces'
import { hashPassword } from '@/lib/auth/server/passwords'
import { buildDemoSheet } from '@/lib/sheet/demo'
import { DEMO_ACCOUNTS, DEMO_PASSWORD, DEMO_PROJECT, DEMO_SHEET, DEMO_WORKSPACE } from '../demo'

/** Puts the demo there unless it is there already, whatever has become of it since. */
export async function seedDemo(db: Database): Promise<void> {
  await db.transaction(async (tx) => {
    if (await findUserByEmail(tx, DEMO_ACCOUNTS[0]!.email)) return
    const workspace = await addWorkspace(tx, { name: DEMO_WORKSPACE })
    const passwordHash = await hashPassword(DEMO_PASSWORD)
    const people: string[] = []
    for (const { role, name, email } of DEMO_ACCOUNTS) {
      const user = await addUser(tx, { email, name, passwordHash, demo: true })
      await addMembership(tx, { workspaceId: workspace.id, userId: user.id, role })
      people.push(user.id)
    }
    const place = { workspaceId: workspace.id, createdBy: people[0]! }
    const project = await addProject(tx, { ...place, name: DEMO_PROJECT })
    const sheet = await addSheet(tx, { ...place, projectId: project.id, title: DEMO_SHEET })
    await appendUpdates(tx, sheet.id, [{ bytes: buildDemoSheet(), userId: place.createdBy }])
  })
}
