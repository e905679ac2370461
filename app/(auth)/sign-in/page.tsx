import type { Metadata } from 'next'
import { redirect } from 'next/navigation'
import { currentActor } from '@/lib/auth/server/current'
import { environment } from '@/lib/env'
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '@/lib/workspace/demo'
import { SignInForm } from './_components/sign-in-form'
import { pathWithin } from './path-within'

export const metadata: Metadata = { title: 'Sign in' }

interface SignInPageProps {
  readonly searchParams: Promise<{ from?: string | string[] }>
}

export default async function SignInPage({ searchParams }: SignInPageProps) {
  const { from } = await searchParams
  const destination = pathWithin(from)
  const actor = await currentActor()
  if (actor && actor.roles.size > 0) redirect(destination)
  const demo = environment().demo ? { accounts: DEMO_ACCOUNTS, password: DEMO_PASSWORD } : null
  return <SignInForm destination={destination} demo={demo} />
}
