import { DEMO_SHEET } from '@/lib/workspace/demo'
import { expect, test } from './support/test'

test('a stranger’s sheet answers like one that is not there', async ({ as, server }) => {
  const page = await as('lead')
  const answers: { status: number | undefined; text: string }[] = []
  const { sheetId, workspaceId } = server.elsewhere
  const missing = '00000000-0000-4000-8000-000000000000'
  for (const path of [
    `/sheets/${sheetId}`,
    `/sheets/${missing}`,
    '/sheets/nonsense',
    `/workspaces/${workspaceId}`,
    `/workspaces/${missing}`,
  ]) {
    const response = await page.goto(path)
    await expect(page.getByRole('heading', { level: 1 })).toBeVisible()
    answers.push({ status: response?.status(), text: await page.locator('main').innerText() })
  }
  for (const answer of answers) expect(answer).toEqual({ ...answers[0], status: 404 })
  expect(answers[0]!.text).not.toContain('Secret')
})

test('whoever belongs there gets in, and sees nothing of the demo', async ({ as, server }) => {
  const page = await as(server.elsewhere)
  await expect(page.getByRole('link', { name: 'Secret sheet' })).toBeVisible()
  await expect(page.getByRole('link', { name: DEMO_SHEET })).toHaveCount(0)
})

test('signed-out requests get a proper answer everywhere', async ({ request, server }) => {
  const { sheetId, workspaceId } = server.elsewhere
  for (const path of ['/', `/workspaces/${workspaceId}`, `/sheets/${sheetId}`]) {
    const response = await request.get(path, { maxRedirects: 0 })
    expect(response.status(), path).toBe(307)
    expect(response.headers().location, path).toMatch(/^\/sign-in/)
  }
  expect((await request.get('/nowhere')).status()).toBe(404)
  expect((await request.get('/api/health')).status()).toBe(200)
})

test('every page comes with its guards', async ({ page }) => {
  const headers = (await page.goto('/sign-in'))!.headers()
  expect(headers['content-security-policy']).toMatch(/script-src 'self' 'nonce-[^']+';/)
  expect(headers['content-security-policy']).toContain("frame-ancestors 'none'")
  expect(headers['x-content-type-options']).toBe('nosniff')
  expect(headers['x-frame-options']).toBe('DENY')
  expect(headers['referrer-policy']).toBe('same-origin')
  expect(headers['x-powered-by']).toBeUndefined()
  const cookies = await page.context().cookies()
  for (const cookie of cookies) expect(cookie).toMatchObject({ httpOnly: true, sameSite: 'Lax' })
})
