'use client'

import { useEffect, useState, useSyncExternalStore } from 'react'
import * as Y from 'yjs'
import { workerPort } from '@/lib/sheet/engine/worker-port'
import { SheetSession } from '@/lib/sheet/session'
import type { SheetView } from '@/lib/sheet/view'
import { LiveConnection } from './live-connection'
import type { LiveState } from './live-connection'

export interface OpenSheet {
  readonly session: SheetSession
  readonly connection: LiveConnection
}

/** Opens the sheet for as long as the screen stands: a document, its engine in a worker, and the line to its room. */
export function useOpenSheet(sheetId: string, hyperformulaLicenseKey: string): OpenSheet | null {
  const [open, setOpen] = useState<OpenSheet | null>(null)
  useEffect(() => {
    const doc = new Y.Doc()
    const session = new SheetSession(doc, workerPort(), { hyperformulaLicenseKey })
    const connection = new LiveConnection(doc, sheetId)
    // a worker and a socket are opened here, not derived: they live and die with this effect
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setOpen({ session, connection })
    return () => {
      connection.close()
      session.close()
      doc.destroy()
    }
  }, [sheetId, hyperformulaLicenseKey])
  return open
}

export const useView = (session: SheetSession): SheetView => useSyncExternalStore(session.subscribe, session.getView)

export const useLive = (connection: LiveConnection): LiveState =>
  useSyncExternalStore(connection.subscribe, connection.getState)
