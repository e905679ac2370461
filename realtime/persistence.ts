import * as Y from 'yjs'
import type { Database } from '@/db/database'
import { appendUpdates, keepState, loadDocument } from '@/db/queries/sheet-documents'
import type { DocumentUpdate } from '@/db/queries/sheet-documents'

/** How many updates may follow a kept state before a new one is kept: what opening a sheet has to replay at most. */
export const TAIL_UPDATES = 200

export interface LoadedDocument {
  readonly doc: Y.Doc
  /** Bytes of state and tail, as stored. */
  readonly bytes: number
  /** How many updates the tail has. */
  readonly tail: number
}

/** Where a room keeps its document. */
export interface RoomStore {
  load(): Promise<LoadedDocument>
  /** Stores updates at the end, all or none; false where the sheet is gone. */
  append(updates: readonly DocumentUpdate[]): Promise<boolean>
  /** Folds state and tail into one new state. */
  compact(): Promise<void>
}

function replay(updates: readonly (Uint8Array | null)[]): Y.Doc {
  const doc = new Y.Doc()
  doc.transact(() => {
    for (const update of updates) if (update) Y.applyUpdate(doc, update)
  })
  return doc
}

/** Keeps a sheet's document in the database. */
export function sheetStore(db: Database, sheetId: string): RoomStore {
  return {
    load: async () => {
      const stored = await loadDocument(db, sheetId)
      return {
        doc: replay([stored.state, ...stored.tail]),
        bytes: [stored.state, ...stored.tail].reduce((sum, update) => sum + (update?.byteLength ?? 0), 0),
        tail: stored.tail.length,
      }
    },
    append: async (updates) => (await appendUpdates(db, sheetId, updates)) !== null,
    // Folded from what the database holds, not from a room's copy: another process may have added to the tail.
    compact: () =>
      db.transaction(async (tx) => {
        const stored = await loadDocument(tx, sheetId)
        if (stored.tail.length === 0) return
        const doc = replay([stored.state, ...stored.tail])
        await keepState(tx, sheetId, { sequence: stored.sequence, bytes: Y.encodeStateAsUpdate(doc) })
        doc.destroy()
      }),
  }
}
