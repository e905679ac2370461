import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { FluidsScreen } from '@/components/fluids/fluids-screen'
import { currentActor } from '@/lib/auth/server/current'

export const metadata: Metadata = { title: 'Fluids' }

export default async function FluidsPage() {
  if (!(await currentActor())) redirect('/sign-in?from=/fluids')
  return <FluidsScreen />
}
