import { expect, test } from './support/test'

test('a number is checked on the fluids page, and a state outside the range is refused in words', async ({ as }) => {
  const page = await as('viewer')
  await page.getByRole('link', { name: 'Fluids' }).click()
  await page.getByLabel('Fluid', { exact: true }).selectOption('water')
  await page.getByLabel('First value').fill('1 MPa')
  await page.getByLabel('Second value').fill('300 °C')
  const state = page.getByRole('table', { name: /water, gas/ })
  await expect(state.getByRole('row', { name: /specific enthalpy/ })).toContainText('3051.6 kJ/kg')
  await expect(page.getByText('Wagner')).toBeVisible()
  await expect(
    page.getByRole('img', { name: 'Pressure over enthalpy of water, with its two-phase region' }),
  ).toBeVisible()
  await page.getByLabel('Second value').fill('250 K')
  await expect(page.getByRole('alert').filter({ hasText: 'no water below 273.16 K' })).toBeVisible()
  await page.setViewportSize({ width: 390, height: 844 })
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390)
})
