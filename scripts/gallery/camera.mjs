import { join } from 'node:path'
import { chromium as launcher } from '@playwright/test'
import { demoPassPhrase } from '../../server/database/seed/demo-users.mjs'
import { people } from './people.mjs'

/** How wide each picture is: a desk's screen and a phone's. */
export const widths = { wide: { width: 1440, height: 900 }, phone: { width: 390, height: 844 } }

export const fileName = (state, width) => `${state.replace(/[^a-z0-9]+/gi, '-').toLowerCase()}-${width}.png`

/** Takes the pictures: a browser of its own for each person, kept signed in, and one that nobody signed in to. */
export async function createCamera({ chromium, place, out }) {
  const browser = await launcher.launch({
    executablePath: chromium,
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--no-first-run', '--disable-dev-shm-usage'],
  })
  const contexts = new Map()

  async function contextOf(person) {
    const known = contexts.get(person)
    if (known) return known
    const context = await browser.newContext({ baseURL: place.url, locale: 'en-US', reducedMotion: 'reduce' })
    context.setDefaultTimeout(20_000)
    if (person !== null) {
      const page = await context.newPage()
      await open(page, '/sign-in')
      await page.getByLabel('E-mail').fill(people[person])
      await page.getByLabel('Password', { exact: true }).fill(demoPassPhrase)
      await page.getByRole('button', { name: 'Sign in', exact: true }).click()
      await page.waitForURL((url) => url.pathname !== '/sign-in' && url.pathname !== '/')
      await page.close()
      contexts.set(person, context)
    }
    return context
  }

  /** Opens an address and waits until the page answers to the keyboard and the mouse. */
  async function open(page, address, bare = false) {
    await page.goto(address)
    if (!bare) await page.locator('html[data-hydrated="true"]').waitFor({ state: 'attached' })
  }

  async function takeAt(width, state, cast) {
    const context = await contextOf(state.as ?? null)
    const page = await context.newPage()
    try {
      await page.setViewportSize(widths[width])
      const address = typeof state.at === 'function' ? await state.at(cast, width) : state.at
      if (state.html) await page.setContent(address)
      else await open(page, address, state.bare)
      await state.then?.(page, cast, width)
      await page.waitForLoadState('networkidle')
      // Whatever was pressed has been answered.
      await page.waitForFunction(() => document.querySelector('[aria-busy="true"]') === null)
      // A dialog belongs to the screen, not to the length of the page.
      const fullPage = await page.getByRole('dialog').count() === 0
      await page.screenshot({ path: join(out, fileName(state.name, width)), fullPage, animations: 'disabled' })
    } finally {
      await page.close()
      if (!state.as) await context.close()
    }
  }

  return {
    async take(state, cast) {
      await state.before?.(cast)
      try {
        for (const width of state.widths ?? Object.keys(widths)) await takeAt(width, state, cast)
      } finally {
        await state.after?.(cast)
      }
      return 'taken'
    },
    close: () => browser.close(),
  }
}
