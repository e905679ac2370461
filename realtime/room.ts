import * as Y from 'yjs'
import type { Logger } from 'pino'
import { initialsOf } from '@/lib/auth/initials'
import { sheetParts } from '@/lib/sheet/doc/document'
import type { Connection } from './connection'
import * as frames from './frames'
import type { Frame } from './frames'
import { TAIL_UPDATES } from './persistence'
import type { LoadedDocument, RoomStore } from './persistence'
import { PresenceList } from './presence'
import { CLOSE, LIMITS } from './protocol'
import type { Close } from './protocol'

export interface RoomParts {
  readonly store: RoomStore
  /** Those of some people who may change the sheet now: asked anew whenever changes are worked off. */
  readonly editorsAmong: (userIds: readonly string[]) => Promise<ReadonlySet<string>>
  readonly log: Logger
}

type Waiting = { readonly from: Connection; readonly frame: Extract<Frame, { type: 'change' | 'step1' }> }
type Change = { readonly from: Connection; readonly update: Uint8Array }

/** What became of a change. After `unusable` the document may be hurt and is to be loaded anew. */
type Verdict =
  | { readonly type: 'unchanged' }
  | { readonly type: 'changed'; readonly update: Uint8Array }
  | { readonly type: 'refused'; readonly reason: string }
  | { readonly type: 'unusable' }

const UNCHANGED: Verdict = { type: 'unchanged' }

/** How many messages are worked off together: enough to keep up, few enough that nobody waits long for their answer. */
const BATCH = 500

const READ_ONLY = 'You can read this sheet but not change it. What you changed here was not kept.'
const FULL = 'This sheet has reached the largest size that is kept. The change was not kept.'

/** The names of a sheet's parts: a document that has others was not made by our screen. */
const PARTS = (() => {
  const doc = new Y.Doc()
  sheetParts(doc)
  return new Set(doc.share.keys())
})()

/**
 * One sheet that people have open. Its document is what the database holds: a change is applied, stored, and only then
 * shown to anybody else; whoever asks for the document while one is being stored waits for it. Changes that come in
 * meanwhile are stored together.
 */
export class Room {
  private readonly connections = new Map<Connection, { acknowledged: number }>()
  private readonly presence = new PresenceList<Connection>()
  private inbox: Waiting[] = []
  private working: Promise<void> | null = null
  private over = false

  private constructor(
    private readonly parts: RoomParts,
    private loaded: LoadedDocument,
  ) {}

  static async open(parts: RoomParts): Promise<Room> {
    return new Room(parts, await parts.store.load())
  }

  get size(): number {
    return this.connections.size
  }

  /** True after the document could not be stored: what the room holds is then worth nothing, and it is to be opened anew. */
  get isOver(): boolean {
    return this.over
  }

  enter(connection: Connection): void {
    if (this.over) return connection.close(CLOSE.storage)
    if (this.connections.size >= LIMITS.roomMembers) return connection.close(CLOSE.roomFull)
    const { userId, name, role } = connection.person
    this.connections.set(connection, { acknowledged: 0 })
    this.presence.enter(connection, { id: userId, name, initials: initialsOf(name), role })
    connection.send(frames.step1Frame(this.loaded.doc))
    connection.send(frames.awarenessFrame(this.presence.everyoneBut(connection)))
  }

  leave(connection: Connection): void {
    if (!this.connections.delete(connection)) return
    this.inbox = this.inbox.filter((waiting) => waiting.from !== connection || waiting.frame.type === 'change')
    this.broadcast(frames.awarenessFrame(this.presence.leave(connection)))
  }

  /** Takes a message as it came off the wire; what cannot be read closes its sender and nobody else. */
  receive(from: Connection, bytes: Uint8Array): void {
    if (!this.connections.has(from)) return
    let frame: Frame
    try {
      frame = frames.readFrame(bytes)
      // Read once on the side: a broken update throws here, before it touches the document.
      if (frame.type === 'change') Y.decodeUpdate(frame.update)
      if (frame.type === 'step1') Y.decodeStateVector(frame.stateVector)
    } catch {
      return this.expel(from, CLOSE.malformed)
    }
    switch (frame.type) {
      case 'awareness': {
        const heard = this.presence.hear(from, frame.entries)
        if (heard.length > 0) this.broadcast(frames.awarenessFrame(heard), from)
        return
      }
      case 'queryAwareness':
        return from.send(frames.awarenessFrame(this.presence.everyoneBut(from)))
      case 'step1':
      case 'change':
        this.inbox.push({ from, frame })
        this.working ??= this.work()
    }
  }

  /** Asks of every connection whether it may stay; one that may not is closed with the reason. */
  async recheck(mayStay: (userId: string) => Promise<Close | null>): Promise<void> {
    for (const connection of [...this.connections.keys()]) {
      const reason = await mayStay(connection.person.userId)
      if (reason) this.expel(connection, reason)
    }
  }

  checkAlive(): void {
    for (const connection of this.connections.keys()) connection.checkAlive()
  }

  /** Closes every connection, and settles when everything that came in before is stored. */
  async close(reason: Close): Promise<void> {
    for (const connection of this.connections.keys()) connection.close(reason)
    await this.settle()
  }

  /** Settles when nothing is left to store, with the tail folded into a state. */
  async settle(): Promise<void> {
    while (this.working) await this.working
    if (!this.over && this.loaded.tail > 0) await this.compact()
  }

  private async work(): Promise<void> {
    try {
      while (this.inbox.length > 0 && !this.over) await this.workOff(this.inbox.splice(0, BATCH))
    } catch (error) {
      this.parts.log.error({ err: error }, 'a change could not be stored: the room is closed and opened anew')
      this.end(CLOSE.storage)
    } finally {
      this.working = null
    }
  }

  private async workOff(waiting: readonly Waiting[]): Promise<void> {
    const senders = new Set(waiting.flatMap(({ from, frame }) => (frame.type === 'change' ? [from.person.userId] : [])))
    const editors = senders.size > 0 ? await this.parts.editorsAmong([...senders]) : senders
    const changes: Change[] = []
    const dealtWith: Waiting[] = []
    for (const [i, { from, frame }] of waiting.entries()) {
      if (frame.type === 'change') {
        const verdict = this.take(frame.update, editors.has(from.person.userId))
        if (verdict.type === 'unusable') {
          this.expel(from, CLOSE.malformed)
          await this.keep(changes)
          await this.reload()
          this.answer(dealtWith)
          // What came after it is worked off on a clean document.
          this.inbox.unshift(...waiting.slice(i + 1))
          return
        }
        if (verdict.type === 'refused') {
          from.send(frames.refusedFrame(verdict.reason))
          continue
        }
        if (verdict.type === 'changed') changes.push({ from, update: verdict.update })
      }
      dealtWith.push(waiting[i]!)
    }
    await this.keep(changes)
    this.answer(dealtWith)
  }

  /** Applies a change to the document, if it may and can be. */
  private take(update: Uint8Array, mayEdit: boolean): Verdict {
    const { doc, bytes } = this.loaded
    // Browsers offer what they hold whenever they connect; what is known already is no change, whoever sends it.
    if (!mayEdit) {
      return Y.snapshotContainsUpdate(Y.snapshot(doc), update) ? UNCHANGED : { type: 'refused', reason: READ_ONLY }
    }
    if (bytes + update.byteLength > LIMITS.sheetBytes) return { type: 'refused', reason: FULL }
    const changed: Uint8Array[] = []
    const capture = (part: Uint8Array) => changed.push(part)
    doc.on('update', capture)
    try {
      Y.applyUpdate(doc, update)
    } catch {
      return { type: 'unusable' }
    } finally {
      doc.off('update', capture)
    }
    for (const name of doc.share.keys()) if (!PARTS.has(name)) return { type: 'unusable' }
    const { pendingStructs, pendingDs } = doc.store
    if (pendingStructs || pendingDs) {
      // It builds on something that has not come in yet, and Yjs keeps it aside: then it is stored as it came, since the
      // document hands out what is kept aside too.
      const aside = (pendingStructs?.update.byteLength ?? 0) + (pendingDs?.byteLength ?? 0)
      return aside > LIMITS.messageBytes ? { type: 'unusable' } : { type: 'changed', update }
    }
    return changed.length > 0 ? { type: 'changed', update: Y.mergeUpdates(changed) } : UNCHANGED
  }

  /** Stores changes, then shows them to the others. */
  private async keep(changes: readonly Change[]): Promise<void> {
    if (changes.length === 0) return
    const stored = await this.parts.store.append(
      changes.map(({ from, update }) => ({ bytes: update, userId: from.person.userId })),
    )
    if (!stored) return this.end(CLOSE.notFound)
    for (const { from, update } of changes) this.broadcast(frames.updateFrame(update), from)
    const bytes = changes.reduce((sum, { update }) => sum + update.byteLength, this.loaded.bytes)
    this.loaded = { ...this.loaded, bytes, tail: this.loaded.tail + changes.length }
    if (this.loaded.tail >= TAIL_UPDATES) await this.compact()
  }

  /** Answers what was waiting for changes to be stored: acknowledgements, and requests for the document. */
  private answer(waiting: readonly Waiting[]): void {
    const acknowledge = new Set<Connection>()
    for (const { from, frame } of waiting) {
      const state = this.connections.get(from)
      if (!state) continue
      if (frame.type === 'step1') {
        from.send(frames.step2Frame(this.loaded.doc, frame.stateVector))
      } else {
        if (frame.counted) state.acknowledged += 1
        acknowledge.add(from)
      }
    }
    for (const from of acknowledge) from.send(frames.savedFrame(this.connections.get(from)!.acknowledged))
  }

  private async compact(): Promise<void> {
    await this.parts.store.compact()
    this.loaded = { ...this.loaded, tail: 0 }
  }

  private async reload(): Promise<void> {
    this.loaded.doc.destroy()
    this.loaded = await this.parts.store.load()
  }

  private end(reason: Close): void {
    this.over = true
    this.inbox = []
    for (const connection of [...this.connections.keys()]) this.expel(connection, reason)
  }

  private expel(connection: Connection, reason: Close): void {
    connection.close(reason)
    this.leave(connection)
  }

  private broadcast(bytes: Uint8Array, except?: Connection): void {
    for (const connection of this.connections.keys()) if (connection !== except) connection.send(bytes)
  }
}
