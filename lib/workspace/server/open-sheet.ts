import { z } from 'zod'
import { findSheet } from '@/db/queries/sheets'
import { can } from '@/lib/auth/policies'
import { operation } from '@/lib/auth/server/operation'

/** A sheet's name and place, and what the person who opens it may do there. Its content comes over the websocket. */
export const openSheet = operation({
  action: 'sheet.read',
  input: z.object({ sheetId: z.uuid() }),
  target: (db, input) => findSheet(db, input.sheetId),
  run: async ({ actor, target: sheet }) => ({
    sheet,
    me: { id: actor.id, name: actor.name, role: actor.roles.get(sheet.workspaceId)! },
    can: {
      edit: can(actor, 'sheet.edit', sheet),
      freeze: can(actor, 'snapshot.freeze', sheet),
      comment: can(actor, 'comment.write', sheet),
    },
  }),
})
