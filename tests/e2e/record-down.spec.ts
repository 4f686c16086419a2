import { expectAccessible } from '../support/e2e/axe'
import { breakRecord, resetRecord } from '../support/e2e/record'
import {
  answerSafety, beginRequest, checkedWithPatient, chooseQuestion, confirmPatient, findPatient, goOn, heading, saved, send, sheet, writeHistory,
} from '../support/e2e/request-form'
import { staff } from '../support/e2e/staff'
import { alerts, expect, go, hydrated, people, test } from '../support/e2e/test'
import { dayAhead } from '../support/e2e/times'

const question = 'First suspected demyelinating attack: is this multiple sclerosis?'

/** Mends the record and waits until the server asks it again: after failures it leaves it alone for a while. */
async function mendRecord(): Promise<void> {
  await resetRecord()
  const { searchedIn } = await staff(people.clinician)
  await expect.poll(() => searchedIn('40-2295'), { timeout: 90_000, intervals: [3_000] }).toBe('record')
}

test.afterEach(mendRecord)

test('with the hospital record down, the clinician types a value with its date and source, and nothing is lost', async ({ desk }) => {
  test.setTimeout(180_000)
  const clinician = await desk.signedIn('clinician')
  // Somebody known here from an earlier request is found while the record is away.
  await beginRequest(clinician, { name: 'Nadia Rahman', recordNumber: '40-2295' })
  await breakRecord('unreachable')

  await go(clinician, '/requests/new')
  await findPatient(clinician, { recordNumber: '40-2295' })
  await expect(clinician.getByText('The hospital record could not be searched')).toBeVisible()
  await expect(clinician.getByText('These are people already known to Wherefore; others may exist.')).toBeVisible()
  await expectAccessible(clinician, 'a search among known patients')
  await confirmPatient(clinician, 'Nadia Rahman')

  await expect(clinician.getByText('The hospital record could not be read')).toBeVisible()
  await expect(clinician.getByText(/type the weight and a creatinine from a report/)).toBeVisible()
  await chooseQuestion(clinician, 'multiple sclerosis', question)
  await writeHistory(clinician, 'Numb left arm for ten days.')
  await goOn(clinician, 'contrast')
  await goOn(clinician, 'safety')

  await clinician.getByRole('button', { name: 'Type a creatinine' }).click()
  const typed = clinician.getByRole('region', { name: 'Creatinine from elsewhere' })
  await typed.getByLabel('Creatinine', { exact: true }).fill('71')
  await typed.getByLabel('Unit on the report').selectOption({ label: 'µmol/L' })
  await typed.getByRole('button', { name: 'Add this value' }).click()
  await expect(alerts(typed)).toContainText('Give the day it was drawn.')
  await expect(alerts(typed)).toContainText('Say which laboratory or hospital it comes from.')
  await typed.getByLabel('Drawn on').fill(dayAhead(-4))
  await typed.getByLabel('Laboratory or hospital').fill('Lakeside Laboratory')
  await typed.getByRole('button', { name: 'Add this value' }).click()
  await expect(typed.getByRole('listitem')).toContainText('71 µmol/L')
  await expect(typed.getByRole('listitem')).toContainText('Lakeside Laboratory')
  await expect(sheet(clinician).getByText(/creatinine 0\.80 mg\/dL.*4 days/)).toBeVisible()
  await clinician.getByLabel('Weight', { exact: true }).fill('62')
  await answerSafety(clinician)
  await saved(clinician)
  await expectAccessible(clinician, 'the safety step without a record')

  await clinician.reload()
  await hydrated(clinician)
  await expect(typed.getByRole('listitem')).toContainText('Lakeside Laboratory')
  await expect(clinician.getByLabel('Weight', { exact: true })).toHaveValue('62')
  await expect(clinician.getByRole('group', { name: 'Asthma?' }).getByLabel('No', { exact: true })).toBeChecked()
  await clinician.getByLabel(checkedWithPatient).check()
  await goOn(clinician, 'check')
  await expect(clinician.getByText(/71 µmol\/L/).first()).toBeVisible()
  const reference = await send(clinician)
  await expect(heading(clinician, 'MRI brain')).toBeVisible()

  const radiologist = await desk.signedIn('radiologist')
  await go(radiologist, `/review?open=${reference}`)
  await expect(radiologist.getByText(/The hospital record could not be read: /).first()).toBeVisible()
  await expectAccessible(radiologist, 'the review of a request without a record')
})

test('once the record answers again, it is read at a press and the notice goes', async ({ desk }) => {
  const clinician = await desk.signedIn('clinician')
  await beginRequest(clinician, { name: 'Elin Strand', recordNumber: '40-2318' })
  await breakRecord('unreachable')
  await go(clinician, '/requests/new')
  await findPatient(clinician, { name: 'Strand' })
  await confirmPatient(clinician, 'Elin Strand')
  await expect(clinician.getByText('The hospital record could not be read')).toBeVisible()
  await mendRecord()
  await clinician.getByRole('button', { name: 'Read again' }).click()
  await expect(clinician.getByText(/^From the hospital record/)).toBeVisible()
  await expect(clinician.getByText('The hospital record could not be read')).toBeHidden()
})
