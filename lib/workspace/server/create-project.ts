import { z } from 'zod'
import { addProject } from '@/db/queries/projects'
import { findWorkspace } from '@/db/queries/workspaces'
import { operation } from '@/lib/auth/server/operation'
import { titleSchema } from '../titles'
import { asTarget } from './open-workspace'

export const createProject = operation({
  action: 'sheet.create',
  input: z.object({ workspaceId: z.uuid(), name: titleSchema }),
  target: async (db, input) => asTarget(await findWorkspace(db, input.workspaceId)),
  run: async ({ db, actor, input, target }) => {
    const project = await addProject(db, { workspaceId: target.workspaceId, name: input.name, createdBy: actor.id })
    return { projectId: project.id }
  },
})
