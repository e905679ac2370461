import { describe, expect, it } from 'vitest'
import { asc, eq } from 'drizzle-orm'
import { membershipsOf } from '@/db/queries/memberships'
import { appendUpdates, keepState, loadDocument } from '@/db/queries/sheet-documents'
import { addSheet, deleteSheet, findSheet, renameSheet, sheetsOf } from '@/db/queries/sheets'
import { addUser, findUserByEmail } from '@/db/queries/users'
import { sheetUpdates } from '@/db/schema'
import { testDatabase } from '../support/database'
import { makeMember, makeSheet, makeUser, makeWorkspace } from '../support/factories'

const test = testDatabase()
const bytes = (...values: number[]) => new Uint8Array(values)

describe('people', () => {
  it('finds an account however its e-mail is written', async () => {
    const user = await makeUser(test.db, { email: 'Mixed.Case@Test.example' })
    expect(user.email).toBe('mixed.case@test.example')
    expect(await findUserByEmail(test.db, '  MIXED.case@test.EXAMPLE ')).toMatchObject({ id: user.id })
  })

  it('keeps one account an e-mail', async () => {
    const account = { name: 'Twice', passwordHash: '-' }
    await addUser(test.db, { ...account, email: 'twice@test.example' })
    await expect(addUser(test.db, { ...account, email: 'TWICE@test.example' })).rejects.toThrow()
  })

  it('lists people with their workspaces, and nobody else’s', async () => {
    const workspace = await makeWorkspace(test.db)
    const engineer = await makeMember(test.db, workspace.id, 'engineer')
    await makeMember(test.db, workspace.id, 'viewer')
    const loner = await makeUser(test.db)
    const rows = await membershipsOf(test.db, [engineer.id, loner.id, crypto.randomUUID()])
    expect(rows.map(({ userId, workspaceId, role }) => ({ userId, workspaceId, role }))).toEqual([
      { userId: engineer.id, workspaceId: workspace.id, role: 'engineer' },
      { userId: loner.id, workspaceId: null, role: null },
    ])
    expect(rows[0]).toMatchObject({ name: engineer.name, email: engineer.email, demo: false })
  })
})

describe('sheets', () => {
  it('finds a sheet with the names of its place', async () => {
    const { sheet, project, workspace } = await makeSheet(test.db)
    expect(await findSheet(test.db, sheet.id)).toEqual({
      id: sheet.id,
      title: sheet.title,
      workspaceId: workspace.id,
      workspaceName: workspace.name,
      projectId: project.id,
      projectName: project.name,
    })
  })

  it('refuses a sheet in a project of another workspace', async () => {
    const { project, lead } = await makeSheet(test.db)
    const elsewhere = await makeWorkspace(test.db)
    const sheet = { workspaceId: elsewhere.id, projectId: project.id, title: 'Astray', createdBy: lead.id }
    await expect(addSheet(test.db, sheet)).rejects.toThrow()
  })

  it('lists the sheet changed last first, and by whom it was changed', async () => {
    const { sheet, project, workspace, lead, engineer } = await makeSheet(test.db)
    const place = { workspaceId: workspace.id, projectId: project.id, createdBy: lead.id }
    const newer = await addSheet(test.db, { ...place, title: 'Newer' })
    await appendUpdates(test.db, sheet.id, [{ bytes: bytes(1), userId: engineer.id }])
    await renameSheet(test.db, newer.id, 'Renamed')
    const listed = await sheetsOf(test.db, workspace.id)
    expect(listed.map(({ title, changedBy }) => [title, changedBy])).toEqual([
      [sheet.title, engineer.name],
      ['Renamed', lead.name],
    ])
    expect(listed[0]!.changedAt).toBeInstanceOf(Date)
  })

  it('hides a deleted sheet and keeps what it held', async () => {
    const { sheet, workspace, lead, engineer } = await makeSheet(test.db)
    await appendUpdates(test.db, sheet.id, [{ bytes: bytes(7), userId: engineer.id }])
    await deleteSheet(test.db, sheet.id, lead.id)
    expect(await findSheet(test.db, sheet.id)).toBeUndefined()
    expect(await sheetsOf(test.db, workspace.id)).toEqual([])
    expect((await loadDocument(test.db, sheet.id)).tail).toEqual([bytes(7)])
  })
})

describe('documents', () => {
  it('starts with nothing', async () => {
    const { sheet } = await makeSheet(test.db)
    expect(await loadDocument(test.db, sheet.id)).toEqual({ state: null, tail: [], sequence: 0 })
  })

  it('numbers updates from one without gaps, also when they are added at once', async () => {
    const { sheet, engineer, lead } = await makeSheet(test.db)
    const add = (userId: string, ...updates: Uint8Array[]) =>
      appendUpdates(
        test.db,
        sheet.id,
        updates.map((update) => ({ bytes: update, userId })),
      )
    const last = await Promise.all([
      add(engineer.id, bytes(1), bytes(2)),
      add(lead.id, bytes(3)),
      add(engineer.id, bytes(4), bytes(5), bytes(6)),
    ])
    expect(last).toEqual([2, 3, 6])
    const rows = await test.db
      .select()
      .from(sheetUpdates)
      .where(eq(sheetUpdates.sheetId, sheet.id))
      .orderBy(asc(sheetUpdates.sequence))
    expect(rows.map((row) => [row.sequence, [...row.bytes], row.userId])).toEqual([
      [1, [1], engineer.id],
      [2, [2], engineer.id],
      [3, [3], lead.id],
      [4, [4], engineer.id],
      [5, [5], engineer.id],
      [6, [6], engineer.id],
    ])
    expect(rows.every((row) => row.at instanceof Date)).toBe(true)
  })

  it('adds nothing to a sheet that is deleted or never was', async () => {
    const { sheet, lead } = await makeSheet(test.db)
    await deleteSheet(test.db, sheet.id, lead.id)
    const update = { bytes: bytes(1), userId: lead.id }
    expect(await appendUpdates(test.db, sheet.id, [update])).toBeNull()
    expect(await appendUpdates(test.db, crypto.randomUUID(), [update])).toBeNull()
    expect((await loadDocument(test.db, sheet.id)).sequence).toBe(0)
  })

  it('adds all of a batch or none', async () => {
    const { sheet, lead } = await makeSheet(test.db)
    const nobody = crypto.randomUUID()
    const batch = [
      { bytes: bytes(1), userId: lead.id },
      { bytes: bytes(2), userId: nobody },
    ]
    await expect(appendUpdates(test.db, sheet.id, batch)).rejects.toThrow()
    expect(await loadDocument(test.db, sheet.id)).toEqual({ state: null, tail: [], sequence: 0 })
    expect(await appendUpdates(test.db, sheet.id, batch.slice(0, 1))).toBe(1)
  })

  it('loads the kept state and what came after it', async () => {
    const { sheet, lead } = await makeSheet(test.db)
    const add = (value: number) => appendUpdates(test.db, sheet.id, [{ bytes: bytes(value), userId: lead.id }])
    for (const value of [1, 2, 3]) await add(value)
    await keepState(test.db, sheet.id, { sequence: 2, bytes: bytes(12) })
    expect(await loadDocument(test.db, sheet.id)).toEqual({ state: bytes(12), tail: [bytes(3)], sequence: 3 })
    await keepState(test.db, sheet.id, { sequence: 3, bytes: bytes(123) })
    expect(await loadDocument(test.db, sheet.id)).toEqual({ state: bytes(123), tail: [], sequence: 3 })
  })

  it('never replaces a state by an older one', async () => {
    const { sheet, lead } = await makeSheet(test.db)
    await appendUpdates(test.db, sheet.id, [{ bytes: bytes(1), userId: lead.id }])
    await appendUpdates(test.db, sheet.id, [{ bytes: bytes(2), userId: lead.id }])
    await keepState(test.db, sheet.id, { sequence: 2, bytes: bytes(12) })
    await keepState(test.db, sheet.id, { sequence: 1, bytes: bytes(99) })
    expect((await loadDocument(test.db, sheet.id)).state).toEqual(bytes(12))
  })
})
