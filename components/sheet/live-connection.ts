import * as decoding from 'lib0/decoding'
import { readAuthMessage } from 'y-protocols/auth'
import { WebsocketProvider } from 'y-websocket'
import type * as Y from 'yjs'
import { CLOSE, LIVE_PATH, MESSAGE } from '@/realtime/protocol'
import type { PresentState } from '@/realtime/protocol'

export type LiveStatus = 'connecting' | 'live' | 'offline' | 'closed'

export interface Peer extends PresentState {
  readonly client: number
}

export interface LiveState {
  readonly status: LiveStatus
  /** Whether the whole sheet has arrived at least once. */
  readonly loaded: boolean
  /** Changes of one's own that the server has not yet said it has stored. */
  readonly unsaved: number
  /** Why the server refused a change, or closed for good. */
  readonly notice: string | null
  readonly peers: readonly Peer[]
}

const START: LiveState = { status: 'connecting', loaded: false, unsaved: 0, notice: null, peers: [] }

/** The line to the sheet's room: document both ways, who else is here, and what the server says about it. */
export class LiveConnection {
  private readonly provider: WebsocketProvider
  private readonly listeners = new Set<() => void>()
  private state = START
  private sent = 0
  private acknowledged = 0

  constructor(doc: Y.Doc, sheetId: string) {
    const { protocol, host } = window.location
    const server = `${protocol === 'https:' ? 'wss' : 'ws'}://${host}${LIVE_PATH}`
    // another tab hears of a change from the server, once it is stored, like everybody else
    this.provider = new WebsocketProvider(server, sheetId, doc, { connect: false, disableBc: true })
    this.provider.messageHandlers[MESSAGE.refused] = (_encoder, decoder) =>
      readAuthMessage(decoder, doc, (_doc, reason) => this.set({ notice: reason }))
    this.provider.messageHandlers[MESSAGE.saved] = (_encoder, decoder) => {
      this.acknowledged = decoding.readVarUint(decoder)
      this.countUnsaved()
    }
    this.provider.on('status', ({ status }) => {
      if (status === 'connected') {
        this.sent = 0
        this.acknowledged = 0
      }
      if (status === 'disconnected') this.set({ status: 'offline' })
    })
    this.provider.on('sync', (synced) => {
      if (synced) this.set({ status: 'live', loaded: true, unsaved: 0 })
    })
    this.provider.on('closed', ({ reason }) => this.set({ status: 'closed', notice: reason || CLOSE.notFound.reason }))
    this.provider.on('connection-close', () => {
      if (this.state.status !== 'closed') this.set({ status: 'offline' })
    })
    doc.on('update', (_update: Uint8Array, origin: unknown) => {
      if (origin === this.provider) return
      if (this.provider.wsconnected) this.sent++
      this.countUnsaved()
    })
    this.provider.awareness.on('change', () => this.set({ peers: this.peers() }))
    this.provider.connect()
  }

  getState = (): LiveState => this.state

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  /** Says where one is, to those who are here too. */
  present(cell: { readonly row: string; readonly column: string } | null): void {
    this.provider.awareness.setLocalState({ cell, editing: false })
  }

  dismissNotice(): void {
    this.set({ notice: null })
  }

  close(): void {
    this.listeners.clear()
    this.provider.destroy()
  }

  private countUnsaved(): void {
    const unsaved = this.provider.wsconnected ? Math.max(0, this.sent - this.acknowledged) : this.state.unsaved + 1
    this.set({ unsaved })
  }

  private peers(): Peer[] {
    const own = this.provider.awareness.clientID
    return [...this.provider.awareness.getStates().entries()].flatMap(([client, state]) =>
      client !== own && 'user' in state ? [{ ...(state as PresentState), client }] : [],
    )
  }

  private set(change: Partial<LiveState>): void {
    this.state = { ...this.state, ...change }
    for (const listener of this.listeners) listener()
  }
}
