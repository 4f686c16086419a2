import { expect } from '@playwright/test'
import type { Locator, Page } from '@playwright/test'
import { go } from './test'

/** The ordering clinician's form, driven by the words on it. */

export async function findPatient(page: Page, by: { name?: string, recordNumber?: string }): Promise<void> {
  if (by.name !== undefined) await page.getByLabel('Name', { exact: true }).fill(by.name)
  if (by.recordNumber !== undefined) await page.getByLabel('Record number').fill(by.recordNumber)
  await page.getByRole('button', { name: 'Search', exact: true }).click()
}

/** Chooses somebody found, compares and confirms. @returns the draft's id */
export async function confirmPatient(page: Page, name: string): Promise<string> {
  await page.getByRole('button', { name: `Choose ${name}` }).click()
  const dialog = page.getByRole('dialog', { name: 'Is this the right patient?' })
  await dialog.getByLabel('Name, date of birth and record number are right').check()
  await dialog.getByRole('button', { name: 'Go on with this patient' }).click()
  await expect(heading(page, 'What should the scan answer?')).toBeVisible()
  return new URL(page.url()).searchParams.get('draft') ?? ''
}

/** From nothing to the question step of a new draft. @returns the draft's id */
export async function beginRequest(page: Page, patient: { name: string, recordNumber: string }): Promise<string> {
  await go(page, '/requests/new')
  await findPatient(page, { recordNumber: patient.recordNumber })
  return await confirmPatient(page, patient.name)
}

export const heading = (page: Page, name: string): Locator => page.getByRole('heading', { level: 1, name })

/** The live answer beside the form. */
export const sheet = (page: Page): Locator => page.getByRole('region', { name: 'What is suggested and why' })

export async function chooseQuestion(page: Page, words: string, question: string): Promise<void> {
  await page.getByLabel('Clinical question').fill(words)
  await page.getByRole('listbox').getByRole('option', { name: question }).click()
  await expect(page.getByLabel('Clinical question')).toHaveValue(question)
}

/** One answer of a group that is asked by its legend; a hint may follow the answer's own words. */
export async function answer(page: Page, legend: string | RegExp, choice: string): Promise<void> {
  await page.getByRole('group', { name: legend }).getByRole('radio', { name: new RegExp(`^${choice}(?!\\w)`) }).check()
}

export async function writeHistory(page: Page, text: string): Promise<void> {
  await page.getByLabel('History for the radiologist').fill(text)
}

export async function saved(page: Page): Promise<void> {
  await expect(page.getByText(/^Draft saved \d/)).toBeVisible()
}

/** Confirms what the record suggests, answers the rest with No, and the given ones as told. */
export async function answerSafety(page: Page, told: Record<string, string> = {}): Promise<void> {
  const questions = page.getByRole('region', { name: 'Safety questions' })
  for (const [legend, choice] of Object.entries(told)) await questions.getByRole('group', { name: legend }).getByLabel(choice, { exact: true }).check()
  const confirm = questions.getByRole('button', { name: /^Confirm / })
  while (await confirm.count() > 0) await confirm.first().click()
  for (const group of await questions.getByRole('group').all()) {
    if (await group.locator('input:checked').count() === 0) await group.getByLabel('No', { exact: true }).check()
  }
}

export const checkedWithPatient = 'I have checked these answers with the patient or their chart'

export async function goOn(page: Page, to: 'contrast' | 'safety' | 'check'): Promise<void> {
  await page.getByRole('button', { name: `Continue to ${to}` }).click()
  const titles = { contrast: 'Is contrast needed?', safety: 'What must be known for safety?', check: 'Check and send' }
  await expect(heading(page, titles[to])).toBeVisible()
}

/** Signs and sends from the last step. @returns the request's number */
export async function send(page: Page): Promise<string> {
  await page.getByRole('button', { name: 'Sign and send to imaging' }).click()
  await page.waitForURL(/\/requests\/WF-/)
  return new URL(page.url()).pathname.split('/').at(-1) ?? ''
}
