import { test as base, expect } from '@playwright/test'
import type { Browser, BrowserContextOptions, Locator, Page } from '@playwright/test'
import { demoPassPhrase } from '../../../server/database/seed/demo-users.mjs'
import { resetRecord } from './record'

/** The people of the demonstration department, by what they are to a test. */
export const people = {
  clinician: 'ines.okafor@millbrook.example',
  preparer: 'sam.whitfield@millbrook.example',
  otherClinician: 'priya.raman@riverside.example',
  radiologist: 'tomas.brandt@northshore.example',
  secondRadiologist: 'helen.marsh@northshore.example',
  scheduler: 'leila.farouk@northshore.example',
  administrator: 'ruth.adler@northshore.example',
} as const
export type Person = keyof typeof people

/** What a browser prints for an answer of 400 and above; the tests that cause one say which. */
const refusedCall = /^Failed to load resource: the server responded with a status of (\d+)/

interface Expected { statuses: Set<number>, offline: boolean }

export interface Desk {
  /** A browser of somebody's own, signed in through the sign-in page and showing that role's own work. */
  signedIn: (person: Person, options?: BrowserContextOptions) => Promise<Page>
  /** A browser that nobody signed in to. */
  stranger: (options?: BrowserContextOptions) => Promise<Page>
  /** Answers of the server that this test means to cause, such as 401 or 412. Anything else in the console fails the test. */
  expectStatus: (...statuses: number[]) => void
  /** This test means to cut the connection. */
  expectOffline: () => void
}

/**
 * The test of every file here. It watches the console of each browser it opens: an error, a warning of the framework, a refused
 * script or a difference between the server's page and the browser's fails the test, whatever else it found.
 */
export const test = base.extend<{ desk: Desk }>({
  desk: async ({ browser }, use) => {
    const complaints: string[] = []
    const expected: Expected = { statuses: new Set(), offline: false }
    const open = async (options?: BrowserContextOptions) => watched(await newPage(browser, options), complaints, expected)
    await resetRecord()
    await use({
      stranger: open,
      async signedIn(person, options) {
        const page = await open(options)
        await signIn(page, person)
        return page
      },
      expectStatus: (...statuses) => statuses.forEach(status => expected.statuses.add(status)),
      expectOffline: () => {
        expected.offline = true
      },
    })
    await resetRecord()
    expect(complaints, 'the browser complained').toEqual([])
  },
})

async function newPage(browser: Browser, options?: BrowserContextOptions): Promise<Page> {
  const context = await browser.newContext(options)
  return await context.newPage()
}

function watched(page: Page, complaints: string[], expected: Expected): Page {
  page.on('pageerror', error => complaints.push(`${page.url()}: ${error.message}`))
  page.on('console', (message) => {
    if (message.type() !== 'error' && message.type() !== 'warning') return
    const status = refusedCall.exec(message.text())?.[1]
    if (status !== undefined && expected.statuses.has(Number(status))) return
    // The framework's own word on a page that was opened by its address and refused.
    if (expected.statuses.size > 0 && message.text().startsWith('[nuxt] error caught during app initialization')) return
    if (expected.offline && message.text().includes('ERR_INTERNET_DISCONNECTED')) return
    complaints.push(`${page.url()}: ${message.text()}`)
  })
  return page
}

/** Opens an address and waits until the page answers to the keyboard and the mouse. */
export async function go(page: Page, path: string): Promise<void> {
  await page.goto(path)
  await hydrated(page)
}

export async function hydrated(page: Page): Promise<void> {
  await expect(page.locator('html[data-hydrated="true"]')).toBeAttached()
}

export async function signIn(page: Page, person: Person): Promise<void> {
  await go(page, '/sign-in')
  await page.getByLabel('E-mail').fill(people[person])
  await page.getByLabel('Password', { exact: true }).fill(demoPassPhrase)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await page.waitForURL(url => url.pathname !== '/sign-in' && url.pathname !== '/')
  await hydrated(page)
}

export async function signOut(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name: new RegExp(name) }).click()
  await page.getByRole('menuitem', { name: 'Sign out' }).click()
  await page.waitForURL(/\/sign-in/)
  await hydrated(page)
}

/** What the screen says aloud at once: an error summary or a refusal. The announcer of every page is one too, mostly empty. */
export const alerts = (scope: Page | Locator): Locator => scope.getByRole('alert').filter({ hasText: /\S/ })

export { expect }
