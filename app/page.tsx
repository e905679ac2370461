import { redirect } from 'next/navigation'
import { currentActor } from '@/lib/auth/server/current'

/** Everyone starts in their first workspace. */
export default async function Home() {
  const actor = await currentActor()
  const [workspaceId] = actor?.roles.keys() ?? []
  redirect(workspaceId ? `/workspaces/${workspaceId}` : '/sign-in')
}
