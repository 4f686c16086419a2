import type { Page } from '@playwright/test'
import { expectAccessible, expectAccessibleOnPhone } from '../support/e2e/axe'
import { awaitMail, linkIn, mailTo } from '../support/e2e/mail'
import {
  answer, answerSafety, checkedWithPatient, chooseQuestion, confirmPatient, findPatient, goOn, heading, saved, send, sheet, writeHistory,
} from '../support/e2e/request-form'
import { expect, go, hydrated, test } from '../support/e2e/test'
import { dayAhead } from '../support/e2e/times'

const question = 'Adult with a first or new seizure: is there a lesion?'
const history = 'Single generalized seizure, witnessed. Left breast cancer treated 2021, on letrozole. Neurological examination normal.'
const patientMail = 'marta.lindqvist@example.org'

test('one request goes from the clinical question to the patient\'s explanation, through every role', async ({ desk }) => {
  test.setTimeout(300_000)
  desk.expectStatus(401, 404, 422)

  const administrator = await desk.signedIn('administrator')
  await test.step('the administrator sees people and sound connections', async () => {
    await expect(administrator.getByRole('rowheader', { name: /Dr Ines Okafor/ })).toBeVisible()
    await expectAccessible(administrator, 'the users')
    await expectAccessibleOnPhone(administrator, 'the users')
    await go(administrator, '/settings/connections')
    for (const part of ['Hospital record', 'Mail server', 'Database']) {
      await expect(administrator.getByRole('region', { name: part }).getByText('Connected', { exact: true }).first()).toBeVisible()
    }
    await expectAccessible(administrator, 'the connections')
  })

  const clinician = await desk.signedIn('clinician')
  let reference = ''
  await test.step('the clinician finds and confirms the patient', async () => {
    await expectAccessible(clinician, 'the clinician\'s requests')
    await expectAccessibleOnPhone(clinician, 'the clinician\'s requests')
    await go(clinician, '/requests/new')
    await findPatient(clinician, { name: 'Lindqvist' })
    await expect(clinician.getByText('Record 40-2217')).toBeVisible()
    await expectAccessible(clinician, 'the patient step')
    await clinician.getByRole('button', { name: 'Choose Marta Lindqvist' }).click()
    await expectAccessible(clinician, 'the patient\'s confirmation')
    await clinician.keyboard.press('Escape')
    await confirmPatient(clinician, 'Marta Lindqvist')
  })

  await test.step('the question leads to contrast, and the sheet says why', async () => {
    await chooseQuestion(clinician, 'seizure', question)
    await answer(clinician, /known cancer/, 'Yes')
    await answer(clinician, 'How soon is it needed?', 'Urgent')
    await writeHistory(clinician, history)
    const reasons = sheet(clinician)
    await expect(reasons.getByRole('heading', { level: 2 })).toContainText('MRI brain')
    await expect(reasons.getByRole('heading', { level: 2 })).toContainText('without and with contrast')
    for (const clause of ['Because', 'Provided', 'Unless']) await expect(reasons.getByText(clause, { exact: true })).toBeVisible()
    await expect(reasons.getByText('Tumor, abscess and encephalitis become likely')).toBeVisible()
    await expect(reasons.getByText('ACR Appropriateness Criteria')).toBeVisible()
    await expect(reasons.getByText('eGFR 69', { exact: true })).toBeVisible()
    await expect(reasons.getByText('G2', { exact: true })).toBeVisible()
    await expect(reasons.getByText(/creatinine 0\.94 mg\/dL.*19 days/)).toBeVisible()
    await expect(reasons.getByText(/An IV start on arrival/)).toBeVisible()
    await saved(clinician)
    await expectAccessible(clinician, 'the question step')
    await expectAccessibleOnPhone(clinician, 'the question step')
    await goOn(clinician, 'contrast')
    await expectAccessible(clinician, 'the contrast step')
    await expectAccessibleOnPhone(clinician, 'the contrast step')
    await goOn(clinician, 'safety')
  })

  await test.step('the record\'s suggestions are confirmed, the rest is answered', async () => {
    await expect(clinician.getByText(/74 kg from the record/)).toBeVisible()
    await expectAccessible(clinician, 'the safety step with nothing answered')
    await answerSafety(clinician)
    await expect(clinician.getByText('Confirmed', { exact: true }).first()).toBeVisible()
    await answer(clinician, /agree to details of this exam by e-mail/, 'Yes, agreed')
    await clinician.getByLabel(checkedWithPatient).check()
    await expectAccessible(clinician, 'the safety step')
    await expectAccessibleOnPhone(clinician, 'the safety step')
    await goOn(clinician, 'check')
    await expect(clinician.getByText(question, { exact: true })).toBeVisible()
    await expectAccessible(clinician, 'the check step')
    await expectAccessibleOnPhone(clinician, 'the check step')
  })

  await test.step('the clinician signs and sends', async () => {
    reference = await send(clinician)
    await expect(clinician.getByText(`Sent to imaging as ${reference}.`)).toBeVisible()
    await expect(heading(clinician, 'MRI brain')).toContainText('without and with contrast, because')
    await expectAccessible(clinician, 'the sent request')
    await expectAccessibleOnPhone(clinician, 'the sent request')
  })

  const radiologist = await desk.signedIn('radiologist')
  const open = radiologist.getByRole('article', { name: reference })
  await test.step('the radiologist asks before deciding', async () => {
    await go(radiologist, `/review?open=${reference}`)
    await expect(open.getByText(history)).toBeVisible()
    await expectAccessible(radiologist, 'the review')
    await expectAccessibleOnPhone(radiologist, 'the review')
    await radiologist.getByRole('button', { name: 'Send a query' }).click()
    const dialog = radiologist.getByRole('dialog', { name: 'Send a query' })
    await dialog.getByLabel('What do you need to know?').fill('Any MRI before 2021 for comparison?')
    await expectAccessible(radiologist, 'the query')
    await dialog.getByRole('button', { name: 'Send the query' }).click()
    await expect(dialog).toBeHidden()
    await expect(radiologist.getByText('The ordering side owes an answer')).toBeVisible()
  })

  await test.step('the clinician answers', async () => {
    await go(clinician, '/requests')
    await clinician.getByRole('region', { name: 'Waiting on your side' }).getByRole('link', { name: /MRI brain/ }).click()
    await expect(clinician.getByText('Any MRI before 2021 for comparison?')).toBeVisible()
    await expectAccessible(clinician, 'the queried request')
    await clinician.getByRole('textbox', { name: 'Answer' }).fill('None. CT only.')
    await clinician.getByRole('button', { name: 'Send the answer' }).click()
    await expect(clinician.getByText('None. CT only.')).toBeVisible()
    await expect(clinician.getByText('Your side owes an answer')).toBeHidden()
  })

  await test.step('the radiologist approves the agent and its volume', async () => {
    await go(radiologist, `/review?open=${reference}`)
    await expect(open.getByText('None. CT only.')).toBeVisible()
    await expect(radiologist.getByLabel('Agent', { exact: true })).toHaveValue('gadobutrol')
    await expect(radiologist.getByText('7.4 mmol', { exact: true })).toBeVisible()
    await expect(radiologist.getByText('7.4 mL', { exact: true })).toBeVisible()
    await radiologist.getByRole('button', { name: 'Approve as suggested' }).click()
    await expect(radiologist.getByRole('region', { name: 'Approved' }).getByText(/gadobutrol.*7\.4 mL/)).toBeVisible()
    await expectAccessible(radiologist, 'the approved request')
  })

  const scheduler = await desk.signedIn('scheduler')
  const line = scheduler.getByRole('row').filter({ hasText: reference })
  await test.step('the scheduler sees what it needs, arranges it and sets the time', async () => {
    await go(scheduler, '/preparation?tab=not-booked')
    await expect(line.getByRole('button', { name: /An IV start on arrival/ })).toBeVisible()
    await expectAccessible(scheduler, 'the preparation')
    await expectAccessibleOnPhone(scheduler, 'the preparation')
    await line.getByRole('button', { name: /An IV start on arrival/ }).click()
    const need = scheduler.getByRole('dialog')
    await need.getByRole('group', { name: 'How does it stand?' }).getByLabel('Arranged').check()
    await expectAccessible(scheduler, 'a need')
    await need.getByRole('button', { name: 'Save', exact: true }).click()
    await expect(line.getByText(/An IV start on arrival.*: arranged/)).toBeVisible()
    await line.getByRole('button', { name: 'Set exam time' }).click()
    const booking = scheduler.getByRole('dialog', { name: 'Set the exam time' })
    await booking.getByLabel('Scanner').selectOption({ label: 'MR 1, Harbor Road, ground floor' })
    await booking.getByLabel('Day').fill(dayAhead(3))
    await booking.getByLabel('Time', { exact: true }).fill('10:20')
    await expectAccessible(scheduler, 'the booking')
    await booking.getByRole('button', { name: 'Set the time' }).click()
    await expect(booking).toBeHidden()
  })

  await test.step('the patient reads why, after giving the right date of birth', async () => {
    const letter = await awaitMail(patientMail)
    const words = letter.text.replaceAll(/\s+/g, ' ')
    expect(words).toContain('contrast')
    expect(words).toContain('Contrast makes these easier to see')
    const patient = await desk.stranger()
    await go(patient, linkIn(letter, /\/explanation\//))
    await expect(patient.getByRole('heading', { level: 1, name: 'About your scan' })).toBeVisible()
    await expectAccessible(patient, 'the patient\'s door')
    await expectAccessibleOnPhone(patient, 'the patient\'s door')
    await giveBirthDate(patient, 'November', '8', '1956')
    await expect(patient.getByText('That date does not match. Check it and try again.')).toBeVisible()
    await expectAccessible(patient, 'the patient\'s door after a wrong date')
    await giveBirthDate(patient, 'November', '8', '1965')
    await expect(patient.getByText(/Contrast makes these easier to see/)).toBeVisible()
    await expect(patient).toHaveURL(/\/explanation\/current$/)
    await expectAccessible(patient, 'the patient\'s page')
    await expectAccessibleOnPhone(patient, 'the patient\'s page')
  })

  await test.step('what was really given is recorded, and the patient is told', async () => {
    await go(scheduler, '/preparation?tab=needs-something')
    await expect(line).toBeVisible()
    await line.getByRole('button', { name: `More for ${reference}` }).click()
    await scheduler.getByRole('menuitem', { name: 'Record what was given' }).click()
    const given = scheduler.getByRole('dialog', { name: 'Record what was given' })
    await given.getByLabel('Volume given').fill('7.4')
    await given.getByLabel('Lot').fill('K2281')
    await expectAccessible(scheduler, 'what was given')
    await given.getByRole('button', { name: 'Record it' }).click()
    await expect(given).toBeHidden()
    const second = await awaitMail(patientMail, 2)
    expect(second.text.toLowerCase()).toContain('gadobutrol')
    expect(await mailTo(patientMail)).toHaveLength(2)
  })

  await test.step('the request is closed, and the trail tells the whole of it', async () => {
    await expect(async () => {
      await go(clinician, `/requests/${reference}`)
      await expect(clinician.getByText('Closed', { exact: true })).toBeVisible({ timeout: 1000 })
    }).toPass({ timeout: 30_000 })
    await expect(clinician.getByText('closed a request')).toBeVisible()
    await expectAccessible(clinician, 'the closed request')
    await go(administrator, '/audit')
    for (const told of ['sent a request', 'sent a query', 'approved a request', 'booked an exam', 'recorded what was given', 'opened the explanation', 'closed a request']) {
      await expect(administrator.getByRole('row').filter({ hasText: told }).first()).toBeVisible()
    }
    await hydrated(administrator)
    await expectAccessible(administrator, 'the audit trail')
  })
})

async function giveBirthDate(patient: Page, month: string, day: string, year: string): Promise<void> {
  await patient.getByLabel('Month').selectOption({ label: month })
  await patient.getByLabel('Day').fill(day)
  await patient.getByLabel('Year').fill(year)
  await patient.getByRole('button', { name: 'Open my page' }).click()
}
