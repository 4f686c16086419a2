import type { Page } from '@playwright/test'
import { expectAccessible } from '../support/e2e/axe'
import { staff } from '../support/e2e/staff'
import type { Written } from '../support/e2e/staff'
import { alerts, expect, go, people, test } from '../support/e2e/test'

async function sent(recordNumber: string, questionId = 'ms-new-diagnosis'): Promise<Written> {
  return await (await staff(people.clinician)).send({ recordNumber, questionId })
}

const decision = (page: Page) => page.getByRole('region', { name: 'Your decision' })
const queue = (page: Page) => page.getByRole('list', { name: 'Requests, most pressing first' })

test('single keys move through the queue and open each step, never from inside a field', async ({ desk }) => {
  await sent('40-2288')
  await sent('40-2295')
  const page = await desk.signedIn('radiologist')
  await expect(page).toHaveURL(/open=WF-/)
  const rows = queue(page).getByRole('link')
  await expect(rows.nth(0)).toHaveAttribute('aria-current', 'true')
  await page.keyboard.press('j')
  await expect(rows.nth(1)).toHaveAttribute('aria-current', 'true')
  await page.keyboard.press('k')
  await expect(rows.nth(0)).toHaveAttribute('aria-current', 'true')

  await page.keyboard.press('?')
  const keys = page.getByRole('dialog')
  for (const does of ['Next request', 'Previous request', 'Approve', 'Send a query', 'Decline with a reason']) await expect(keys.getByText(does)).toBeVisible()
  await expectAccessible(page, 'the list of keys')
  await page.keyboard.press('Escape')

  await page.keyboard.press('q')
  const query = page.getByRole('dialog', { name: 'Send a query' })
  await query.getByLabel('What do you need to know?').fill('Jade? Quite: a d a')
  await expect(query).toBeVisible()
  await page.keyboard.press('Escape')
  await page.keyboard.press('d')
  await expect(page.getByRole('dialog', { name: 'Decline this request' })).toBeVisible()
  await page.keyboard.press('Escape')
  await page.keyboard.press('q')
  await expect(query.getByLabel('What do you need to know?')).toHaveValue('Jade? Quite: a d a')
})

test('the keys can be turned off', async ({ desk }) => {
  await sent('40-2288')
  const page = await desk.signedIn('secondRadiologist')
  await expect(page).toHaveURL(/open=WF-/)
  await page.getByRole('button', { name: /Dr Helen Marsh/ }).click()
  await page.getByRole('menuitemcheckbox', { name: 'Single-key shortcuts' }).click()
  await page.keyboard.press('Escape')
  await page.keyboard.press('q')
  await expect(page.getByRole('dialog', { name: 'Send a query' })).toHaveCount(0)
  await page.getByRole('button', { name: /Dr Helen Marsh/ }).click()
  await page.getByRole('menuitemcheckbox', { name: 'Single-key shortcuts' }).click()
  await page.keyboard.press('Escape')
  await page.keyboard.press('q')
  await expect(page.getByRole('dialog', { name: 'Send a query' })).toBeVisible()
})

test('the key A approves, and within a minute the same radiologist takes it back', async ({ desk }) => {
  const request = await sent('40-2288')
  const page = await desk.signedIn('radiologist')
  await go(page, `/review?open=${request.reference}`)
  await expect(decision(page).getByRole('button', { name: /Approve as suggested/ })).toBeVisible()
  await page.keyboard.press('a')
  await expect(decision(page).getByRole('heading', { name: 'Approved' })).toBeVisible()
  await expect(decision(page).getByText(/more seconds?; after that only by reopening/)).toBeVisible()
  await decision(page).getByRole('button', { name: 'Take it back' }).click()
  await expect(decision(page).getByRole('button', { name: /Approve as suggested/ })).toBeVisible()
  await expect(queue(page).locator(`[data-reference="${request.reference}"]`)).toBeVisible()
})

test('a change from the suggestion wants a reason before it is signed', async ({ desk }) => {
  const request = await sent('40-2288')
  const page = await desk.signedIn('radiologist')
  await go(page, `/review?open=${request.reference}`)
  await decision(page).getByRole('radio', { name: /^Without(,|$)/ }).check({ force: true })
  await expect(decision(page).getByLabel('Agent', { exact: true })).toHaveCount(0)
  await decision(page).getByRole('button', { name: /Approve as chosen/ }).click()
  await expect(alerts(decision(page)).filter({ hasText: 'Give a reason for this choice.' })).toBeFocused()
  await expect(page).toHaveTitle(/^Error: /)
  await expectAccessible(page, 'a decision that lacks its reason')
  await decision(page).getByLabel('Reason for this choice').fill('Enhancement would not change treatment now.')
  await decision(page).getByRole('button', { name: /Approve as chosen/ }).click()
  await expect(decision(page).getByRole('heading', { name: 'Approved' })).toBeVisible()
  await expect(decision(page).getByText('Enhancement would not change treatment now.')).toBeVisible()
})

test('declining tells the clinician why and what would help instead', async ({ desk }) => {
  const request = await sent('40-2288')
  const page = await desk.signedIn('radiologist')
  await go(page, `/review?open=${request.reference}`)
  await page.keyboard.press('d')
  const dialog = page.getByRole('dialog', { name: 'Decline this request' })
  await dialog.getByRole('button', { name: 'Decline the request' }).click()
  await expect(alerts(dialog)).toContainText('Say why, in words the clinician can act on.')
  await dialog.getByLabel('Reason').fill('An MRI of the same region was done nine days ago.')
  await dialog.getByLabel('What would help instead').fill('Ask us to compare the earlier images.')
  await expectAccessible(page, 'declining')
  await dialog.getByRole('button', { name: 'Decline the request' }).click()
  await expect(decision(page).getByRole('heading', { name: 'Declined' })).toBeVisible()

  const clinician = await desk.signedIn('clinician')
  await go(clinician, `/requests/${request.reference}`)
  await expect(clinician.getByText('An MRI of the same region was done nine days ago.')).toBeVisible()
  await expect(clinician.getByText('Ask us to compare the earlier images.')).toBeVisible()
  await expectAccessible(clinician, 'a declined request')
  await clinician.getByRole('button', { name: 'Prepare a corrected copy' }).click()
  await expect(clinician.getByLabel('History for the radiologist')).not.toHaveValue('')
})

test('of two radiologists who decide one request, the second is told who came first and nothing is signed twice', async ({ desk }) => {
  desk.expectStatus(409, 412)
  const request = await sent('40-2288')
  const [first, second] = [await desk.signedIn('radiologist'), await desk.signedIn('secondRadiologist')]
  await go(first, `/review?open=${request.reference}`)
  await go(second, `/review?open=${request.reference}`)
  await decision(second).getByLabel('Note for the scan room').fill('Thin slices, please.')
  await decision(first).getByRole('button', { name: /Approve as suggested/ }).click()
  await expect(decision(first).getByRole('heading', { name: 'Approved' })).toBeVisible()

  await decision(second).getByRole('button', { name: /Approve as suggested/ }).click()
  const told = alerts(decision(second))
  await expect(told).toContainText('Dr Tomas Brandt approved a request')
  await expect(decision(second).getByText('Signed by Dr Tomas Brandt')).toBeVisible()
  await expect(decision(second).getByRole('button', { name: 'Take it back' })).toHaveCount(0)
})
