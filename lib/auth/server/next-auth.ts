import type { NextAuthOptions } from 'next-auth'
import Credentials from 'next-auth/providers/credentials'
import { log } from '@/lib/log'
import { authSecret, SESSION_SECONDS } from './session'
import { signIn } from './sign-in'

/** The address that the request came from: the server in realtime/ writes this header itself. */
function addressOf(headers: Record<string, unknown> | undefined): string {
  const forwarded = headers?.['x-forwarded-for']
  return typeof forwarded === 'string' ? (forwarded.split(',')[0] ?? '').trim() : 'unknown'
}

export function authOptions(): NextAuthOptions {
  return {
    secret: authSecret(),
    session: { strategy: 'jwt', maxAge: SESSION_SECONDS },
    // The cookie's age alone is a wish to the browser: the token has to run out with it.
    jwt: { maxAge: SESSION_SECONDS },
    pages: { signIn: '/sign-in', signOut: '/sign-in', error: '/sign-in' },
    providers: [
      Credentials({
        credentials: { email: { type: 'email' }, password: { type: 'password' } },
        authorize: async (credentials, request) => {
          const result = await signIn(credentials, addressOf(request.headers))
          if ('user' in result) return { id: result.user.id }
          // What is thrown reaches the sign-in page as the error's name; null reaches it as CredentialsSignin.
          if (result.refused === 'too_many') throw new Error('TooManyAttempts')
          return null
        },
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => ({ sub: user ? user.id : token.sub }),
      session: ({ session }) => ({ expires: session.expires }),
    },
    logger: {
      error: (code) => log().error({ code }, 'next-auth'),
      warn: (code) => log().debug({ code }, 'next-auth'),
      debug: () => undefined,
    },
  }
}
