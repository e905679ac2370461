import { describe, expect, it } from 'vitest'
import { readEnvironment } from '@/lib/env'

describe('the environment', () => {
  it('is complete with nothing set', () => {
    expect(readEnvironment({})).toEqual({
      production: false,
      host: undefined,
      port: 3000,
      logLevel: 'info',
      dataFolder: 'data',
      demo: true,
      behindProxy: false,
      authSecret: undefined,
      publicUrl: undefined,
      hyperformulaLicenseKey: 'gpl-v3',
      handsontableLicenseKey: 'non-commercial-and-evaluation',
    })
  })

  it('takes what is set, and an empty variable as none', () => {
    const variables = { PORT: '8080', CHARGEHAND_DEMO: 'off', CHARGEHAND_DATA: '', NEXTAUTH_URL: 'https://rig.example' }
    expect(readEnvironment(variables)).toMatchObject({
      port: 8080,
      demo: false,
      dataFolder: 'data',
      publicUrl: 'https://rig.example',
    })
  })

  it.each([
    [{ PORT: 'eighty' }, /^PORT must be a number from 0 to 65535\.$/],
    [{ PORT: '70000' }, /^PORT must be a number from 0 to 65535\.$/],
    [{ CHARGEHAND_DEMO: 'maybe' }, /^CHARGEHAND_DEMO must be on or off\.$/],
    [{ NEXTAUTH_SECRET: 'short' }, /^NEXTAUTH_SECRET must have 32 characters or more\.$/],
    [{ NEXTAUTH_URL: 'rig.example' }, /^NEXTAUTH_URL must be an http or https address\.$/],
    [{ DATABASE_URL: 'postgres://x' }, /^DATABASE_URL is not supported yet/],
  ])('says in a sentence what is wrong with %j', (variables, sentence) => {
    expect(() => readEnvironment(variables)).toThrow(sentence)
  })

  it('says all that is wrong at once, and no secret', () => {
    const variables = { PORT: 'x', NEXTAUTH_SECRET: 'hunter2' }
    expect(() => readEnvironment(variables)).toThrow(/PORT.*\n.*NEXTAUTH_SECRET/)
    expect(() => readEnvironment(variables)).not.toThrow(/hunter2/)
  })
})
