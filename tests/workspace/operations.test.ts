import { beforeAll, describe, expect, it } from 'vitest'
import { findSheet } from '@/db/queries/sheets'
import type { Actor } from '@/lib/auth/policies'
import { Refusal } from '@/lib/auth/server/refusal'
import type { RefusalCode } from '@/lib/auth/server/refusal'
import { createProject } from '@/lib/workspace/server/create-project'
import { createSheet } from '@/lib/workspace/server/create-sheet'
import { deleteSheet } from '@/lib/workspace/server/delete-sheet'
import { openSheet } from '@/lib/workspace/server/open-sheet'
import { openWorkspace } from '@/lib/workspace/server/open-workspace'
import { renameSheet } from '@/lib/workspace/server/rename-sheet'
import { testDatabase } from '../support/database'
import { makeSheet } from '../support/factories'

const test = testDatabase()
type World = Awaited<ReturnType<typeof makeSheet>>
let world: World
beforeAll(async () => (world = await makeSheet(test.db)))

type Asker = 'signedOut' | 'stranger' | 'viewer' | 'engineer' | 'lead'
type Outcome = 'done' | RefusalCode
const ASKERS: readonly Asker[] = ['signedOut', 'stranger', 'viewer', 'engineer', 'lead']

interface Operation {
  readonly name: string
  readonly run: (actor: Actor | null, given: World) => Promise<unknown>
  /** For the askers, in their order. */
  readonly expected: readonly Outcome[]
}

const OPERATIONS: readonly Operation[] = [
  {
    name: 'open a workspace',
    run: (actor, { workspace }) => openWorkspace(actor, { workspaceId: workspace.id }),
    expected: ['signed_out', 'not_found', 'done', 'done', 'done'],
  },
  {
    name: 'open a sheet',
    run: (actor, { sheet }) => openSheet(actor, { sheetId: sheet.id }),
    expected: ['signed_out', 'not_found', 'done', 'done', 'done'],
  },
  {
    name: 'add a project',
    run: (actor, { workspace }) => createProject(actor, { workspaceId: workspace.id, name: 'Receivers' }),
    expected: ['signed_out', 'not_found', 'forbidden', 'done', 'done'],
  },
  {
    name: 'add a sheet',
    run: (actor, { project }) => createSheet(actor, { projectId: project.id, title: 'Let-down' }),
    expected: ['signed_out', 'not_found', 'forbidden', 'done', 'done'],
  },
  {
    name: 'rename a sheet',
    run: (actor, { sheet }) => renameSheet(actor, { sheetId: sheet.id, title: 'Renamed' }),
    expected: ['signed_out', 'not_found', 'forbidden', 'done', 'done'],
  },
  {
    name: 'delete a sheet',
    run: (actor, { sheet }) => deleteSheet(actor, { sheetId: sheet.id }),
    expected: ['signed_out', 'not_found', 'forbidden', 'forbidden', 'done'],
  },
]

async function outcomeOf(work: Promise<unknown>): Promise<Outcome> {
  try {
    await work
    return 'done'
  } catch (error) {
    if (error instanceof Refusal) return error.code
    throw error
  }
}

const cases = OPERATIONS.flatMap(({ name, run, expected }) =>
  ASKERS.map((asker, i) => ({ name, asker, run, expected: expected[i]! })),
)

describe('what people ask of the server', () => {
  it.each(cases)('$name, $asker: $expected', async ({ asker, run, expected }) => {
    expect(await outcomeOf(run(asker === 'signedOut' ? null : world[asker], world))).toBe(expected)
  })

  it.each(OPERATIONS)('$name: a made-up id is refused as a stranger’s is, nonsense as invalid', async ({ run }) => {
    const madeUp = { id: crypto.randomUUID() }
    const elsewhere = { ...world, workspace: madeUp, project: madeUp, sheet: madeUp } as World
    expect(await outcomeOf(run(world.lead, elsewhere))).toBe('not_found')
    const nonsense = { id: "x' or 1=1 --" }
    const broken = { ...world, workspace: nonsense, project: nonsense, sheet: nonsense } as World
    expect(await outcomeOf(run(world.lead, broken))).toBe('invalid')
  })

  it('a viewer who was refused has changed nothing', async () => {
    const fresh = await makeSheet(test.db)
    await outcomeOf(renameSheet(fresh.viewer, { sheetId: fresh.sheet.id, title: 'Mine now' }))
    await outcomeOf(deleteSheet(fresh.viewer, { sheetId: fresh.sheet.id }))
    expect(await findSheet(test.db, fresh.sheet.id)).toMatchObject({ title: fresh.sheet.title })
  })

  it('titles are trimmed, and refused when empty or too long, with a sentence', async () => {
    const { sheet, lead } = await makeSheet(test.db)
    const rename = (title: string) => renameSheet(lead, { sheetId: sheet.id, title })
    expect(await rename('  Bank\n B  ')).toEqual({ title: 'Bank B' })
    await expect(rename('  ')).rejects.toThrow('A name is needed.')
    await expect(rename('x'.repeat(121))).rejects.toThrow('at most 120')
    expect(await findSheet(test.db, sheet.id)).toMatchObject({ title: 'Bank B' })
  })

  it('tells the screen what each role may do', async () => {
    const { sheet, viewer, engineer, lead } = await makeSheet(test.db)
    const abilities = async (actor: Actor) => (await openSheet(actor, { sheetId: sheet.id })).can
    expect(await abilities(viewer)).toEqual({ edit: false, freeze: false, comment: true })
    expect(await abilities(engineer)).toEqual({ edit: true, freeze: false, comment: true })
    expect(await abilities(lead)).toEqual({ edit: true, freeze: true, comment: true })
  })

  it('a new sheet stands in the workspace’s list, a deleted one does not', async () => {
    const { workspace, project, sheet, lead } = await makeSheet(test.db)
    const { sheetId } = await createSheet(lead, { projectId: project.id, title: 'Second' })
    const titles = async () =>
      (await openWorkspace(lead, { workspaceId: workspace.id })).projects.flatMap((p) => p.sheets.map((s) => s.title))
    expect(await titles()).toEqual(['Second', sheet.title])
    await deleteSheet(lead, { sheetId })
    expect(await titles()).toEqual([sheet.title])
  })
})
