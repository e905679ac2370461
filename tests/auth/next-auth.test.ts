import '../support/environment'
import { encode } from 'next-auth/jwt'
import { expect, it } from 'vitest'
import { authOptions } from '@/lib/auth/server/next-auth'
import { readSession, SESSION_SECONDS } from '@/lib/auth/server/session'
import { SESSION_COOKIE } from '../support/session'

it('a token runs out together with its cookie, and holds nothing but who it is', async () => {
  const options = authOptions()
  const token = await options.callbacks!.jwt!({
    token: { sub: 'me', name: 'Somebody', role: 'lead' },
    user: { id: 'me' },
    account: null,
  })
  expect(token).toEqual({ sub: 'me' })
  const cookie = await encode({ token, secret: options.secret as string, maxAge: options.jwt!.maxAge })
  const session = await readSession({ [SESSION_COOKIE]: cookie })
  expect((+session!.expiresAt - Date.now()) / 1000).toBeCloseTo(SESSION_SECONDS, -2)
  expect(options.session!.maxAge).toBe(SESSION_SECONDS)
})
