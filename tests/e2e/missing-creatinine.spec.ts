import { expectAccessible } from '../support/e2e/axe'
import { answerSafety, beginRequest, checkedWithPatient, chooseQuestion, goOn, send, sheet, writeHistory } from '../support/e2e/request-form'
import { staff } from '../support/e2e/staff'
import { expect, go, people, test } from '../support/e2e/test'
import { dayAhead } from '../support/e2e/times'

const question = 'First suspected demyelinating attack: is this multiple sclerosis?'
/** The starter policy accepts a creatinine of at most 42 days where there is a risk factor for kidney disease. */
const need = /A creatinine drawn within 6 weeks of the exam/

test('a patient without a creatinine shows the scheduler the lab need, which stays until it is arranged', async ({ desk }) => {
  test.setTimeout(120_000)
  const clinician = await desk.signedIn('clinician')
  await beginRequest(clinician, { name: 'Joel Marsh', recordNumber: '40-2274' })
  await chooseQuestion(clinician, 'multiple sclerosis', question)
  await writeHistory(clinician, 'Loss of vision in the left eye for five days, painful on movement.')
  await expect(sheet(clinician).getByText(/No creatinine/)).toBeVisible()
  await goOn(clinician, 'contrast')
  await goOn(clinician, 'safety')
  await answerSafety(clinician, { 'Any risk factor for kidney disease?': 'Yes' })
  await expect(sheet(clinician).getByText(need)).toBeVisible()
  await clinician.getByLabel(checkedWithPatient).check()
  await goOn(clinician, 'check')
  const reference = await send(clinician)

  const radiologist = await desk.signedIn('radiologist')
  await go(radiologist, `/review?open=${reference}`)
  await expect(radiologist.getByRole('article', { name: reference }).getByText(need)).toBeVisible()
  await expectAccessible(radiologist, 'the review of a request without a creatinine')
  await radiologist.getByRole('button', { name: 'Approve as suggested' }).click()
  await expect(radiologist.getByRole('region', { name: 'Approved' })).toBeVisible()

  const scheduler = await desk.signedIn('scheduler')
  await go(scheduler, '/preparation?tab=not-booked')
  const line = scheduler.getByRole('row').filter({ hasText: reference })
  await expect(line.getByRole('button', { name: need })).toBeVisible()
  await line.getByRole('button', { name: 'Set exam time' }).click()
  const booking = scheduler.getByRole('dialog', { name: 'Set the exam time' })
  await booking.getByLabel('Scanner').selectOption({ label: 'MR 2, Harbor Road, ground floor' })
  await booking.getByLabel('Day').fill(dayAhead(6))
  await booking.getByLabel('Time', { exact: true }).fill('14:10')
  await booking.getByRole('button', { name: 'Set the time' }).click()
  await expect(booking).toBeHidden()

  await scheduler.getByRole('tab', { name: /Lab work/ }).click()
  await expect(line.getByRole('button', { name: need })).toContainText('open')
  await expectAccessible(scheduler, 'the lab work')
  await line.getByRole('button', { name: 'Lab ordered' }).click()
  await expect(line.getByRole('button', { name: need })).toContainText('arranged')
  await expect(line.getByRole('button', { name: need })).toContainText('Leila Farouk')

  await scheduler.reload()
  await expect(line.getByRole('button', { name: need })).toContainText('arranged')
})

test('a creatinine of eighteen months ago is not taken for a current one', async ({ desk }) => {
  const sent = await (await staff(people.clinician)).send({ recordNumber: '40-2260', questionId: 'ms-new-diagnosis', screening: { kidneyRiskFactor: 'yes' } })
  const radiologist = await desk.signedIn('radiologist')
  await go(radiologist, `/review?open=${sent.reference}`)
  const open = radiologist.getByRole('article', { name: sent.reference ?? '' })
  await expect(open.getByText('The newest creatinine is too old to rely on')).toBeVisible()
  await expect(open.getByText(need)).toBeVisible()
})
