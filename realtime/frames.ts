import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import { writePermissionDenied } from 'y-protocols/auth'
import { messageYjsSyncStep1, messageYjsSyncStep2, messageYjsUpdate, writeUpdate } from 'y-protocols/sync'
import type * as Y from 'yjs'
import * as sync from 'y-protocols/sync'
import { MESSAGE } from './protocol'

/** One entry of an awareness message: what a browser says about the client with this number. */
export interface AwarenessEntry {
  readonly clientId: number
  readonly clock: number
  /** null: gone. */
  readonly state: unknown
}

/** A frame from a browser, read and not yet believed. */
export type Frame =
  | { readonly type: 'step1'; readonly stateVector: Uint8Array }
  /** `counted`: an `update`, which the server acknowledges by number; not so a step 2. */
  | { readonly type: 'change'; readonly update: Uint8Array; readonly counted: boolean }
  | { readonly type: 'awareness'; readonly entries: readonly AwarenessEntry[] }
  | { readonly type: 'queryAwareness' }

/** Reads a frame; throws an Error on anything that is not one. */
export function readFrame(bytes: Uint8Array): Frame {
  const decoder = decoding.createDecoder(bytes)
  const type = decoding.readVarUint(decoder)
  switch (type) {
    case MESSAGE.sync:
      return readSync(decoder)
    case MESSAGE.awareness:
      return { type: 'awareness', entries: readAwareness(decoding.readVarUint8Array(decoder)) }
    case MESSAGE.queryAwareness:
      return { type: 'queryAwareness' }
    default:
      throw new Error(`No message of type ${type} comes from a browser.`)
  }
}

function readSync(decoder: decoding.Decoder): Frame {
  const type = decoding.readVarUint(decoder)
  const payload = decoding.readVarUint8Array(decoder)
  switch (type) {
    case messageYjsSyncStep1:
      return { type: 'step1', stateVector: payload }
    case messageYjsSyncStep2:
      return { type: 'change', update: payload, counted: false }
    case messageYjsUpdate:
      return { type: 'change', update: payload, counted: true }
    default:
      throw new Error(`No sync message of type ${type} is known.`)
  }
}

function readAwareness(bytes: Uint8Array): AwarenessEntry[] {
  const decoder = decoding.createDecoder(bytes)
  const count = decoding.readVarUint(decoder)
  const entries: AwarenessEntry[] = []
  // A count that is a lie ends with the bytes: reading beyond them throws.
  for (let i = 0; i < count; i++) {
    const clientId = decoding.readVarUint(decoder)
    const clock = decoding.readVarUint(decoder)
    const state: unknown = JSON.parse(decoding.readVarString(decoder))
    entries.push({ clientId, clock, state })
  }
  return entries
}

const frame = (type: number, write: (encoder: encoding.Encoder) => void): Uint8Array => {
  const encoder = encoding.createEncoder()
  encoding.writeVarUint(encoder, type)
  write(encoder)
  return encoding.toUint8Array(encoder)
}

/** Asks for what the other side has and we have not. */
export const step1Frame = (doc: Y.Doc) => frame(MESSAGE.sync, (encoder) => sync.writeSyncStep1(encoder, doc))

/** Answers a step 1. Throws where the state vector cannot be read. */
export const step2Frame = (doc: Y.Doc, stateVector: Uint8Array) =>
  frame(MESSAGE.sync, (encoder) => sync.writeSyncStep2(encoder, doc, stateVector))

export const updateFrame = (update: Uint8Array) => frame(MESSAGE.sync, (encoder) => writeUpdate(encoder, update))

export const awarenessFrame = (entries: readonly AwarenessEntry[]) =>
  frame(MESSAGE.awareness, (encoder) => {
    const inner = encoding.createEncoder()
    encoding.writeVarUint(inner, entries.length)
    for (const { clientId, clock, state } of entries) {
      encoding.writeVarUint(inner, clientId)
      encoding.writeVarUint(inner, clock)
      encoding.writeVarString(inner, JSON.stringify(state))
    }
    encoding.writeVarUint8Array(encoder, encoding.toUint8Array(inner))
  })

export const refusedFrame = (reason: string) =>
  frame(MESSAGE.refused, (encoder) => writePermissionDenied(encoder, reason))

export const savedFrame = (updates: number) =>
  frame(MESSAGE.saved, (encoder) => encoding.writeVarUint(encoder, updates))
