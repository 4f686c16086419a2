import { readFile } from 'node:fs/promises'
import { expectAccessible, expectAccessibleOnPhone } from '../support/e2e/axe'
import { staff } from '../support/e2e/staff'
import type { Written } from '../support/e2e/staff'
import { alerts, expect, go, people, test } from '../support/e2e/test'
import { dayAhead, instantAhead } from '../support/e2e/times'

async function approved(recordNumber: string): Promise<Written> {
  const request = await (await staff(people.clinician)).send({ recordNumber, questionId: 'ms-new-diagnosis' })
  return await (await staff(people.radiologist)).approve(request)
}

async function booked(recordNumber: string, slot: { scanner: string, startsAt: string }): Promise<Written> {
  return await (await staff(people.scheduler)).book(await approved(recordNumber), slot)
}

test('two exams never share a scanner: the second is refused in words, and its fields keep what was typed', async ({ desk }) => {
  desk.expectStatus(409, 422)
  await booked('40-2288', { scanner: 'MR 3', startsAt: instantAhead(8, '10:00') })
  const request = await approved('40-2295')
  const page = await desk.signedIn('scheduler')
  await go(page, '/preparation?tab=not-booked')
  await page.getByRole('row').filter({ hasText: request.reference ?? '' }).getByRole('button', { name: 'Set exam time' }).click()
  const booking = page.getByRole('dialog', { name: 'Set the exam time' })
  await booking.getByLabel('Scanner').selectOption({ label: 'MR 3, Lakeside annex' })
  await booking.getByLabel('Day').fill(dayAhead(8))
  await booking.getByLabel('Time', { exact: true }).fill('10:20')
  await booking.getByRole('button', { name: 'Set the time' }).click()
  await expect(alerts(booking)).toContainText(/taken|another exam|overlap/i)
  await expect(booking.getByLabel('Time', { exact: true })).toHaveValue('10:20')
  await expectAccessible(page, 'a time that is taken')
  await booking.getByLabel('Time', { exact: true }).fill('11:30')
  await booking.getByRole('button', { name: 'Set the time' }).click()
  await expect(booking).toBeHidden()
})

test('a time that has passed is refused beside its field', async ({ desk }) => {
  desk.expectStatus(422)
  const request = await approved('40-2302')
  const page = await desk.signedIn('scheduler')
  await go(page, '/preparation?tab=not-booked')
  await page.getByRole('row').filter({ hasText: request.reference ?? '' }).getByRole('button', { name: 'Set exam time' }).click()
  const booking = page.getByRole('dialog', { name: 'Set the exam time' })
  await booking.getByRole('button', { name: 'Set the time' }).click()
  await expect(alerts(booking)).toContainText('Choose the day.')
  await booking.getByLabel('Scanner').selectOption({ label: 'MR 1, Harbor Road, ground floor' })
  await booking.getByLabel('Day').fill(dayAhead(-1))
  await booking.getByLabel('Time', { exact: true }).fill('10:20')
  await booking.getByRole('button', { name: 'Set the time' }).click()
  await expect(alerts(booking)).toContainText('Choose a time that is still to come.')
})

test('the list leaves as a file that a spreadsheet reads as text', async ({ desk }) => {
  const request = await booked('40-2323', { scanner: 'MR 2', startsAt: instantAhead(9, '09:00') })
  const page = await desk.signedIn('scheduler')
  await go(page, '/preparation?tab=needs-something')
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('button', { name: 'Export CSV' }).click()])
  expect(download.suggestedFilename()).toMatch(/^preparation-needs-something-\d{4}-\d{2}-\d{2}\.csv$/)
  const text = await readFile(await download.path(), 'utf8')
  expect(text.split('\r\n')[0]).toContain('Reference,Exam,Contrast,Patient')
  const line = text.split('\r\n').find(row => row.includes(request.reference ?? '')) ?? ''
  expect(line).toContain('Harold Finch')
  expect(line).toContain(dayAhead(9))
  expect(line).toContain('09:00')
})

test('the day list shows each scanner\'s exams with what they need, on screen and on paper', async ({ desk }) => {
  const request = await booked('40-2370', { scanner: 'MR 1', startsAt: instantAhead(10, '08:30') })
  const page = await desk.signedIn('scheduler')
  await go(page, `/preparation/day/${dayAhead(10)}`)
  const exams = page.getByRole('region', { name: 'MR 1' })
  await expect(exams.getByRole('row').filter({ hasText: request.reference ?? '' })).toContainText('Ingrid Møller')
  await expect(exams.getByText(/An IV start on arrival/)).toBeVisible()
  await expectAccessible(page, 'the day list')
  await expectAccessibleOnPhone(page, 'the day list')
  await page.emulateMedia({ media: 'print' })
  await expect(page.getByRole('button', { name: 'Print', exact: true })).toBeHidden()
  await expect(page.getByRole('banner')).toBeHidden()
  await expect(exams.getByText('Ingrid Møller')).toBeVisible()
})

test('a slot is given up with its cause, and the exam waits for a new time', async ({ desk }) => {
  const request = await booked('40-2370', { scanner: 'MR 2', startsAt: instantAhead(11, '13:00') })
  const page = await desk.signedIn('scheduler')
  await go(page, '/preparation?tab=needs-something')
  const line = page.getByRole('row').filter({ hasText: request.reference ?? '' })
  await line.getByRole('button', { name: `More for ${request.reference}` }).click()
  await page.getByRole('menuitem', { name: 'Give up the slot' }).click()
  const dialog = page.getByRole('dialog', { name: 'Give up the slot' })
  await dialog.getByRole('button', { name: 'Give up the slot' }).click()
  await expect(alerts(dialog)).toContainText('Say what happened.')
  await dialog.getByLabel('The patient cancelled').check()
  await expectAccessible(page, 'giving up a slot')
  await dialog.getByRole('button', { name: 'Give up the slot' }).click()
  await expect(dialog).toBeHidden()
  await page.getByRole('tab', { name: /Not yet booked/ }).click()
  await expect(line.getByText('No time set')).toBeVisible()
})
