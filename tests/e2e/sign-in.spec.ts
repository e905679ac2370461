import { ROLES } from '@/lib/auth/policies'
import { DEMO_ACCOUNTS, DEMO_PASSWORD, DEMO_SHEET, DEMO_WORKSPACE } from '@/lib/workspace/demo'
import { demoAccount, expect, fillIn, test } from './support/test'

for (const role of ROLES) {
  test(`a ${role} signs in and comes to the workspace`, async ({ as }) => {
    const page = await as(role)
    await expect(page.getByRole('heading', { name: DEMO_WORKSPACE })).toBeVisible()
    await expect(page.getByRole('link', { name: DEMO_SHEET })).toBeVisible()
  })
}

test('the sign-in page names the demo’s accounts and fills one in', async ({ page }) => {
  await page.goto('/')
  await expect(page).toHaveURL(/\/sign-in$/)
  const demo = page.getByRole('region', { name: 'Demo accounts' })
  await expect(demo).toContainText(DEMO_PASSWORD)
  for (const { email } of DEMO_ACCOUNTS) await expect(demo).toContainText(email)
  await demo.getByRole('button', { name: /viewer/ }).click()
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page.getByRole('heading', { name: DEMO_WORKSPACE })).toBeVisible()
})

test('a wrong password gets a sentence, and the right one still works', async ({ page }) => {
  await page.goto('/sign-in')
  await fillIn(page, { ...demoAccount('engineer'), password: 'not this one' })
  await expect(page.getByRole('alert').filter({ hasText: 'do not belong together' })).toBeVisible()
  await fillIn(page, demoAccount('engineer'))
  await expect(page.getByRole('heading', { name: DEMO_WORKSPACE })).toBeVisible()
})

test('whoever is signed out is asked to sign in, and then gets what they asked for', async ({ page, as }) => {
  const lead = await as('lead')
  const address = (await lead.getByRole('link', { name: DEMO_SHEET }).getAttribute('href'))!
  await page.goto(address)
  await expect(page).toHaveURL(/\/sign-in\?from=/)
  await fillIn(page, demoAccount('viewer'))
  await page.waitForURL(`**${address}`)
})

test('signing in never leads to another site', async ({ page, server }) => {
  for (const from of ['https://evil.example/', '//evil.example', '/\\evil.example', 'javascript:alert(1)']) {
    await page.context().clearCookies()
    await page.goto(`/sign-in?from=${encodeURIComponent(from)}`)
    await fillIn(page, demoAccount('viewer'))
    await page.waitForURL(/\/workspaces\//)
    expect(new URL(page.url()).origin).toBe(server.url)
  }
})

test('signing out ends it', async ({ as }) => {
  const page = await as('engineer')
  const workspace = page.url()
  await page.getByRole('button', { name: 'Sign out' }).click()
  await page.waitForURL(/\/sign-in/)
  await page.goto(workspace)
  await expect(page).toHaveURL(/\/sign-in\?from=/)
})
