import { z } from 'zod'
import * as sheets from '@/db/queries/sheets'
import { operation } from '@/lib/auth/server/operation'
import { titleSchema } from '../titles'

export const renameSheet = operation({
  action: 'sheet.edit',
  input: z.object({ sheetId: z.uuid(), title: titleSchema }),
  target: (db, input) => sheets.findSheet(db, input.sheetId),
  run: async ({ db, input, target }) => {
    await sheets.renameSheet(db, target.id, input.title)
    return { title: input.title }
  },
})
