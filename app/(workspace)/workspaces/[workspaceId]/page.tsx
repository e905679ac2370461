import type { Metadata } from 'next'
import { initialsOf } from '@/lib/auth/initials'
import { currentActor, orRefuse } from '@/lib/auth/server/current'
import { openWorkspace } from '@/lib/workspace/server/open-workspace'
import { WorkspaceScreen } from './_components/workspace-screen'
import * as actions from './actions'

interface WorkspacePageProps {
  readonly params: Promise<{ workspaceId: string }>
}

export const metadata: Metadata = { title: 'Sheets' }

export default async function WorkspacePage({ params }: WorkspacePageProps) {
  const { workspaceId } = await params
  const actor = await currentActor()
  const workspace = await orRefuse(openWorkspace(actor, { workspaceId }), `/workspaces/${workspaceId}`)
  const name = actor?.name ?? ''
  return <WorkspaceScreen workspace={workspace} me={{ name, initials: initialsOf(name) }} actions={actions} />
}
