import './environment'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import * as decoding from 'lib0/decoding'
import pino from 'pino'
import WebSocket from 'ws'
import { readAuthMessage } from 'y-protocols/auth'
import * as sync from 'y-protocols/sync'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import type { OpenDatabase } from '@/db/database'
import { environment } from '@/lib/env'
import { openLive } from '@/realtime/live'
import { MESSAGE } from '@/realtime/protocol'
import { sessionCookie } from './session'

/** A server that has the live side and no pages, on a port of its own. */
export async function startLive(database: OpenDatabase) {
  const live = await openLive(database, environment(), pino({ level: 'silent' }))
  const server = createServer()
  server.on('upgrade', (request, socket, head) => {
    if (!live.upgrade(request, socket, head)) socket.destroy()
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const { port } = server.address() as AddressInfo
  return {
    port,
    close: async () => {
      await live.close()
      server.closeAllConnections()
      await new Promise((resolve) => server.close(resolve))
    },
  }
}
export type LiveServer = Awaited<ReturnType<typeof startLive>>

interface Asking {
  /** The signed-in person; none is signed out. */
  readonly userId?: string
  readonly origin?: string | null
  readonly path?: string
  readonly sessionSeconds?: number
}

async function headersOf(server: LiveServer, asking: Asking): Promise<Record<string, string>> {
  const origin = asking.origin === undefined ? `http://127.0.0.1:${server.port}` : asking.origin
  const cookie = asking.userId && (await sessionCookie(asking.userId, { seconds: asking.sessionSeconds }))
  return { ...(origin ? { origin } : {}), ...(cookie ? { cookie } : {}) }
}

/** Asks in vain and gives the status of the answer, or asks and gives what the socket was closed with. */
export async function outcomeOf(server: LiveServer, sheetId: string, asking: Asking): Promise<string> {
  const url = `ws://127.0.0.1:${server.port}${asking.path ?? `/live/${sheetId}`}`
  const socket = new WebSocket(url, { headers: await headersOf(server, asking) })
  return new Promise((resolve) => {
    socket.on('unexpected-response', (request, response) => {
      request.destroy()
      resolve(`http ${response.statusCode}`)
    })
    socket.on('message', () => {
      resolve('in')
      socket.close()
    })
    socket.on('close', (code) => resolve(`closed ${code}`))
    socket.on('error', () => undefined)
  })
}

/** A browser's end of the wire, by hand: sends any bytes, and notes all that comes. */
export class HandMade {
  readonly doc = new Y.Doc()
  readonly refusals: string[] = []
  readonly presence: { clientId: number; clock: number; state: unknown }[] = []
  saved = 0
  syncs = 0
  closed: { code: number; reason: string } | undefined

  private constructor(private readonly socket: WebSocket) {
    socket.on('message', (data: Buffer) => this.hear(new Uint8Array(data)))
    socket.on('close', (code, reason) => (this.closed = { code, reason: reason.toString() }))
    socket.on('error', () => undefined)
  }

  static async connect(server: LiveServer, sheetId: string, asking: Asking): Promise<HandMade> {
    const headers = await headersOf(server, asking)
    const socket = new WebSocket(`ws://127.0.0.1:${server.port}/live/${sheetId}`, { headers })
    const client = new HandMade(socket)
    await new Promise((resolve, reject) => socket.once('open', resolve).once('error', reject))
    return client
  }

  send(bytes: Uint8Array | string): void {
    this.socket.send(bytes)
  }

  close(): void {
    this.socket.close()
  }

  private hear(bytes: Uint8Array): void {
    const decoder = decoding.createDecoder(bytes)
    switch (decoding.readVarUint(decoder)) {
      case MESSAGE.sync: {
        this.syncs++
        const type = decoding.readVarUint(decoder)
        const payload = decoding.readVarUint8Array(decoder)
        if (type !== sync.messageYjsSyncStep1) Y.applyUpdate(this.doc, payload, 'server')
        return
      }
      case MESSAGE.awareness: {
        const entries = decoding.createDecoder(decoding.readVarUint8Array(decoder))
        for (let count = decoding.readVarUint(entries); count > 0; count--) {
          const clientId = decoding.readVarUint(entries)
          const clock = decoding.readVarUint(entries)
          this.presence.push({ clientId, clock, state: JSON.parse(decoding.readVarString(entries)) })
        }
        return
      }
      case MESSAGE.refused:
        return readAuthMessage(decoder, this.doc, (_doc, reason) => this.refusals.push(reason))
      case MESSAGE.saved:
        this.saved = decoding.readVarUint(decoder)
    }
  }
}

/** A browser with the client that the screen uses. */
export async function browser(server: LiveServer, sheetId: string, userId: string, doc = new Y.Doc()) {
  const headers = await headersOf(server, { userId })
  class SignedIn extends WebSocket {
    constructor(url: string | URL, protocols?: string[]) {
      super(url, protocols, { headers })
    }
  }
  const provider = new WebsocketProvider(`ws://127.0.0.1:${server.port}/live`, sheetId, doc, {
    WebSocketPolyfill: SignedIn as never,
    disableBc: true,
  })
  provider.messageHandlers[MESSAGE.saved] = (_encoder, decoder) => decoding.readVarUint(decoder)
  provider.messageHandlers[MESSAGE.refused] = () => undefined
  return {
    doc,
    provider,
    close: () => {
      provider.destroy()
      doc.destroy()
    },
  }
}
export type Browser = Awaited<ReturnType<typeof browser>>
