import { Buffer } from 'node:buffer'
import type { RawData, WebSocket } from 'ws'
import type { Role } from '@/lib/auth/policies'
import { CLOSE, LIMITS, MESSAGE } from './protocol'
import type { Close } from './protocol'

/**
 * What a message about presence takes of the allowance, where any other takes one: browsers send back all that they hear
 * of others, so that in a full room most of it is not of their own doing.
 */
const PRESENCE_COST = 0.02

/** Who is at the other end. The role is what it was on entering: for show, never for a decision. */
export interface Person {
  readonly userId: string
  readonly name: string
  readonly role: Role
}

/** One browser's socket, held to its limits. */
export class Connection {
  private allowance: number = LIMITS.burst
  private refilledAt = Date.now()
  private alive = true
  private ended = false

  constructor(
    private readonly socket: WebSocket,
    readonly person: Person,
    receive: (bytes: Uint8Array) => void,
    closed: () => void,
  ) {
    socket.on('message', (data, isBinary) => {
      // What still comes in after a message was dropped would build on it: nothing of it is taken.
      if (this.ended) return
      if (!isBinary) return this.close(CLOSE.malformed)
      const bytes = toBytes(data)
      if (bytes.byteLength > LIMITS.messageBytes) return this.close(CLOSE.tooLarge)
      if (!this.spend(bytes[0] === MESSAGE.awareness ? PRESENCE_COST : 1)) return this.close(CLOSE.tooMany)
      receive(bytes)
    })
    socket.on('pong', () => (this.alive = true))
    socket.on('close', closed)
    // A broken frame or a lost line: ws closes the socket itself, and 'close' follows.
    socket.on('error', () => undefined)
  }

  send(bytes: Uint8Array): void {
    if (this.socket.readyState !== this.socket.OPEN) return
    if (this.socket.bufferedAmount > LIMITS.backlogBytes) return this.close(CLOSE.tooSlow)
    this.socket.send(bytes)
  }

  close(close: Close): void {
    this.ended = true
    this.socket.close(close.code, close.reason)
  }

  /** Called now and then: ends a connection that has not answered the last time. */
  checkAlive(): void {
    if (!this.alive) return this.socket.terminate()
    this.alive = false
    this.socket.ping()
  }

  /** Takes a message out of an allowance that refills with time. */
  private spend(cost: number): boolean {
    const now = Date.now()
    this.allowance = Math.min(LIMITS.burst, this.allowance + ((now - this.refilledAt) / 1000) * LIMITS.perSecond)
    this.refilledAt = now
    if (this.allowance < cost) return false
    this.allowance -= cost
    return true
  }
}

function toBytes(data: RawData): Uint8Array {
  if (Array.isArray(data)) return Buffer.concat(data)
  return data instanceof ArrayBuffer ? new Uint8Array(data) : data
}
