import type { Locator, Page } from '@playwright/test'
import { DEMO_SHEET } from '@/lib/workspace/demo'
import { expect } from './test'

/** The demo's columns in the order of the grid, and its states. */
export const COLUMNS = ['label', 'step', 's', 'via', 'p_to', 'T_to', 'p', 'T_end', 'T_peak', 'check', 'm', 't'] as const
export type Column = (typeof COLUMNS)[number]
export const STATES = { received: 1, slow: 2, quick: 3, stand: 4, topUp: 5, letDown: 6, next: 7 } as const

/** Opens the demo's sheet and waits until its numbers are there. */
export async function openDemoSheet(page: Page): Promise<void> {
  await page.getByRole('link', { name: DEMO_SHEET }).click()
  await page.waitForURL(/\/sheets\//)
  await expect(cell(page, STATES.quick, 'T_peak')).not.toHaveText('', { timeout: 20_000 })
  await expect(liveState(page)).toHaveText('Live, all changes saved')
}

export function cell(page: Page, state: number, column: Column): Locator {
  // the frozen first column is drawn once more, over the grid: that copy is what a person sees and clicks
  const pane = column === 'label' ? '.ht_clone_inline_start' : '.ht_master'
  return page
    .locator(`${pane} tbody tr`)
    .nth(state - 1)
    .locator('td')
    .nth(COLUMNS.indexOf(column))
}

/** The cell with a state's label, by the label. */
export const labelled = (page: Page, label: string) => page.locator('.ht_clone_inline_start td', { hasText: label })

/** Types into a cell as a person does: over what stands there, then Enter. */
export async function typeInto(page: Page, state: number, column: Column, text: string): Promise<void> {
  await cell(page, state, column).click()
  // a second click soon after a first one opens the editor: close it, to type over and not behind what stands there
  await page.keyboard.press('Escape')
  await page.keyboard.type(text)
  await page.keyboard.press('Enter')
}

/** Whether all that was done is kept, as the bar at the top says. */
export const liveState = (page: Page) => page.getByRole('banner').getByRole('status')

/** The banner across the page while the line is down. */
export const lineDown = (page: Page) => page.getByRole('alert').filter({ hasText: 'The connection is lost' })

export const reading = (page: Page) => page.getByRole('complementary', { name: 'Reading' })
