import './environment'
import { encode } from 'next-auth/jwt'
import { authSecret, SESSION_SECONDS } from '@/lib/auth/server/session'

export const SESSION_COOKIE = 'next-auth.session-token'

/** The value of the cookie that a signed-in browser sends. */
export const sessionToken = (userId: string, given: { seconds?: number; secret?: string } = {}): Promise<string> =>
  encode({
    token: { sub: userId },
    secret: given.secret ?? authSecret(),
    maxAge: given.seconds ?? SESSION_SECONDS,
  })

export const sessionCookie = async (userId: string, given: { seconds?: number } = {}): Promise<string> =>
  `${SESSION_COOKIE}=${await sessionToken(userId, given)}`
