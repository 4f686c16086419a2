import { DateTime } from 'luxon'
import { people } from './people.mjs'

/** The starter policy's zone. */
const zone = 'America/Chicago'
const at = (days, time) => {
  const day = DateTime.now().setZone(zone).plus({ days }).toISODate()
  return DateTime.fromISO(`${day}T${time}`, { zone }).toUTC().toISO({ suppressMilliseconds: true })
}

const longHistory = `${'Progressive weakness of the left leg over eleven months, falls on stairs, no back pain; examined three times with the same findings. '.repeat(12)}
Earlier imaging:
- CT head without contrast, normal
- Radiographs of the lumbar spine at another hospital, report asked for twice and not received`
const longAnswer = 'Yes: an MRI at Lakeside in 2019, reported as normal, with 7 mL of an agent that the report does not name. '.repeat(4)

/** Everything the pictures show, made the way staff make it. */
export async function prepareCast({ staff, place }) {
  const [clinician, preparer, radiologist, lead, scheduler] = await Promise.all(
    ['clinician', 'preparer', 'radiologist', 'lead', 'scheduler'].map((person) => staff(people[person], place.url)),
  )
  const send = (recordNumber, questionId, more = {}) => clinician.send({ recordNumber, questionId, ...more })
  const cast = { place, day: DateTime.now().setZone(zone).plus({ days: 2 }).toISODate() }

  cast.draft = await preparer.draft({ recordNumber: '40-2288', questionId: 'first-seizure-adult' })
  cast.seizure = await clinician.draft({
    recordNumber: '40-2217', questionId: 'first-seizure-adult', answers: { tumorInfection: 'yes' },
    form: { priority: 'urgent', history: 'Single generalized seizure 24 November, witnessed. Left breast cancer treated 2021, on letrozole. Neurological examination normal. CT head without contrast normal on the day.' },
  })
  cast.empty = await clinician.begin('40-2274')

  cast.sent = await send('40-2217', 'first-seizure-adult', { answers: { tumorInfection: 'yes' }, form: { priority: 'urgent', detailsByEmail: true } })
  cast.dialysis = await send('40-2231', 'spine-infection', { form: { priority: 'stat' }, screening: { dialysis: 'hemodialysis', kidneyDisease: 'yes' } })
  cast.injury = await send('40-2364', 'ms-new-diagnosis', { form: { priority: 'asap' }, screening: { acuteIllness: 'yes' } })
  cast.reaction = await send('40-2456', 'ms-new-diagnosis', { screening: { earlierReaction: 'yes', reactionAgent: 'gadobutrol', reactionKind: 'allergic-like', reactionSeverity: 'severe', asthma: 'yes' } })
  cast.pregnant = await send('40-2448', 'ms-new-diagnosis', { screening: { pregnancy: 'yes' } })
  cast.knee = await send('40-2274', 'knee-internal-derangement')
  cast.long = await send('40-2483', 'brain-tumor-known', { form: { history: longHistory, wish: null }, screening: { specialNeeds: ['interpreter', 'wheelchair', 'claustrophobia', 'hard-iv-access'] } })
  cast.chinese = await send('40-2498', 'headache-adult')
  cast.arabic = await send('40-2503', 'headache-adult')

  cast.queried = await radiologist.query(await send('40-2295', 'pituitary-hormone-excess'), 'Any MRI before 2021 for comparison?')
  const answered = await radiologist.query(await send('40-2323', 'ms-new-diagnosis'), 'Which side, and since when?')
  cast.answered = await clinician.answer(answered, longAnswer)
  cast.declined = await lead.decline(await send('40-2302', 'low-back-pain-sciatica'), 'Eight weeks of low back pain without a warning sign: an MRI would not change treatment yet.', 'Physiotherapy for six weeks; send it again if weakness appears.')
  cast.approved = await radiologist.approve(await send('40-2260', 'ms-new-diagnosis', { screening: { kidneyRiskFactor: 'yes' } }))
  const booked = await radiologist.approve(await send('40-2370', 'ms-new-diagnosis', { screening: { specialNeeds: ['interpreter', 'hard-iv-access'] } }))
  cast.booked = await scheduler.book(booked, { scanner: 'MR 2', startsAt: at(2, '10:20') })
  const overdue = await radiologist.approve(await send('40-2539', 'brain-tumor-known', { screening: { kidneyRiskFactor: 'yes' } }))
  cast.overdue = await scheduler.book(overdue, { scanner: 'MR 1', startsAt: at(2, '14:10') })
  const done = await radiologist.approve(await send('40-2318', 'ms-new-diagnosis', { form: { detailsByEmail: true } }))
  cast.done = await scheduler.give(await scheduler.book(done, { scanner: 'MR 3', startsAt: at(1, '09:00') }))
  const neutral = await radiologist.approve(await send('40-2404', 'ms-new-diagnosis'))
  cast.neutral = await scheduler.book(neutral, { scanner: 'MR 3', startsAt: at(2, '09:00') })
  cast.mails = await mails(place)
  return cast
}

/** How many letters each pictured patient gets from what was done above. */
const letters = { 'ingrid.moller@example.org': 1, 'samuel.adjei@example.org': 1, 'elin.strand@example.org': 2 }

/** Every e-mail, once all those letters have come; at most half a minute later what there is. */
async function mails(place) {
  for (let waited = 0; ; waited += 500) {
    const all = await (await fetch(`${place.mail}/api/email`)).json()
    const here = Object.entries(letters).every(([address, count]) => all.filter(({ to }) => to.some((one) => one.address === address)).length >= count)
    if (here || waited >= 30_000) return all
    await new Promise((resolve) => setTimeout(resolve, 500))
  }
}
