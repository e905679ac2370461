import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { STATES, cell, openDemoSheet } from './support/sheet'
import { expect, test } from './support/test'

/** The grid's own table roles are the component's: axe finds its header rows wanting, and they are left to it. */
const LEFT_TO_THE_GRID = 'aria-required-children'

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze()
  const ours = found.filter(
    ({ id, nodes }) => id !== LEFT_TO_THE_GRID || nodes.some((node) => !/#ht_/.test(node.target.join())),
  )
  return ours.map(
    ({ id, nodes }) =>
      `${id}: ${nodes
        .map((node) => node.target.join(' '))
        .slice(0, 3)
        .join(' | ')}`,
  )
}

test('the pages keep to WCAG 2.2 AA as far as axe can tell', async ({ as, page }) => {
  await page.goto('/sign-in')
  expect(await violations(page)).toEqual([])
  const engineer = await as('engineer')
  expect(await violations(engineer)).toEqual([])
  await openDemoSheet(engineer)
  await cell(engineer, STATES.quick, 'T_peak').click()
  await expect(engineer.getByRole('img', { name: /^Pressure and flow/ })).toBeVisible()
  expect(await violations(engineer)).toEqual([])
  await engineer.getByRole('button', { name: '+ Column' }).click()
  expect(await violations(engineer)).toEqual([])
})
