import { getToken } from 'next-auth/jwt'
import { environment } from '@/lib/env'

/** A session says who it is and until when. What they may do is never in it: that is read from the database each time. */
export interface Session {
  readonly userId: string
  readonly expiresAt: Date
}

export const SESSION_SECONDS = 7 * 24 * 60 * 60

export function authSecret(): string {
  const secret = environment().authSecret
  if (!secret) throw new Error('NEXTAUTH_SECRET is not set: the server makes one before it serves.')
  return secret
}

export type Cookies = Readonly<Record<string, string | undefined>>

/** The session in a request's cookies, for pages and for the websocket; null where there is none that is good. */
export async function readSession(cookies: Cookies): Promise<Session | null> {
  const token = await getToken({
    // No headers are handed over: a session comes in the cookie alone, never as a bearer token.
    req: { cookies, headers: {} } as Parameters<typeof getToken>[0]['req'],
    secret: authSecret(),
    secureCookie: environment().publicUrl?.startsWith('https://') ?? false,
  })
  if (!token?.sub || typeof token.exp !== 'number') return null
  return { userId: token.sub, expiresAt: new Date(token.exp * 1000) }
}
