import { z } from 'zod'
import { database } from '@/db/client'
import { findUserByEmail } from '@/db/queries/users'
import type { UserRow } from '@/db/queries/users'
import { environment } from '@/lib/env'
import { log } from '@/lib/log'
import { Attempts } from './attempts'
import { verifyPassword } from './passwords'

const credentialsSchema = z.object({ email: z.string().max(254), password: z.string().min(1).max(1024) })

const WINDOW_ms = 10 * 60_000

/*
 * Both counts are tied to the caller's address, so that a stranger elsewhere cannot lock a person out by guessing at
 * their account.
 */
const byAddress = new Attempts(40, WINDOW_ms)
const byAddressAndEmail = new Attempts(8, WINDOW_ms)

export type SignIn = { readonly user: UserRow } | { readonly refused: 'wrong' | 'too_many' }

/** Checks an e-mail and a password that came from an address. */
export async function signIn(input: unknown, address: string): Promise<SignIn> {
  const credentials = credentialsSchema.safeParse(input)
  if (!credentials.success) return { refused: 'wrong' }
  const { email, password } = credentials.data
  const pair = `${address} ${email.trim().toLowerCase()}`
  if (byAddress.exhausted(address) || byAddressAndEmail.exhausted(pair)) {
    log().warn({ address }, 'sign-in refused: too many attempts')
    return { refused: 'too_many' }
  }
  // Counted before the slow check: a hundred guesses sent at once are a hundred guesses.
  byAddress.failed(address)
  byAddressAndEmail.failed(pair)
  const user = await findUserByEmail(database(), email)
  const usable = user && (!user.demo || environment().demo) ? user : undefined
  if (!(await verifyPassword(usable?.passwordHash, password)) || !usable) {
    log().info({ address }, 'sign-in refused: wrong e-mail or password')
    return { refused: 'wrong' }
  }
  byAddressAndEmail.succeeded(pair)
  log().info({ user: usable.id }, 'signed in')
  return { user: usable }
}
