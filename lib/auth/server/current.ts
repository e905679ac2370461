import { cookies } from 'next/headers'
import { forbidden, notFound, redirect } from 'next/navigation'
import { cache } from 'react'
import { database } from '@/db/client'
import type { Actor } from '../policies'
import { loadActor } from './actor'
import { Refusal } from './refusal'
import type { RefusalCode } from './refusal'
import { readSession } from './session'

/** Who sends the request that is being answered; null where nobody is signed in. Looked up once a request. */
export const currentActor = cache(async (): Promise<Actor | null> => {
  const all = (await cookies()).getAll()
  const session = await readSession(Object.fromEntries(all.map((cookie) => [cookie.name, cookie.value])))
  return session && loadActor(database(), session.userId)
})

/** What a page shows: a refusal becomes the page that says it. `from` is where a signed-out person comes back to. */
export async function orRefuse<Output>(result: Promise<Output>, from: string): Promise<Output> {
  try {
    return await result
  } catch (error) {
    if (!(error instanceof Refusal)) throw error
    if (error.code === 'signed_out') redirect(`/sign-in?from=${encodeURIComponent(from)}`)
    if (error.code === 'forbidden') forbidden()
    notFound()
  }
}

/** What a server action answers: a refusal comes back as a value, with a sentence to show. */
export type Answer<Output> =
  | { readonly ok: true; readonly value: Output }
  | { readonly ok: false; readonly code: RefusalCode; readonly message: string }

export async function answer<Output>(
  operation: (actor: Actor | null, raw: unknown) => Promise<Output>,
  raw: unknown,
): Promise<Answer<Output>> {
  try {
    return { ok: true, value: await operation(await currentActor(), raw) }
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, code: error.code, message: error.message }
    throw error
  }
}
