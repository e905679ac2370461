import { test as base, expect } from '@playwright/test'
import type { Browser, BrowserContext, Page } from '@playwright/test'
import type { Role } from '@/lib/auth/policies'
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '@/lib/workspace/demo'
import { TestServer } from './server'

export { expect }

export interface Account {
  readonly email: string
  readonly password: string
}

export function demoAccount(role: Role): Account {
  const account = DEMO_ACCOUNTS.find((candidate) => candidate.role === role)!
  return { email: account.email, password: DEMO_PASSWORD }
}

/** Fills in the form of a page that shows it. */
export async function fillIn(page: Page, { email, password }: Account): Promise<void> {
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password', { exact: true }).fill(password)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
}

/** A browser of its own, as another person on another machine has it, signed in and at their workspace. */
async function openAs(browser: Browser, url: string, account: Account): Promise<Page> {
  const context = await browser.newContext({ baseURL: url })
  const page = await context.newPage()
  await page.goto('/sign-in')
  await fillIn(page, account)
  await page.waitForURL(/\/workspaces\//)
  return page
}

interface Fixtures {
  /** Opens a browser of its own for a person: by role in the demo, or by account. */
  readonly as: (who: Role | Account) => Promise<Page>
  /** What the browsers complained of: refused scripts, errors in scripts. Empty at the end of every test. */
  readonly complaints: string[]
}

export const test = base.extend<Fixtures, { readonly server: TestServer }>({
  server: [
    async ({}, provide) => {
      const server = await TestServer.create()
      await provide(server)
      await server.remove()
    },
    { scope: 'worker', timeout: 300_000 },
  ],
  baseURL: async ({ server }, provide) => provide(server.url),
  complaints: [
    async ({}, provide) => {
      const complaints: string[] = []
      await provide(complaints)
      expect(complaints, 'what the browsers complained of').toEqual([])
    },
    { auto: true },
  ],
  context: async ({ context, complaints }, provide) => {
    listenTo(context, complaints)
    await provide(context)
  },
  as: async ({ browser, server, complaints }, provide) => {
    const contexts: BrowserContext[] = []
    await provide(async (who) => {
      const page = await openAs(browser, server.url, typeof who === 'string' ? demoAccount(who) : who)
      contexts.push(page.context())
      listenTo(page.context(), complaints)
      return page
    })
    for (const context of contexts) await context.close()
  },
})

function listenTo(context: BrowserContext, complaints: string[]): void {
  context.on('weberror', (event) => complaints.push(event.error().message))
  context.on('console', (message) => {
    // What Chromium itself logs of the network is not ours: pages that answer 401 or 404 are meant to, and so is a line
    // that cannot be had while the server is down.
    const ownWords = !/^(Failed to load resource|WebSocket connection to .* failed)/.test(message.text())
    if (message.type() === 'error' && ownWords) complaints.push(message.text())
  })
}
