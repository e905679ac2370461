import { EventEmitter } from 'node:events'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { WebSocket } from 'ws'
import { Connection } from '@/realtime/connection'
import { LIMITS, MESSAGE } from '@/realtime/protocol'
import { frame } from '../support/wire'

/** A socket that hears what it is told, and goes on delivering after it was closed, as a real one does for a while. */
class FakeSocket extends EventEmitter {
  readonly OPEN = 1
  readyState = 1
  bufferedAmount = 0
  closedWith: number[] = []
  pings = 0
  terminated = false
  close = (code: number) => void this.closedWith.push(code)
  ping = () => void this.pings++
  terminate = () => void (this.terminated = true)
  send = vi.fn()
}

let socket: FakeSocket
let received: number
let connection: Connection
const deliver = (bytes: Uint8Array) => socket.emit('message', Buffer.from(bytes), true)
const question = frame(MESSAGE.queryAwareness)

beforeEach(() => {
  vi.useFakeTimers()
  socket = new FakeSocket()
  received = 0
  connection = new Connection(
    socket as unknown as WebSocket,
    { userId: 'me', name: 'Me', role: 'engineer' },
    () => received++,
    () => undefined,
  )
})
afterEach(() => vi.useRealTimers())

describe('a connection', () => {
  it('takes nothing more once a message was dropped: what follows would build on it', async () => {
    for (let i = 0; i < LIMITS.burst + 1; i++) deliver(question)
    expect(received).toBe(LIMITS.burst)
    expect(socket.closedWith).toEqual([4529])
    await vi.advanceTimersByTimeAsync(60_000)
    deliver(question)
    expect(received).toBe(LIMITS.burst)
  })

  it('takes a steady stream for ever', async () => {
    for (let second = 0; second < 60; second++) {
      for (let i = 0; i < LIMITS.perSecond; i++) deliver(question)
      await vi.advanceTimersByTimeAsync(1000)
    }
    expect(received).toBe(60 * LIMITS.perSecond)
    expect(socket.closedWith).toEqual([])
  })

  it('takes the presence that a full room sends back and forth', async () => {
    const presence = frame(MESSAGE.awareness)
    for (let second = 0; second < 30; second++) {
      for (let i = 0; i < 10 * LIMITS.roomMembers; i++) deliver(presence)
      await vi.advanceTimersByTimeAsync(1000)
    }
    expect(socket.closedWith).toEqual([])
  })

  it('that cannot keep up is closed', () => {
    socket.bufferedAmount = LIMITS.backlogBytes + 1
    connection.send(question)
    expect(socket.send).not.toHaveBeenCalled()
    expect(socket.closedWith).toEqual([4508])
  })

  it('that does not answer is ended; one that does is not', () => {
    connection.checkAlive()
    socket.emit('pong')
    connection.checkAlive()
    expect(socket.terminated).toBe(false)
    connection.checkAlive()
    expect(socket.terminated).toBe(true)
    expect(socket.pings).toBe(2)
  })
})
