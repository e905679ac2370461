import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { STATES, cell, openDemoSheet } from './support/sheet'
import { expect, test } from './support/test'

/** The inside of the grid is the component's own work, roles and scroll panes; everything around it is ours. */
const GRID = '.sheet-grid'

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .exclude(GRID)
    .exclude('textarea.handsontableInput')
    .analyze()
  return found.map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join(' | ')}`)
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
})
