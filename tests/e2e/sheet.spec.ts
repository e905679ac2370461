import { STATES, cell, labelled, lineDown, liveState, openDemoSheet, reading, typeInto } from './support/sheet'
import { expect, test } from './support/test'

test('the demo works itself out: a quick fill runs hot, a slow one stays within', async ({ as }) => {
  const page = await as('viewer')
  await openDemoSheet(page)
  await expect(cell(page, STATES.received, 'label')).toHaveText('A1 as received')
  await expect(cell(page, STATES.quick, 'p')).toHaveText('200.0')
  await expect(cell(page, STATES.quick, 'check')).toContainText('over')
  await expect(cell(page, STATES.slow, 'check')).not.toContainText('over')
  await cell(page, STATES.quick, 'T_peak').click()
  await expect(reading(page)).toContainText('above its limit')
  await expect(page.getByRole('img', { name: /^Pressure and flow, Fill quick over/ })).toBeVisible()
  await expect(page.getByRole('img', { name: /^Gas and shell temperature over/ })).toBeVisible()
})

test('an engineer edits, and a second browser sees it within a second', async ({ as }) => {
  const [engineer, lead] = [await as('engineer'), await as('lead')]
  await openDemoSheet(engineer)
  await openDemoSheet(lead)
  await expect(lead.getByRole('img', { name: 'Dunstan Keel' })).toBeVisible()
  await cell(engineer, STATES.quick, 'p_to').click()
  await expect(cell(lead, STATES.quick, 'p_to')).toHaveText(/DK/)

  await typeInto(engineer, STATES.quick, 'p_to', '2175 psi')
  await expect(cell(lead, STATES.quick, 'p')).toHaveText('150.0', { timeout: 1000 })
  await expect(cell(engineer, STATES.quick, 'p_to')).toContainText('150.0')

  await cell(engineer, STATES.quick, 'p_to').click()
  await engineer.keyboard.press('Control+z')
  await expect(cell(lead, STATES.quick, 'p')).toHaveText('200.0')
})

test('a viewer reads and cannot change anything', async ({ as }) => {
  const page = await as('viewer')
  await openDemoSheet(page)
  await typeInto(page, STATES.quick, 'p_to', '150 bar')
  await page.keyboard.press('Delete')
  await expect(cell(page, STATES.quick, 'p_to')).toHaveText('200.0')
  for (const name of ['+ State', '+ Column', 'Undo', 'Actions for A1', 'Add vessel']) {
    await expect(page.getByRole('button', { name, exact: true })).toHaveCount(0)
  }
  await expect(page.getByText('it cannot be changed with your role')).toBeVisible()
})

test('what was typed is there after a reload, a crash and a restart', async ({ as, server }) => {
  let page = await as('engineer')
  await openDemoSheet(page)
  await typeInto(page, STATES.slow, 'p_to', '180')
  await expect(cell(page, STATES.slow, 'p')).toHaveText('180.0')
  await expect(liveState(page)).toHaveText('Live, all changes saved')
  await page.reload()
  await expect(cell(page, STATES.slow, 'p')).toHaveText('180.0', { timeout: 20_000 })
  for (const signal of ['SIGKILL', 'SIGTERM'] as const) {
    await server.stop(signal)
    await expect(lineDown(page)).toBeVisible()
    await server.start()
    await expect(lineDown(page)).toHaveCount(0, { timeout: 20_000 })
  }
  await page.context().close()
  page = await as('lead')
  await openDemoSheet(page)
  await expect(cell(page, STATES.slow, 'p')).toHaveText('180.0')
  await typeInto(page, STATES.slow, 'p_to', '200 bar')
  await expect(cell(page, STATES.slow, 'p')).toHaveText('200.0')
})

test('bad input gets a sentence in its place and at the side, and the rest goes on', async ({ as }) => {
  const page = await as('engineer')
  await openDemoSheet(page)
  const bad: readonly [string, RegExp][] = [
    ['charge(', /a closing bracket is missing/],
    ['pressure_of_nothing', /pressure_of_nothing is not known here/],
    ['5 kg', /this is a mass/],
    ['p', /cycle/],
    ['400 bar', /400 bar/],
  ]
  for (const [typed, reason] of bad) {
    await typeInto(page, STATES.quick, 'p_to', typed)
    const worked = /bar/.test(typed) ? cell(page, STATES.quick, 'p') : cell(page, STATES.quick, 'p_to')
    await expect(worked.locator('.cell-error-words')).toBeVisible()
    await cell(page, STATES.quick, 'p_to').click()
    if (!/bar/.test(typed)) await expect(reading(page)).toContainText(reason)
    await expect(cell(page, STATES.slow, 'p')).toHaveText('200.0')
  }
  await cell(page, STATES.quick, 'p').click()
  await expect(reading(page)).toContainText('needs run, which has an error')
  await typeInto(page, STATES.quick, 'p_to', '200 bar')
  await expect(cell(page, STATES.quick, 'p')).toHaveText('200.0')

  await typeInto(page, STATES.received, 'T_to', '-250 °C')
  await cell(page, STATES.received, 'p').click()
  await expect(cell(page, STATES.received, 'p').locator('.cell-error-words')).toBeVisible()
  await typeInto(page, STATES.received, 'T_to', '18')
  await expect(cell(page, STATES.received, 'p')).toHaveText('5.0')
})

test('a state is typed at the end, branched, and taken away again', async ({ as }) => {
  const page = await as('engineer')
  await openDemoSheet(page)
  await typeInto(page, STATES.next, 'label', 'Second stand')
  await expect(cell(page, STATES.next, 'label')).toContainText('Second stand')
  await cell(page, STATES.quick, 'p').click()
  await page.getByRole('button', { name: 'Branch' }).click()
  await expect(cell(page, STATES.quick + 1, 'label')).toContainText('Fill quick, what if')
  await expect(cell(page, STATES.quick + 1, 'p')).toHaveText('200.0')
  for (const label of ['Fill quick, what if', 'Second stand']) {
    await labelled(page, label).click()
    await page.getByRole('button', { name: `More for ${label}` }).click()
    await page.getByRole('menuitem', { name: 'Delete state' }).click()
    await expect(labelled(page, label)).toHaveCount(0)
  }
})

test('the rig is changed in forms that check what is typed', async ({ as }) => {
  const page = await as('engineer')
  await openDemoSheet(page)
  const rig = page.getByRole('complementary', { name: 'Rig' })
  const before = await cell(page, STATES.quick, 't').innerText()
  await rig.getByRole('button', { name: 'Actions for Orifice O' }).click()
  await page.getByRole('menuitem', { name: 'Edit' }).click()
  const dialog = page.getByRole('dialog', { name: 'Edit Orifice O' })
  await dialog.getByLabel('diameter *').fill('5 kg')
  await expect(dialog.getByText('this is a mass')).toBeVisible()
  await dialog.getByLabel('diameter *').fill('1/16 in')
  await dialog.getByRole('button', { name: 'Save' }).click()
  await expect(rig).toContainText('1.5875 mm')
  await expect(cell(page, STATES.quick, 't')).not.toHaveText(before)
  await cell(page, STATES.quick, 'p').click()
  await page.getByRole('button', { name: 'Undo' }).click()
  await expect(rig).toContainText('2.5 mm')

  await rig.getByRole('button', { name: 'Add path' }).click()
  await page.getByRole('menuitem', { name: 'sonic' }).click()
  const fresh = page.getByRole('dialog', { name: /New path/ })
  await fresh.getByLabel('Name *').fill('Coupling C')
  await fresh.getByLabel('c *').fill('2 [L/(s bar)]')
  await fresh.getByRole('button', { name: 'Save' }).click()
  await expect(rig).toContainText('Coupling C')
  await rig.getByRole('button', { name: 'Actions for Coupling C' }).click()
  await page.getByRole('menuitem', { name: 'Remove' }).click()
  await page.getByRole('button', { name: 'Remove it' }).click()
  await expect(rig).not.toContainText('Coupling C')
})

test('a formula is changed in its line, with its mistakes told, for the whole column', async ({ as }) => {
  const page = await as('engineer')
  await openDemoSheet(page)
  await cell(page, STATES.quick, 'm').click()
  const line = page.getByRole('textbox', { name: /^Formula of Mass/ })
  await expect(line).toHaveText('run.m')
  await line.fill('run.p')
  await line.press('Enter')
  await expect(cell(page, STATES.slow, 'm')).toContainText('this is a pressure')
  await line.fill('run.m')
  await line.press('Enter')
  await expect(cell(page, STATES.slow, 'm')).toHaveText(/^\d/)
})

test('on a phone the sheet is read as cards', async ({ as }) => {
  const page = await as('viewer')
  await page.setViewportSize({ width: 390, height: 844 })
  await page.getByRole('link', { name: 'Bank A quick fill' }).click()
  const card = page.getByRole('listitem').filter({ has: page.getByRole('heading', { name: /^3\s*Fill quick/ }) })
  await expect(card).toContainText('200.0 bar', { timeout: 20_000 })
  await expect(card).toContainText('(over)')
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
})
