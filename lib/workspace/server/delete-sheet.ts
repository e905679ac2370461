import { z } from 'zod'
import { notify } from '@/db/queries/notices'
import * as sheets from '@/db/queries/sheets'
import { operation } from '@/lib/auth/server/operation'

/** Takes a sheet away from everyone, those who have it open included. */
export const deleteSheet = operation({
  action: 'sheet.delete',
  input: z.object({ sheetId: z.uuid() }),
  target: (db, input) => sheets.findSheet(db, input.sheetId),
  run: async ({ db, actor, target }) => {
    await sheets.deleteSheet(db, target.id, actor.id)
    await notify(db, { type: 'access', sheetId: target.id })
  },
})
