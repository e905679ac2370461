import { describe, expect, it } from 'vitest'
import { readSession } from '@/lib/auth/server/session'
import { SESSION_COOKIE, sessionToken } from '../support/session'

describe('a session cookie', () => {
  it('says who it is and until when', async () => {
    const before = Date.now()
    const session = await readSession({ [SESSION_COOKIE]: await sessionToken('me', { seconds: 60 }), other: 'x' })
    expect(session?.userId).toBe('me')
    expect(+session!.expiresAt - before).toBeGreaterThan(58_000)
    expect(+session!.expiresAt - before).toBeLessThan(62_000)
  })

  it('is put together from pieces, in their order', async () => {
    const token = await sessionToken('me')
    const pieces = { [`${SESSION_COOKIE}.1`]: token.slice(40), [`${SESSION_COOKIE}.0`]: token.slice(0, 40) }
    expect(await readSession(pieces)).toMatchObject({ userId: 'me' })
  })

  it.each([
    ['none', () => undefined],
    ['nonsense', () => 'nonsense'],
    [
      'one signed with another secret',
      () => sessionToken('me', { secret: 'another secret of forty characters or so' }),
    ],
    ['one that is over', () => sessionToken('me', { seconds: -60 })],
    ['one that was tampered with', async () => (await sessionToken('me')).replace(/.{4}$/, 'AAAA')],
    ['one without a person', () => sessionToken('')],
  ])('is worth nothing if it is %s', async (_what, token) => {
    expect(await readSession({ [SESSION_COOKIE]: await token() })).toBeNull()
  })
})
