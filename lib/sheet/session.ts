import * as Y from 'yjs'
import { readSheet } from './doc/read'
import type { SheetDefinition } from './doc/definition'
import { ORIGIN, sheetParts } from './doc/document'
import type { EnginePort } from './engine/port'
import type { FromEngine } from './engine/host'
import type { RunCurves } from './engine/runs'
import { SheetEdits } from './edits'
import { scopeOf } from './scope'
import { ViewBuilder } from './view-builder'
import type { SheetView } from './view'

/**
 * One sheet open in front of one person. Edits go into the document, the document goes to the engine, its values come
 * back into the view; nothing goes the other way.
 */
export class SheetSession {
  readonly edits: SheetEdits
  private readonly undoManager: Y.UndoManager
  private readonly listeners = new Set<() => void>()
  private readonly waiting = new Map<number, (curves: RunCurves | null) => void>()
  private readonly builder = new ViewBuilder()
  private definition: SheetDefinition
  private view: SheetView
  private sent = 0
  private worked = 0
  private requests = 0

  constructor(
    readonly doc: Y.Doc,
    private readonly engine: EnginePort,
    options: { readonly hyperformulaLicenseKey: string },
  ) {
    const { rig, columns, rows, cells } = sheetParts(doc)
    this.undoManager = new Y.UndoManager([rig, columns, rows, cells], { trackedOrigins: new Set([ORIGIN.local]) })
    this.definition = readSheet(doc)
    this.edits = new SheetEdits(doc, () => ({
      definition: this.definition,
      scope: scopeOf(this.definition),
      ambient_Pa: this.builder.ambient_Pa,
    }))
    this.view = this.builder.build(this.definition, true)
    engine.listen((message) => this.heard(message))
    engine.send({ type: 'open', licenseKey: options.hyperformulaLicenseKey })
    this.sendUpdate(Y.encodeStateAsUpdate(doc))
    doc.on('update', this.documentChanged)
  }

  getView = (): SheetView => this.view

  getDefinition = (): SheetDefinition => this.definition

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  undo(): void {
    this.undoManager.undo()
  }

  redo(): void {
    this.undoManager.redo()
  }

  /** The course of the run that a cell holds; null where it holds none. */
  curves(row: string, column: string): Promise<RunCurves | null> {
    const request = ++this.requests
    return new Promise((resolve) => {
      this.waiting.set(request, resolve)
      this.engine.send({ type: 'curves', request, row, column })
    })
  }

  close(): void {
    this.doc.off('update', this.documentChanged)
    this.undoManager.destroy()
    this.engine.close()
    this.listeners.clear()
  }

  private documentChanged = (update: Uint8Array): void => {
    this.definition = readSheet(this.doc)
    this.sendUpdate(update)
    this.refresh()
  }

  private sendUpdate(bytes: Uint8Array): void {
    this.engine.send({ type: 'update', serial: ++this.sent, bytes })
  }

  private heard(message: FromEngine): void {
    if (message.type === 'curves') {
      this.waiting.get(message.request)?.(message.curves)
      this.waiting.delete(message.request)
      return
    }
    this.worked = message.serial
    this.builder.take(message.changes)
    this.refresh()
  }

  private refresh(): void {
    this.view = this.builder.build(this.definition, this.worked < this.sent)
    for (const listener of this.listeners) listener()
  }
}
