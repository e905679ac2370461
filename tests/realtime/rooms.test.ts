import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import pino from 'pino'
import { CLOSE } from '@/realtime/protocol'
import type { Room } from '@/realtime/room'
import { Rooms } from '@/realtime/rooms'

/** A room that is counted in and out, and settles when it is let. */
class FakeRoom {
  size = 0
  isOver = false
  closed = false
  settling: (() => void) | undefined
  settle = () => new Promise<void>((resolve) => (this.settling = resolve))
  close = async () => void (this.closed = true)
}

const SHEET = { id: 'sheet', workspaceId: 'workspace' }
let opened: FakeRoom[]
let rooms: Rooms
const enter = async (): Promise<FakeRoom> => {
  let entered: FakeRoom | undefined
  await rooms.enter(SHEET, (room) => {
    entered = room as unknown as FakeRoom
    entered.size++
  })
  return entered!
}
const leave = (room: FakeRoom) => {
  room.size--
  rooms.left(SHEET.id)
}

beforeEach(() => {
  vi.useFakeTimers()
  opened = []
  const openRoom = async () => {
    const room = new FakeRoom()
    opened.push(room)
    return room as unknown as Room
  }
  rooms = new Rooms(openRoom, pino({ level: 'silent' }))
})
afterEach(() => vi.useRealTimers())

describe('the rooms of a process', () => {
  it('are one a sheet, also for people who come at once', async () => {
    const entered = await Promise.all([enter(), enter(), enter()])
    expect(opened).toHaveLength(1)
    expect(new Set(entered).size).toBe(1)
    expect(opened[0]!.size).toBe(3)
  })

  it('stay while somebody is in, and for a while after', async () => {
    const room = await enter()
    await vi.advanceTimersByTimeAsync(60_000)
    leave(room)
    await vi.advanceTimersByTimeAsync(1_000)
    expect(await enter()).toBe(room)
    await vi.advanceTimersByTimeAsync(60_000)
    expect(await enter()).toBe(room)
    expect(opened).toHaveLength(1)
  })

  it('go when all is stored, and the next person gets a new one', async () => {
    const room = await enter()
    leave(room)
    await vi.advanceTimersByTimeAsync(10_000)
    room.settling!()
    await vi.advanceTimersByTimeAsync(0)
    expect(await enter()).not.toBe(room)
    expect(opened).toHaveLength(2)
  })

  it('never are two of one sheet: who comes while a room is being emptied gets that room, which then stays', async () => {
    const room = await enter()
    leave(room)
    await vi.advanceTimersByTimeAsync(10_000)
    expect(room.settling).toBeDefined()
    expect(await enter()).toBe(room)
    room.settling!()
    await vi.advanceTimersByTimeAsync(0)
    expect(await enter()).toBe(room)
    expect(opened).toHaveLength(1)
  })

  it('that are over are opened anew', async () => {
    const room = await enter()
    room.isOver = true
    expect(await enter()).not.toBe(room)
    expect(opened).toHaveLength(2)
  })

  it('that could not be opened are tried anew', async () => {
    const failing = new Rooms(
      vi
        .fn()
        .mockRejectedValueOnce(new Error('no database'))
        .mockResolvedValueOnce(new FakeRoom() as unknown as Room),
      pino({ level: 'silent' }),
    )
    await expect(failing.enter(SHEET, () => undefined)).rejects.toThrow('no database')
    await expect(failing.enter(SHEET, () => undefined)).resolves.toBeUndefined()
  })

  it('are all closed at the end', async () => {
    const room = await enter()
    await rooms.close(CLOSE.shutdown)
    expect(room.closed).toBe(true)
  })
})
