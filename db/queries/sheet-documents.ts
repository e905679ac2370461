import { and, asc, eq, gt, isNull, lt, sql } from 'drizzle-orm'
import type { Database } from '../database'
import { sheetStates, sheets, sheetUpdates } from '../schema'

export interface DocumentUpdate {
  readonly bytes: Uint8Array
  readonly userId: string
}

/** What a sheet's document is made of: the state, if one was kept, and the updates after it. */
export interface StoredDocument {
  readonly state: Uint8Array | null
  readonly tail: readonly Uint8Array[]
  /** The last update that the two hold together; 0 for a sheet that was never changed. */
  readonly sequence: number
}

/**
 * Adds updates at the end of a sheet's history, all or none.
 * @returns the number of the last one; null where there is no such sheet any more
 */
export async function appendUpdates(
  db: Database,
  sheetId: string,
  updates: readonly DocumentUpdate[],
): Promise<number | null> {
  return db.transaction(async (tx) => {
    const [sheet] = await tx
      .update(sheets)
      .set({
        sequence: sql`${sheets.sequence} + ${updates.length}`,
        editedBy: updates[updates.length - 1]?.userId,
        editedAt: sql`now()`,
      })
      .where(and(eq(sheets.id, sheetId), isNull(sheets.deletedAt)))
      .returning({ sequence: sheets.sequence })
    if (!sheet) return null
    const first = sheet.sequence - updates.length + 1
    await tx.insert(sheetUpdates).values(updates.map((update, i) => ({ ...update, sheetId, sequence: first + i })))
    return sheet.sequence
  })
}

/** Reads a sheet's document as it is now. A sheet that was never changed has neither state nor tail. */
export async function loadDocument(db: Database, sheetId: string): Promise<StoredDocument> {
  return db.transaction(
    async (tx) => {
      const [state] = await tx.select().from(sheetStates).where(eq(sheetStates.sheetId, sheetId))
      const tail = await tx
        .select({ sequence: sheetUpdates.sequence, bytes: sheetUpdates.bytes })
        .from(sheetUpdates)
        .where(and(eq(sheetUpdates.sheetId, sheetId), gt(sheetUpdates.sequence, state?.sequence ?? 0)))
        .orderBy(asc(sheetUpdates.sequence))
      return {
        state: state?.bytes ?? null,
        tail: tail.map((update) => update.bytes),
        sequence: tail[tail.length - 1]?.sequence ?? state?.sequence ?? 0,
      }
    },
    // One snapshot for both reads: a state kept in between would hide the updates that it took in.
    { isolationLevel: 'repeatable read' },
  )
}

/** Keeps a state in one piece, unless a later one is kept already. */
export async function keepState(
  db: Database,
  sheetId: string,
  state: { readonly sequence: number; readonly bytes: Uint8Array },
): Promise<void> {
  await db
    .insert(sheetStates)
    .values({ sheetId, ...state })
    .onConflictDoUpdate({
      target: sheetStates.sheetId,
      set: { ...state, at: sql`now()` },
      setWhere: lt(sheetStates.sequence, state.sequence),
    })
}
