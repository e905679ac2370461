import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import pino from 'pino'
import WebSocket, { WebSocketServer } from 'ws'
import * as Y from 'yjs'
import type { DocumentUpdate } from '@/db/queries/sheet-documents'
import { Connection } from '@/realtime/connection'
import type { RoomStore } from '@/realtime/persistence'
import { CLOSE } from '@/realtime/protocol'
import { Room } from '@/realtime/room'
import { eventually } from '../support/eventually'
import { cellsOf, step1Message, typeInto, updateMessage } from '../support/wire'

/** A store that waits for leave before each write, and counts what it was asked to keep. */
class SlowStore implements RoomStore {
  readonly kept: Uint8Array[] = []
  readonly batches: number[] = []
  compactions = 0
  loads = 0
  private waiting: { go: (stored: boolean) => void; fail: (error: Error) => void }[] = []

  async load() {
    this.loads++
    const doc = new Y.Doc()
    for (const update of this.kept) Y.applyUpdate(doc, update)
    return { doc, bytes: 0, tail: this.kept.length }
  }

  async append(updates: readonly DocumentUpdate[]) {
    const stored = await new Promise<boolean>((go, fail) => this.waiting.push({ go, fail }))
    if (stored) this.kept.push(...updates.map(({ bytes }) => bytes))
    this.batches.push(updates.length)
    return stored
  }

  async compact() {
    this.compactions++
  }

  get asked() {
    return this.waiting.length
  }

  next(stored = true) {
    this.waiting.shift()!.go(stored)
  }

  fail() {
    this.waiting.shift()!.fail(new Error('the disk is full'))
  }
}

let store: SlowStore
let room: Room
let sockets: WebSocketServer
let clients: WebSocket[]

beforeEach(async () => {
  store = new SlowStore()
  const editorsAmong = async (userIds: readonly string[]) => new Set(userIds)
  room = await Room.open({ store, editorsAmong, log: pino({ level: 'silent' }) })
  const server = createServer()
  sockets = new WebSocketServer({ server })
  clients = []
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  sockets.on('connection', (socket, request) => {
    const userId = request.url!.slice(1)
    const connection: Connection = new Connection(
      socket,
      { userId, name: userId, role: 'engineer' },
      (bytes) => room.receive(connection, bytes),
      () => room.leave(connection),
    )
    room.enter(connection)
  })
  sockets.on('close', () => server.close())
})
afterEach(() => {
  for (const client of clients) client.terminate()
  sockets.close()
})

/** Somebody in the room: their document, and how many messages came. */
async function enter(userId: string) {
  const { port } = sockets.address() as AddressInfo
  const socket = new WebSocket(`ws://127.0.0.1:${port}/${userId}`)
  clients.push(socket)
  const doc = new Y.Doc()
  const seen = { doc, heard: 0, closed: 0, send: (bytes: Uint8Array) => socket.send(bytes) }
  socket.on('message', (data: Buffer) => {
    seen.heard++
    // Sync messages other than step 1: type, kind, then an update with its length in one byte here.
    if (data[0] === 0 && data[1] !== 0) Y.applyUpdate(doc, new Uint8Array(data.subarray(3)))
  })
  socket.on('close', (code) => (seen.closed = code))
  await eventually(() => expect(seen.heard).toBeGreaterThanOrEqual(2))
  return seen
}

/** Time for anything that was wrongly sent to arrive. */
const aWhile = () => new Promise((resolve) => setTimeout(resolve, 80))

describe('a room', () => {
  it('shows a change to nobody before it is stored, not even to one who comes in meanwhile', async () => {
    const [engineer, other] = [await enter('engineer'), await enter('other')]
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '200 bar')))
    await eventually(() => expect(store.asked).toBe(1))
    const late = await enter('late')
    late.send(step1Message())
    await aWhile()
    expect(cellsOf(other.doc)).toEqual({})
    expect(cellsOf(late.doc)).toEqual({})
    expect(store.kept).toHaveLength(0)
    store.next()
    await eventually(() => {
      expect(cellsOf(other.doc)).toEqual({ 'r1/p': '200 bar' })
      expect(cellsOf(late.doc)).toEqual({ 'r1/p': '200 bar' })
    })
    expect(store.kept).toHaveLength(1)
  })

  it('stores together what comes in while it is storing, in order', async () => {
    const [engineer, other] = [await enter('engineer'), await enter('other')]
    const doc = new Y.Doc()
    engineer.send(updateMessage(typeInto(doc, 'r1/p', '1')))
    await eventually(() => expect(store.asked).toBe(1))
    for (const value of ['2', '3', '4']) engineer.send(updateMessage(typeInto(doc, 'r1/p', value)))
    await aWhile()
    store.next()
    await eventually(() => expect(store.asked).toBe(1))
    expect(cellsOf(other.doc)).toEqual({ 'r1/p': '1' })
    store.next()
    await eventually(() => expect(cellsOf(other.doc)).toEqual({ 'r1/p': '4' }))
    expect(store.batches).toEqual([1, 3])
  })

  it('that cannot store sends everyone away to come back, having shown nothing', async () => {
    const [engineer, other] = [await enter('engineer'), await enter('other')]
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '1')))
    await eventually(() => expect(store.asked).toBe(1))
    store.fail()
    await eventually(() => expect([engineer.closed, other.closed]).toEqual([CLOSE.storage.code, CLOSE.storage.code]))
    expect(cellsOf(other.doc)).toEqual({})
    expect(room.isOver).toBe(true)
    expect(room.size).toBe(0)
  })

  it('of a sheet that is gone meanwhile says so', async () => {
    const engineer = await enter('engineer')
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '1')))
    await eventually(() => expect(store.asked).toBe(1))
    store.next(false)
    await eventually(() => expect(engineer.closed).toBe(CLOSE.notFound.code))
  })

  it('closes only after what came in is stored', async () => {
    const engineer = await enter('engineer')
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '1')))
    await eventually(() => expect(store.asked).toBe(1))
    const closed = vi.fn()
    const closing = room.close(CLOSE.shutdown).then(closed)
    await eventually(() => expect(engineer.closed).toBe(CLOSE.shutdown.code))
    await aWhile()
    expect(closed).not.toHaveBeenCalled()
    store.next()
    await closing
    expect(store.kept).toHaveLength(1)
    expect(store.compactions).toBe(1)
  })

  it('takes up the document from the store after a change that may have hurt it, and keeps what came before', async () => {
    const [engineer, other] = [await enter('engineer'), await enter('other')]
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r1/p', '1')))
    await eventually(() => expect(store.asked).toBe(1))
    const foreign = new Y.Doc()
    foreign.getMap('elsewhere').set('x', 1)
    engineer.send(updateMessage(typeInto(new Y.Doc(), 'r2/p', '2')))
    await aWhile()
    engineer.send(updateMessage(Y.encodeStateAsUpdate(foreign)))
    other.send(updateMessage(typeInto(new Y.Doc(), 'r3/p', '3')))
    await aWhile()
    while (store.kept.length < 3) {
      await eventually(() => expect(store.asked).toBe(1))
      store.next()
      await aWhile()
    }
    await eventually(() => expect(engineer.closed).toBe(CLOSE.malformed.code))
    expect(store.loads).toBe(2)
    const late = await enter('late')
    late.send(step1Message())
    await eventually(() => expect(cellsOf(late.doc)).toEqual({ 'r1/p': '1', 'r2/p': '2', 'r3/p': '3' }))
    expect(other.closed).toBe(0)
  })
})
