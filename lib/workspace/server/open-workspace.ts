import { z } from 'zod'
import { projectsOf } from '@/db/queries/projects'
import { sheetsOf } from '@/db/queries/sheets'
import { findWorkspace } from '@/db/queries/workspaces'
import type { WorkspaceRow } from '@/db/queries/workspaces'
import { can } from '@/lib/auth/policies'
import { operation } from '@/lib/auth/server/operation'

/** A workspace is what actions on it are done to. */
export const asTarget = (workspace: WorkspaceRow | undefined) =>
  workspace && { workspaceId: workspace.id, name: workspace.name }

/** A workspace with its projects and their sheets, and what the person who looks may do there. */
export const openWorkspace = operation({
  action: 'workspace.read',
  input: z.object({ workspaceId: z.uuid() }),
  target: async (db, input) => asTarget(await findWorkspace(db, input.workspaceId)),
  run: async ({ db, actor, target }) => {
    const projects = await projectsOf(db, target.workspaceId)
    const sheets = await sheetsOf(db, target.workspaceId)
    return {
      workspaceId: target.workspaceId,
      name: target.name,
      role: actor.roles.get(target.workspaceId)!,
      projects: projects.map((project) => ({
        id: project.id,
        name: project.name,
        sheets: sheets.filter((sheet) => sheet.projectId === project.id),
      })),
      can: {
        create: can(actor, 'sheet.create', target),
        rename: can(actor, 'sheet.edit', target),
        delete: can(actor, 'sheet.delete', target),
      },
    }
  },
})

export type OpenedWorkspace = Awaited<ReturnType<typeof openWorkspace>>
