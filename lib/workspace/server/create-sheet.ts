import { z } from 'zod'
import { findProject } from '@/db/queries/projects'
import { addSheet } from '@/db/queries/sheets'
import { operation } from '@/lib/auth/server/operation'
import { titleSchema } from '../titles'

/** Adds an empty sheet to a project. */
export const createSheet = operation({
  action: 'sheet.create',
  input: z.object({ projectId: z.uuid(), title: titleSchema }),
  target: (db, input) => findProject(db, input.projectId),
  run: async ({ db, actor, input, target }) => {
    const { workspaceId, id: projectId } = target
    const sheet = await addSheet(db, { workspaceId, projectId, title: input.title, createdBy: actor.id })
    return { sheetId: sheet.id }
  },
})
