import fc from 'fast-check'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import * as Y from 'yjs'
import { loadDocument } from '@/db/queries/sheet-documents'
import { deleteSheet } from '@/lib/workspace/server/delete-sheet'
import { TAIL_UPDATES } from '@/realtime/persistence'
import { LIMITS, MESSAGE } from '@/realtime/protocol'
import { testDatabase } from '../support/database'
import { comesToRest, eventually } from '../support/eventually'
import { changeRole, makeSheet, removeMember } from '../support/factories'
import { browser, HandMade, outcomeOf, startLive } from '../support/liveServer'
import type { Browser, LiveServer } from '../support/liveServer'
import { awarenessMessage, cellsOf, frame, step1Message, step2Message, typeInto, updateMessage } from '../support/wire'

const test = testDatabase()
type World = Awaited<ReturnType<typeof makeSheet>>
let server: LiveServer
let world: World
let open: { close: () => void }[]

beforeAll(async () => {
  server = await startLive(test.open)
})
afterAll(() => server.close())
beforeEach(async () => {
  world = await makeSheet(test.db)
  open = []
})
afterEach(() => {
  for (const client of open) client.close()
})

async function join(userId: string, doc?: Y.Doc): Promise<Browser> {
  const client = await browser(server, world.sheet.id, userId, doc)
  open.push(client)
  await eventually(() => expect(client.provider.synced).toBe(true))
  return client
}

async function handMade(userId: string): Promise<HandMade> {
  const client = await HandMade.connect(server, world.sheet.id, { userId })
  open.push(client)
  client.send(step1Message())
  await eventually(() => expect(client.syncs).toBeGreaterThanOrEqual(2))
  return client
}

/** What the database holds of the sheet, whatever the room holds. */
async function stored(): Promise<Record<string, string>> {
  const { state, tail } = await loadDocument(test.db, world.sheet.id)
  const doc = new Y.Doc()
  for (const update of [state, ...tail]) if (update) Y.applyUpdate(doc, update)
  return cellsOf(doc)
}

describe('who gets in', () => {
  it('members do, whatever their role', async () => {
    for (const { id } of [world.lead, world.engineer, world.viewer]) {
      expect(await outcomeOf(server, world.sheet.id, { userId: id })).toBe('in')
    }
  })

  it('the signed out are told so, and so is a session that is over', async () => {
    expect(await outcomeOf(server, world.sheet.id, {})).toBe('closed 4401')
    const over = { userId: world.lead.id, sessionSeconds: -60 }
    expect(await outcomeOf(server, world.sheet.id, over)).toBe('closed 4401')
    expect(await outcomeOf(server, world.sheet.id, { userId: crypto.randomUUID() })).toBe('closed 4401')
  })

  it('a stranger is told the same as of a sheet that is not there', async () => {
    expect(await outcomeOf(server, world.sheet.id, { userId: world.stranger.id })).toBe('closed 4404')
    expect(await outcomeOf(server, crypto.randomUUID(), { userId: world.lead.id })).toBe('closed 4404')
    await deleteSheet(world.lead, { sheetId: world.sheet.id })
    expect(await outcomeOf(server, world.sheet.id, { userId: world.lead.id })).toBe('closed 4404')
  })

  it('a page of another site does not, nor one that does not say where it is from', async () => {
    const userId = world.lead.id
    expect(await outcomeOf(server, world.sheet.id, { userId, origin: 'https://evil.example' })).toBe('http 403')
    expect(await outcomeOf(server, world.sheet.id, { userId, origin: 'null' })).toBe('http 403')
    expect(await outcomeOf(server, world.sheet.id, { userId, origin: null })).toBe('http 403')
  })

  it.each(['/live', '/live/', '/live/1', '/live/../live/x', '/live/%00'])('%s is no sheet', async (path) => {
    expect(await outcomeOf(server, '', { userId: world.lead.id, path })).toBe('http 404')
  })
})

describe('editing together', () => {
  it('everyone sees what each does, and the database holds it', async () => {
    const [engineer, lead, viewer] = [
      await join(world.engineer.id),
      await join(world.lead.id),
      await join(world.viewer.id),
    ]
    typeInto(engineer.doc, 'r1/p', '200 bar')
    typeInto(lead.doc, 'r2/p', '5 bar')
    const both = { 'r1/p': '200 bar', 'r2/p': '5 bar' }
    await eventually(() => {
      for (const { doc } of [engineer, lead, viewer]) expect(cellsOf(doc)).toEqual(both)
    })
    expect(await stored()).toEqual(both)
  })

  it('what was changed while away comes in afterwards', async () => {
    const engineer = await join(world.engineer.id)
    typeInto(engineer.doc, 'r1/p', '1 bar')
    engineer.provider.disconnect()
    typeInto(engineer.doc, 'r1/p', '2 bar')
    typeInto(engineer.doc, 'r2/p', '3 bar')
    const lead = await join(world.lead.id)
    engineer.provider.connect()
    await eventually(() => expect(cellsOf(lead.doc)).toEqual({ 'r1/p': '2 bar', 'r2/p': '3 bar' }))
  })

  it('says how many changes of a connection are stored', async () => {
    const engineer = await handMade(world.engineer.id)
    const doc = new Y.Doc()
    for (const value of ['1', '2', '3']) engineer.send(updateMessage(typeInto(doc, 'r1/p', value)))
    await eventually(() => expect(engineer.saved).toBe(3))
    expect(await stored()).toEqual({ 'r1/p': '3' })
  })

  it('stores nothing for a browser that comes back with nothing new', async () => {
    const engineer = await join(world.engineer.id)
    typeInto(engineer.doc, 'r1/p', '1 bar')
    typeInto(engineer.doc, 'r1/p', '2 bar')
    await eventually(async () => expect(await stored()).toEqual({ 'r1/p': '2 bar' }))
    const { sequence } = await loadDocument(test.db, world.sheet.id)
    const again = await handMade(world.engineer.id)
    again.send(step2Message(Y.encodeStateAsUpdate(engineer.doc)))
    again.send(updateMessage(Y.encodeStateAsUpdate(engineer.doc)))
    await eventually(() => expect(again.saved).toBe(1))
    expect((await loadDocument(test.db, world.sheet.id)).sequence).toBe(sequence)
  })

  it('takes changes that come in the wrong order', async () => {
    const lead = await join(world.lead.id)
    const engineer = await handMade(world.engineer.id)
    const doc = new Y.Doc()
    const [first, second] = [typeInto(doc, 'r1/p', '1'), typeInto(doc, 'r2/p', '2')]
    engineer.send(updateMessage(second))
    engineer.send(updateMessage(first))
    await eventually(() => expect(cellsOf(lead.doc)).toEqual({ 'r1/p': '1', 'r2/p': '2' }))
    expect(await stored()).toEqual({ 'r1/p': '1', 'r2/p': '2' })
  })
})

describe('a viewer', () => {
  it('is told that a change sent by hand was not kept; nobody sees it and nothing stores it', async () => {
    const engineer = await join(world.engineer.id)
    const viewer = await handMade(world.viewer.id)
    viewer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '999 bar')))
    viewer.send(step2Message(Y.encodeStateAsUpdate(new Y.Doc())))
    const other = new Y.Doc()
    typeInto(other, 'r2/p', '999 bar')
    viewer.send(step2Message(Y.encodeStateAsUpdate(other)))
    await eventually(() => expect(viewer.refusals).toHaveLength(2))
    expect(viewer.refusals[0]).toMatch(/read this sheet but not change it/)
    expect(viewer.saved).toBe(0)
    typeInto(engineer.doc, 'r3/p', '1 bar')
    await eventually(() => expect(cellsOf(viewer.doc)).toEqual({ 'r3/p': '1 bar' }))
    expect(cellsOf(engineer.doc)).toEqual({ 'r3/p': '1 bar' })
    expect(await stored()).toEqual({ 'r3/p': '1 bar' })
    expect(viewer.closed).toBeUndefined()
  })

  it('is not refused for offering what everyone has, deletions included', async () => {
    const engineer = await join(world.engineer.id)
    typeInto(engineer.doc, 'r1/p', '1 bar')
    typeInto(engineer.doc, 'r1/p', '2 bar')
    await eventually(async () => expect(await stored()).toEqual({ 'r1/p': '2 bar' }))
    const viewer = await handMade(world.viewer.id)
    viewer.send(step2Message(Y.encodeStateAsUpdate(viewer.doc)))
    viewer.send(updateMessage(typeInto(new Y.Doc(), 'r2/p', '999')))
    await eventually(() => expect(viewer.refusals).toHaveLength(1))
  })

  it('is one from the moment the role is changed, in an open connection', async () => {
    const engineer = await handMade(world.engineer.id)
    const doc = new Y.Doc()
    engineer.send(updateMessage(typeInto(doc, 'r1/p', '1')))
    await eventually(() => expect(engineer.saved).toBe(1))
    await changeRole(test.db, world.workspace.id, world.engineer.id, 'viewer')
    engineer.send(updateMessage(typeInto(doc, 'r1/p', '2')))
    await eventually(() => expect(engineer.refusals).toHaveLength(1))
    expect(await stored()).toEqual({ 'r1/p': '1' })
    await removeMember(test.db, world.workspace.id, world.engineer.id)
    engineer.send(updateMessage(typeInto(doc, 'r1/p', '3')))
    await eventually(() => expect(engineer.refusals).toHaveLength(2))
    expect(await stored()).toEqual({ 'r1/p': '1' })
  })
})

describe('being shut out', () => {
  it('a deleted sheet closes for everyone who has it open', async () => {
    const [engineer, viewer] = [await handMade(world.engineer.id), await handMade(world.viewer.id)]
    await deleteSheet(world.lead, { sheetId: world.sheet.id })
    await eventually(() => expect([engineer.closed?.code, viewer.closed?.code]).toEqual([4404, 4404]))
  })

  it('a session that lasts longer than a timer can wait stays', async () => {
    const client = await HandMade.connect(server, world.sheet.id, {
      userId: world.lead.id,
      sessionSeconds: 40 * 86_400,
    })
    open.push(client)
    await new Promise((resolve) => setTimeout(resolve, 200))
    expect(client.closed).toBeUndefined()
  })

  it('a session that runs out closes', async () => {
    const client = await HandMade.connect(server, world.sheet.id, { userId: world.lead.id, sessionSeconds: 1 })
    await eventually(() => expect(client.closed?.code).toBe(4401))
  })
})

describe('what is kept', () => {
  it('is there after the server was started anew', async () => {
    const own = await startLive(test.open)
    const engineer = await browser(own, world.sheet.id, world.engineer.id)
    await eventually(() => expect(engineer.provider.synced).toBe(true))
    typeInto(engineer.doc, 'r1/p', '7 bar')
    const watching = await browser(own, world.sheet.id, world.viewer.id)
    await eventually(() => expect(cellsOf(watching.doc)).toEqual({ 'r1/p': '7 bar' }))
    await own.close()
    expect(await stored()).toEqual({ 'r1/p': '7 bar' })
    engineer.close()
    watching.close()
    expect(cellsOf((await join(world.viewer.id)).doc)).toEqual({ 'r1/p': '7 bar' })
  })

  it('is folded into one state from time to time, with its history left as it was', async () => {
    const engineer = await handMade(world.engineer.id)
    const doc = new Y.Doc()
    const count = TAIL_UPDATES + 5
    for (let i = 1; i <= count; i++) {
      engineer.send(updateMessage(typeInto(doc, 'r1/p', `${i}`)))
      if (i % 100 === 0) await eventually(() => expect(engineer.saved).toBe(i))
    }
    await eventually(() => expect(engineer.saved).toBe(count))
    const { state, tail, sequence } = await loadDocument(test.db, world.sheet.id)
    expect(sequence).toBe(count)
    expect(state).not.toBeNull()
    expect(tail.length).toBeLessThan(TAIL_UPDATES)
    expect(await stored()).toEqual({ 'r1/p': `${count}` })
    expect(cellsOf((await join(world.viewer.id)).doc)).toEqual({ 'r1/p': `${count}` })
  })
})

describe('messages that are none', () => {
  const broken: readonly (readonly [string, Uint8Array | string])[] = [
    ['nothing', new Uint8Array()],
    ['text', 'hello'],
    ['an unknown type', frame(99)],
    ['a type that only the server sends', frame(MESSAGE.saved, () => undefined)],
    ['a sync message with nothing in it', frame(MESSAGE.sync)],
    ['a sync message of an unknown kind', new Uint8Array([MESSAGE.sync, 7, 1, 0])],
    ['a length beyond the end', new Uint8Array([MESSAGE.sync, 2, 200, 1, 1])],
    ['an update that is none', updateMessage(new Uint8Array([5, 5, 5, 5, 5]))],
    ['a state vector that is none', new Uint8Array([MESSAGE.sync, 0, 2, 9, 255])],
    ['an awareness message that is none', new Uint8Array([MESSAGE.awareness, 3, 1, 1, 1])],
    ['an awareness message with a false count', new Uint8Array([MESSAGE.awareness, 2, 255, 127])],
  ]

  it.each(broken)('%s closes its sender and nobody else', async (_what, message) => {
    const lead = await join(world.lead.id)
    const sender = await handMade(world.engineer.id)
    sender.send(message)
    await eventually(() => expect(sender.closed?.code).toBe(4400))
    typeInto(lead.doc, 'r1/p', 'still here')
    await eventually(async () => expect(await stored()).toEqual({ 'r1/p': 'still here' }))
    expect(lead.provider.wsconnected).toBe(true)
  })

  it('a document of another kind is refused, and leaves no trace', async () => {
    const lead = await join(world.lead.id)
    const sender = await handMade(world.engineer.id)
    const foreign = new Y.Doc()
    foreign.getText('diary').insert(0, 'not a sheet')
    sender.send(updateMessage(Y.encodeStateAsUpdate(foreign)))
    await eventually(() => expect(sender.closed?.code).toBe(4400))
    typeInto(lead.doc, 'r1/p', 'still here')
    const viewer = await join(world.viewer.id)
    await eventually(() => expect(cellsOf(viewer.doc)).toEqual({ 'r1/p': 'still here' }))
    expect([...viewer.doc.share.keys()]).not.toContain('diary')
    expect((await loadDocument(test.db, world.sheet.id)).sequence).toBe(1)
  })

  it('random bytes never hurt the room', async () => {
    const lead = await join(world.lead.id)
    typeInto(lead.doc, 'r1/p', '1 bar')
    await fc.assert(
      fc.asyncProperty(
        fc.oneof(
          fc.uint8Array({ maxLength: 64 }),
          fc.uint8Array({ maxLength: 64 }).map(updateMessage),
          fc.uint8Array({ maxLength: 64 }).map(step2Message),
        ),
        async (bytes) => {
          const sender = await handMade(world.engineer.id)
          sender.send(bytes)
          sender.send(frame(MESSAGE.queryAwareness))
          await eventually(() => expect(sender.closed ?? sender.presence.length).toBeTruthy())
          sender.close()
        },
      ),
      { numRuns: 60 },
    )
    typeInto(lead.doc, 'r2/p', '2 bar')
    const viewer = await join(world.viewer.id)
    await eventually(() => expect(cellsOf(viewer.doc)).toMatchObject({ 'r1/p': '1 bar', 'r2/p': '2 bar' }))
  })

  it('too large a message closes with a code that browsers do not come back from', async () => {
    const sender = await handMade(world.engineer.id)
    sender.send(new Uint8Array(LIMITS.messageBytes + 1))
    await eventually(() => expect(sender.closed?.code).toBe(4413))
  })

  it('too many messages at once close', async () => {
    const sender = await handMade(world.engineer.id)
    for (let i = 0; i <= LIMITS.burst + LIMITS.perSecond; i++) sender.send(frame(MESSAGE.queryAwareness))
    await eventually(() => expect(sender.closed?.code).toBe(4529))
  })
})

describe('presence', () => {
  const cell = { row: 'r1', column: 'p' }

  it('is under the name of the signed-in person, whatever the browser says', async () => {
    const lead = await handMade(world.lead.id)
    const engineer = await handMade(world.engineer.id)
    const user = { id: world.lead.id, name: 'The Boss', initials: 'TB', role: 'lead', colour: 99 }
    engineer.send(awarenessMessage({ clientId: 7, state: { cell, editing: true, user, extra: 'x'.repeat(10) } }))
    await eventually(() => expect(lead.presence).toHaveLength(1))
    const { id, name } = world.engineer
    expect(lead.presence[0]!.state).toEqual({
      cell,
      editing: true,
      user: { id, name, initials: expect.stringMatching(/^P/) as string, role: 'engineer', colour: 1 },
    })
    const late = await handMade(world.viewer.id)
    await eventually(() => expect(late.presence.map((entry) => entry.clientId)).toEqual([7]))
  })

  it('nobody speaks for somebody else, nor for two', async () => {
    const watching = await handMade(world.viewer.id)
    const lead = await handMade(world.lead.id)
    const engineer = await handMade(world.engineer.id)
    lead.send(awarenessMessage({ clientId: 1, state: { cell } }))
    await eventually(() => expect(watching.presence).toHaveLength(1))
    engineer.send(awarenessMessage({ clientId: 1, clock: 9, state: null }, { clientId: 2, state: { cell: null } }))
    engineer.send(awarenessMessage({ clientId: 3, state: { cell } }, { clientId: 1, clock: 99, state: { cell: null } }))
    engineer.send(awarenessMessage({ clientId: 2, clock: 2, state: { cell } }))
    await eventually(() => expect(watching.presence).toHaveLength(3))
    expect(watching.presence.map(({ clientId, state }) => [clientId, (state as { cell: unknown }).cell])).toEqual([
      [1, cell],
      [2, null],
      [2, cell],
    ])
  })

  it('goes when the connection goes', async () => {
    const watching = await handMade(world.viewer.id)
    const engineer = await handMade(world.engineer.id)
    engineer.send(awarenessMessage({ clientId: 5, state: { cell } }))
    await eventually(() => expect(watching.presence).toHaveLength(1))
    engineer.close()
    await eventually(() => expect(watching.presence).toHaveLength(2))
    expect(watching.presence[1]).toMatchObject({ clientId: 5, state: null })
    expect(watching.presence[1]!.clock).toBeGreaterThan(watching.presence[0]!.clock)
  })

  it('of one person in several windows comes to rest', async () => {
    const windows = await Promise.all([1, 2, 3, 4].map(() => join(world.engineer.id)))
    const watching = await handMade(world.viewer.id)
    for (const { provider } of windows) provider.awareness.setLocalState({ cell })
    await eventually(() => {
      const clients = new Set(watching.presence.flatMap(({ clientId, state }) => (state ? [clientId] : [])))
      expect(clients).toEqual(new Set(windows.map(({ doc }) => doc.clientID)))
    })
    await comesToRest(() => watching.presence.length)
  })

  it('of a browser whose old connection still hangs is taken over, and stays when that one goes', async () => {
    const watching = await handMade(world.viewer.id)
    const [old, back] = [await handMade(world.engineer.id), await handMade(world.engineer.id)]
    old.send(awarenessMessage({ clientId: 5, state: { cell: null } }))
    await eventually(() => expect(watching.presence).toHaveLength(1))
    back.send(awarenessMessage({ clientId: 5, state: { cell } }))
    await eventually(() => expect(watching.presence).toHaveLength(2))
    old.close()
    back.send(awarenessMessage({ clientId: 5, state: { cell, editing: true } }))
    await eventually(() => expect(watching.presence).toHaveLength(3))
    expect(watching.presence.map(({ state }) => state)).toMatchObject([{ cell: null }, { cell }, { editing: true }])
  })

  it('of a browser that comes back is seen at once', async () => {
    const [watching, engineer] = [await join(world.viewer.id), await join(world.engineer.id)]
    const seen = () => watching.provider.awareness.getStates().get(engineer.doc.clientID)
    engineer.provider.awareness.setLocalState({ cell })
    await eventually(() => expect(seen()).toMatchObject({ cell, user: { id: world.engineer.id } }))
    engineer.provider.disconnect()
    await eventually(() => expect(seen()).toBeUndefined())
    engineer.provider.connect()
    await eventually(() => expect(seen()).toMatchObject({ cell }))
  })
})
