import * as Y from 'yjs'
import { readSheet } from '../doc/read'
import type { ValueChanges } from '../values'
import { SheetEngine } from './engine'
import { runCurves } from './runs'
import type { RunCurves } from './runs'
import { VOCABULARY } from './vocabulary'

export type ToEngine =
  | { readonly type: 'open'; readonly licenseKey: string }
  | { readonly type: 'update'; readonly serial: number; readonly bytes: Uint8Array }
  | { readonly type: 'curves'; readonly request: number; readonly row: string; readonly column: string }

export type FromEngine =
  | { readonly type: 'changes'; readonly serial: number; readonly changes: ValueChanges }
  | { readonly type: 'curves'; readonly request: number; readonly curves: RunCurves | null }

/**
 * The engine behind a wall of messages, with its own replica of the document: in the browser the wall is a worker, on
 * the server a thread, in a test nothing. Updates that arrive while it works are taken together afterwards.
 */
export class EngineHost {
  private readonly doc = new Y.Doc()
  private engine: SheetEngine | null = null
  private serial = 0
  private due = false

  constructor(
    private readonly reply: (message: FromEngine) => void,
    /** Runs a task once the messages already waiting have been taken in. */
    private readonly later: (task: () => void) => void,
  ) {}

  take(message: ToEngine): void {
    switch (message.type) {
      case 'open':
        this.engine = new SheetEngine(VOCABULARY, message.licenseKey, reportLater)
        return
      case 'update':
        Y.applyUpdate(this.doc, message.bytes)
        this.serial = message.serial
        this.schedule()
        return
      case 'curves':
        this.reply({
          type: 'curves',
          request: message.request,
          curves: runCurves(this.engine?.valueOf(message.row, message.column) ?? null),
        })
        return
    }
  }

  private schedule(): void {
    if (this.due) return
    this.due = true
    this.later(() => {
      this.due = false
      if (!this.engine) return
      const { serial } = this
      this.reply({ type: 'changes', serial, changes: this.engine.update(readSheet(this.doc)) })
    })
  }
}

/** Into the console of the page or the thread, past the sheet that goes on working. */
function reportLater(mistake: unknown): void {
  setTimeout(() => {
    throw mistake
  })
}
