import * as encoding from 'lib0/encoding'
import * as sync from 'y-protocols/sync'
import * as Y from 'yjs'
import { sheetParts } from '@/lib/sheet/doc/document'
import { MESSAGE } from '@/realtime/protocol'

/*
 * Messages as a browser sends them, written by hand.
 */

export function frame(type: number, write: (encoder: encoding.Encoder) => void = () => undefined): Uint8Array {
  const encoder = encoding.createEncoder()
  encoding.writeVarUint(encoder, type)
  write(encoder)
  return encoding.toUint8Array(encoder)
}

export const updateMessage = (update: Uint8Array) => frame(MESSAGE.sync, (encoder) => sync.writeUpdate(encoder, update))

export const step2Message = (update: Uint8Array) =>
  frame(MESSAGE.sync, (encoder) => {
    encoding.writeVarUint(encoder, sync.messageYjsSyncStep2)
    encoding.writeVarUint8Array(encoder, update)
  })

export const step1Message = (doc = new Y.Doc()) => frame(MESSAGE.sync, (encoder) => sync.writeSyncStep1(encoder, doc))

export const awarenessMessage = (...entries: readonly { clientId: number; clock?: number; state: unknown }[]) =>
  frame(MESSAGE.awareness, (encoder) => {
    const inner = encoding.createEncoder()
    encoding.writeVarUint(inner, entries.length)
    for (const { clientId, clock = 1, state } of entries) {
      encoding.writeVarUint(inner, clientId)
      encoding.writeVarUint(inner, clock)
      encoding.writeVarString(inner, JSON.stringify(state))
    }
    encoding.writeVarUint8Array(encoder, encoding.toUint8Array(inner))
  })

/** Types into a cell, as the screen does; gives the update that goes over the wire. */
export function typeInto(doc: Y.Doc, cell: string, text: string): Uint8Array {
  const updates: Uint8Array[] = []
  const capture = (update: Uint8Array) => updates.push(update)
  doc.on('update', capture)
  sheetParts(doc).cells.set(cell, text)
  doc.off('update', capture)
  return Y.mergeUpdates(updates)
}

export const cellsOf = (doc: Y.Doc): Record<string, string> => Object.fromEntries(sheetParts(doc).cells.entries())
