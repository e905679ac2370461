import { describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { loadDocument } from '@/db/queries/sheet-documents'
import { findUserByEmail } from '@/db/queries/users'
import { loadActor } from '@/lib/auth/server/actor'
import { signIn } from '@/lib/auth/server/sign-in'
import { readSheet } from '@/lib/sheet/doc/read'
import { DEMO_ACCOUNTS, DEMO_PASSWORD, DEMO_PROJECT, DEMO_SHEET, DEMO_WORKSPACE } from '@/lib/workspace/demo'
import { deleteSheet } from '@/lib/workspace/server/delete-sheet'
import { openWorkspace } from '@/lib/workspace/server/open-workspace'
import { seedDemo } from '@/lib/workspace/server/seed-demo'
import { testDatabase } from '../support/database'

const test = testDatabase()

async function lead() {
  const user = await findUserByEmail(test.db, DEMO_ACCOUNTS[0]!.email)
  const actor = (await loadActor(test.db, user!.id))!
  const [workspaceId] = actor.roles.keys()
  return { actor, workspaceId: workspaceId! }
}

describe('the demo', () => {
  it('has an account for each role, a project and a sheet with rows to work out', async () => {
    await seedDemo(test.db)
    for (const { email, role } of DEMO_ACCOUNTS) {
      const signedIn = await signIn({ email, password: DEMO_PASSWORD }, '192.0.2.1')
      const actor = 'user' in signedIn ? await loadActor(test.db, signedIn.user.id) : null
      expect([...actor!.roles.values()]).toEqual([role])
    }
    const { actor, workspaceId } = await lead()
    const workspace = await openWorkspace(actor, { workspaceId })
    expect(workspace.name).toBe(DEMO_WORKSPACE)
    expect(workspace.projects.map(({ name, sheets }) => [name, sheets.map(({ title }) => title)])).toEqual([
      [DEMO_PROJECT, [DEMO_SHEET]],
    ])
    const { tail } = await loadDocument(test.db, workspace.projects[0]!.sheets[0]!.id)
    const doc = new Y.Doc()
    for (const update of tail) Y.applyUpdate(doc, update)
    expect(readSheet(doc).rig.length).toBeGreaterThan(0)
  })

  it('is put there once: what people did with it stays done', async () => {
    await seedDemo(test.db)
    const { actor, workspaceId } = await lead()
    const before = await openWorkspace(actor, { workspaceId })
    await deleteSheet(actor, { sheetId: before.projects[0]!.sheets[0]!.id })
    await seedDemo(test.db)
    expect((await openWorkspace(actor, { workspaceId })).projects[0]!.sheets).toEqual([])
  })
})
