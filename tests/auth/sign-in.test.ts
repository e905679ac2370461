import { afterEach, describe, expect, it, vi } from 'vitest'
import { setDatabase } from '@/db/client'
import { loadActor } from '@/lib/auth/server/actor'
import { hashPassword } from '@/lib/auth/server/passwords'
import { signIn } from '@/lib/auth/server/sign-in'
import { testDatabase } from '../support/database'
import { makeUser } from '../support/factories'

const test = testDatabase()
const PASSWORD = 'a good long password'

let account = 0
const makeAccount = async (given: { demo?: boolean } = {}) =>
  makeUser(test.db, {
    email: `account${++account}@test.example`,
    passwordHash: await hashPassword(PASSWORD),
    ...given,
  })

let address = 0
const newAddress = () => `192.0.2.${++address}`

describe('signing in', () => {
  it('takes the right password, however the e-mail is written', async () => {
    const user = await makeAccount()
    const result = await signIn({ email: ` ${user.email.toUpperCase()}`, password: PASSWORD }, newAddress())
    expect(result).toMatchObject({ user: { id: user.id } })
  })

  it.each([
    ['a wrong password', (email: string) => ({ email, password: PASSWORD + ' ' })],
    ['an account that is not there', () => ({ email: 'nobody@test.example', password: PASSWORD })],
    ['no password', (email: string) => ({ email, password: '' })],
    ['a password that is no text', (email: string) => ({ email, password: { $ne: null } })],
    ['nothing', () => undefined],
  ])('refuses %s, in the same words', async (_what, input) => {
    const user = await makeAccount()
    expect(await signIn(input(user.email), newAddress())).toEqual({ refused: 'wrong' })
  })

  it('hashes with argon2id and a salt of its own each time', async () => {
    const [one, two] = await Promise.all([hashPassword(PASSWORD), hashPassword(PASSWORD)])
    expect(one).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
    expect(one).not.toBe(two)
  })

  it('stops a caller who guesses at an account, and nobody else', async () => {
    const user = await makeAccount()
    const guesser = newAddress()
    for (let i = 0; i < 8; i++) {
      expect(await signIn({ email: user.email, password: 'guess' }, guesser)).toEqual({ refused: 'wrong' })
    }
    expect(await signIn({ email: user.email, password: PASSWORD }, guesser)).toEqual({ refused: 'too_many' })
    expect(await signIn({ email: user.email, password: PASSWORD }, newAddress())).toHaveProperty('user')
  })

  it('counts guesses that are sent at once', async () => {
    const user = await makeAccount()
    const guesser = newAddress()
    const guess = () => signIn({ email: user.email, password: 'guess' }, guesser)
    const results = await Promise.all(Array.from({ length: 12 }, guess))
    expect(results.filter((result) => 'refused' in result && result.refused === 'too_many')).toHaveLength(4)
  })

  it('stops a caller who tries one account after another', async () => {
    const guesser = newAddress()
    for (let i = 0; i < 40; i++) await signIn({ email: `guess${i}@test.example`, password: 'guess' }, guesser)
    const user = await makeAccount()
    expect(await signIn({ email: user.email, password: PASSWORD }, guesser)).toEqual({ refused: 'too_many' })
  }, 20_000)

  it('forgets wrong attempts after the right one', async () => {
    const user = await makeAccount()
    const caller = newAddress()
    for (let round = 0; round < 3; round++) {
      for (let i = 0; i < 6; i++) await signIn({ email: user.email, password: 'slip' }, caller)
      expect(await signIn({ email: user.email, password: PASSWORD }, caller)).toHaveProperty('user')
    }
  }, 20_000)
})

describe('the accounts of the demo', () => {
  afterEach(() => {
    vi.unstubAllEnvs()
    vi.resetModules()
    setDatabase(test.open)
  })

  it('are of use while the demo is on', async () => {
    const user = await makeAccount({ demo: true })
    expect(await signIn({ email: user.email, password: PASSWORD }, newAddress())).toHaveProperty('user')
    expect(await loadActor(test.db, user.id)).toMatchObject({ id: user.id })
  })

  it('are of no use while it is off, signed in before or not', async () => {
    const user = await makeAccount({ demo: true })
    vi.stubEnv('CHARGEHAND_DEMO', 'off')
    vi.resetModules()
    const whileOff = {
      ...(await import('@/lib/auth/server/sign-in')),
      ...(await import('@/lib/auth/server/actor')),
    }
    const attempt = { email: user.email, password: PASSWORD }
    expect(await whileOff.signIn(attempt, newAddress())).toEqual({ refused: 'wrong' })
    expect(await whileOff.loadActor(test.db, user.id)).toBeNull()
  })
})
