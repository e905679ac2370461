import { DEMO_PROJECT, DEMO_SHEET } from '@/lib/workspace/demo'
import { expect, test } from './support/test'

test('an engineer makes a sheet, renames it, and a lead deletes it', async ({ as }) => {
  const engineer = await as('engineer')
  const workspace = engineer.url()
  const project = engineer.getByRole('region', { name: DEMO_PROJECT })
  await project.getByLabel('New sheet').fill('Receiver let-down')
  await project.getByRole('button', { name: 'Add sheet' }).click()
  await engineer.waitForURL(/\/sheets\//)
  await expect(engineer).toHaveTitle(/Receiver let-down/)

  await engineer.goto(workspace)
  const item = engineer.getByRole('listitem').filter({ hasText: 'Receiver let-down' })
  await item.getByRole('button', { name: 'Rename' }).click()
  await item.getByLabel('New name').fill('Receiver let-down, cold day')
  await item.getByRole('button', { name: 'Rename' }).click()
  await expect(engineer.getByRole('link', { name: 'Receiver let-down, cold day' })).toBeVisible()
  await expect(item.getByRole('button', { name: 'Delete' })).toHaveCount(0)

  const lead = await as('lead')
  const doomed = lead.getByRole('listitem').filter({ hasText: 'cold day' })
  await doomed.getByRole('button', { name: 'Delete' }).click()
  await doomed.getByRole('button', { name: 'Delete it' }).click()
  await expect(lead.getByRole('link', { name: /cold day/ })).toHaveCount(0)
  await expect(lead.getByRole('link', { name: DEMO_SHEET })).toBeVisible()
})

test('a viewer is offered nothing that they may not do', async ({ as }) => {
  const page = await as('viewer')
  await expect(page.getByRole('link', { name: DEMO_SHEET })).toBeVisible()
  for (const name of ['Rename', 'Delete', 'Add sheet', 'Add project']) {
    await expect(page.getByRole('button', { name })).toHaveCount(0)
  }
})

test('what was made is there after a crash and after an orderly restart', async ({ as, server }) => {
  for (const signal of ['SIGKILL', 'SIGTERM'] as const) {
    const page = await as('engineer')
    await page.getByLabel('New project').fill(`Made before ${signal}`)
    await page.getByRole('button', { name: 'Add project' }).click()
    const section = page.getByRole('region', { name: `Made before ${signal}` })
    await expect(section).toBeVisible()
    await server.stop(signal)
    await server.start()
    await page.reload()
    await expect(section).toBeVisible()
  }
})
