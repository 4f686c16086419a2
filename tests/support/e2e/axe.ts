import AxeBuilder from '@axe-core/playwright'
import { expect } from '@playwright/test'
import type { Page } from '@playwright/test'

/** WCAG 2.2 at level A and AA, with what came before it. */
const rules = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa']
const phone = { width: 390, height: 844 }

/** axe finds nothing on the screen as it stands. `what` names it in a failure; the test goes on, so that one run tells of every screen. */
export async function expectAccessible(page: Page, what: string): Promise<void> {
  // From the top: what the header or the bar at the bottom half covers while scrolled past is no target of its own.
  await page.evaluate(() => window.scrollTo(0, 0))
  const { violations } = await new AxeBuilder({ page }).withTags(rules).analyze()
  const found = violations.flatMap(({ id, nodes }) => nodes.map(node => `${id}: ${node.target.join(' ')} ${node.failureSummary ?? ''}`))
  expect.soft(found, `accessibility of ${what}`).toEqual([])
}

/** The same once more on a phone, where nothing may need sideways scrolling either. */
export async function expectAccessibleOnPhone(page: Page, what: string): Promise<void> {
  const before = page.viewportSize()
  await page.setViewportSize(phone)
  const tooWide = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)
  expect.soft(tooWide, `${what} is wider than a phone, by pixels`).toBeLessThanOrEqual(0)
  await expectAccessible(page, `${what} on a phone`)
  if (before) await page.setViewportSize(before)
}
