/**
 * Every state of every screen that is pictured. A state: `name`; `as` whom (see people.mjs), nobody where it is missing; `at` an
 * address or a function of the cast (see cast.mjs); `then` what is done on the page before the picture; `before` and `after`
 * around it; `html` where `at` gives the page's own text, such as an e-mail; `bare` where a refusal is shown, which never comes to life;
 * `widths` where one of the two would say nothing.
 */

const control = (body) => ({ place }) => fetch(`${place.fhir}/__control`, { method: 'POST', body: JSON.stringify(body) })
const recordDown = { before: control({ fault: 'unreachable' }), after: control({ reset: true }) }

/** While the picture is taken, calls to one route fail as if the server were being restarted. */
const failing = (route) => (page) => page.route(route, (call) => call.fulfill({ status: 503, body: '' }))

const press = (name) => (page) => page.getByRole('button', { name }).first().click()
const search = (recordNumber) => async (page) => {
  await page.getByLabel('Record number').fill(recordNumber)
  await page.getByRole('button', { name: 'Search', exact: true }).click()
  await page.getByRole('heading', { level: 2 }).first().waitFor()
}
const step = (name, draft) => (cast) => `/requests/new/${name}?draft=${cast[draft].id}`
const request = (name) => (cast) => `/requests/${cast[name].reference}`
const review = (name) => (cast) => `/review?open=${cast[name].reference}`
const more = (name, item) => async (page, cast) => {
  await page.getByRole('button', { name: `More for ${cast[name].reference}` }).click()
  await page.getByRole('menuitem', { name: item }).click()
  await page.getByRole('dialog').waitFor()
}
const continueTo = async (page, _cast, width) => {
  await page.getByRole('heading', { name: 'Safety questions' }).waitFor()
  await page.getByRole('button', { name: width === 'wide' ? /^Continue to/ : 'Continue', exact: width !== 'wide' }).click()
}

/** An e-mail to one address, as its reader's program would show it: the first, or with -1 the latest. */
const mail = (address, nth = 0) => ({ mails }) => {
  const found = mails.filter(({ to }) => to.some((one) => one.address === address)).at(nth)
  if (!found) throw new Error(`no e-mail to ${address}`)
  return found.html
}
/** The link of the latest letter to one address. */
const letterLink = ({ mails }, address) => {
  const found = mails.findLast(({ to, html }) => to.some((one) => one.address === address) && html.includes('/explanation/'))
  if (!found) throw new Error(`no letter to ${address}`)
  return /href="([^"]*\/explanation\/[^"]+)"/.exec(found.html)[1].replaceAll('&amp;', '&')
}
const birthDate = (month, day, year) => async (page) => {
  await page.getByLabel('Month').selectOption({ label: month })
  await page.getByLabel('Day').fill(day)
  await page.getByLabel('Year').fill(year)
  await page.getByRole('button', { name: 'Open my page' }).click()
}

export const states = [
  { name: 'sign-in', at: '/sign-in' },
  { name: 'sign-in, nothing typed', at: '/sign-in', then: press('Sign in') },
  { name: 'sign-in, after idling', at: '/sign-in?why=idle' },
  { name: 'not found', as: 'clinician', at: '/nothing-here', bare: true },
  { name: 'not allowed', as: 'scheduler', at: '/settings/users', bare: true },

  { name: 'requests', as: 'clinician', at: '/requests' },
  { name: 'requests, empty', as: 'newcomer', at: '/requests' },
  { name: 'requests, all of the department', as: 'radiologist', at: '/requests' },
  { name: 'requests, nothing found', as: 'clinician', at: '/requests', then: async (page) => {
    await page.getByLabel('Search').fill('nobody of that name')
    await page.waitForTimeout(800)
  } },

  { name: 'new request, patient', as: 'clinician', at: '/requests/new' },
  { name: 'new request, patients found', as: 'clinician', at: '/requests/new', then: async (page) => {
    await page.getByLabel('Name', { exact: true }).fill('hale')
    await page.getByRole('button', { name: 'Search', exact: true }).click()
    await page.getByRole('heading', { level: 2 }).first().waitFor()
  } },
  { name: 'new request, nobody found', as: 'clinician', at: '/requests/new', then: search('00-0000') },
  { name: 'new request, long name', as: 'clinician', at: '/requests/new', then: search('40-2483') },
  { name: 'new request, right to left', as: 'clinician', at: '/requests/new', then: search('40-2503') },
  { name: 'new request, record away', as: 'clinician', at: '/requests/new', then: search('40-2217'), ...recordDown },
  { name: 'new request, confirm the patient', as: 'clinician', at: '/requests/new', then: async (page) => {
    await search('40-2217')(page)
    await page.getByRole('button', { name: /^Choose/ }).click()
    await page.getByRole('dialog').waitFor()
  } },
  { name: 'new request, question', as: 'clinician', at: step('question', 'seizure') },
  { name: 'new request, question, nothing chosen', as: 'clinician', at: step('question', 'empty') },
  { name: 'new request, question, errors', as: 'clinician', at: step('question', 'empty'), then: async (page, _cast, width) => {
    await page.getByLabel('Clinical question').waitFor()
    await page.getByRole('button', { name: width === 'wide' ? /^Continue to/ : 'Continue', exact: width !== 'wide' }).click()
  } },
  { name: 'new request, question, list open', as: 'clinician', at: step('question', 'empty'), then: async (page) => {
    await page.getByLabel('Clinical question').fill('seizure')
    await page.getByRole('listbox').getByRole('option').first().waitFor()
  } },
  { name: 'new request, contrast', as: 'clinician', at: step('contrast', 'seizure') },
  { name: 'new request, contrast, another wish', as: 'clinician', at: step('contrast', 'seizure'), then: (page) => page.getByLabel('No, something else').check() },
  { name: 'new request, safety', as: 'clinician', at: step('safety', 'seizure') },
  { name: 'new request, safety, errors', as: 'clinician', at: step('safety', 'empty'), then: continueTo },
  { name: 'new request, safety, typing a creatinine', as: 'clinician', at: step('safety', 'seizure'), then: press('Type a creatinine') },
  { name: 'new request, check', as: 'clinician', at: step('check', 'seizure') },
  { name: 'new request, check, things missing', as: 'clinician', at: step('check', 'empty') },
  { name: 'new request, check, prepared by staff', as: 'preparer', at: step('check', 'draft') },
  { name: 'new request, reasons on a phone', as: 'clinician', at: step('question', 'seizure'), widths: ['phone'], then: press(/Tap for the reasons/) },

  { name: 'request, sent', as: 'clinician', at: request('sent') },
  { name: 'request, queried', as: 'clinician', at: request('queried') },
  { name: 'request, long', as: 'clinician', at: request('long') },
  { name: 'request, declined', as: 'clinician', at: request('declined') },
  { name: 'request, booked', as: 'clinician', at: request('booked') },
  { name: 'request, done', as: 'clinician', at: request('done') },
  { name: 'request, withdrawing', as: 'clinician', at: request('sent'), then: press('Withdraw this request') },
  { name: 'request, not there', as: 'clinician', at: '/requests/WF-99-999999' },

  { name: 'review', as: 'radiologist', at: review('sent') },
  { name: 'review, the queue on a phone', as: 'radiologist', at: '/review', widths: ['phone'] },
  { name: 'review, hemodialysis', as: 'radiologist', at: review('dialysis') },
  { name: 'review, acute kidney injury', as: 'radiologist', at: review('injury') },
  { name: 'review, severe reaction', as: 'radiologist', at: review('reaction') },
  { name: 'review, pregnant', as: 'radiologist', at: review('pregnant') },
  { name: 'review, without contrast', as: 'radiologist', at: review('knee') },
  { name: 'review, long', as: 'radiologist', at: review('long') },
  { name: 'review, Chinese name', as: 'radiologist', at: review('chinese') },
  { name: 'review, reply waiting', as: 'radiologist', at: review('answered') },
  { name: 'review, query', as: 'radiologist', at: review('sent'), then: press(/Send a query/) },
  { name: 'review, decline', as: 'radiologist', at: review('sent'), then: press(/Decline with a reason/) },
  { name: 'review, sign all the same', as: 'radiologist', at: review('reaction'), then: press(/^Approve as/) },
  { name: 'review, keys', as: 'radiologist', at: review('sent'), then: (page) => page.keyboard.press('?') },
  { name: 'review, approved', as: 'radiologist', at: review('approved') },
  { name: 'review, nothing under a filter', as: 'radiologist', at: '/review?filter=reopened' },

  { name: 'preparation', as: 'scheduler', at: '/preparation?tab=needs-something' },
  { name: 'preparation, not booked', as: 'scheduler', at: '/preparation?tab=not-booked' },
  { name: 'preparation, lab work', as: 'scheduler', at: '/preparation?tab=lab-work' },
  { name: 'preparation, empty', as: 'scheduler', at: '/preparation?tab=held' },
  { name: 'preparation, done', as: 'scheduler', at: '/preparation?tab=done' },
  { name: 'preparation, error', as: 'scheduler', at: '/preparation?tab=done', then: async (page) => {
    await failing('**/api/preparation*')(page)
    await page.getByRole('tab', { name: /Ready/ }).click()
    await page.getByRole('alert').filter({ hasText: /\S/ }).waitFor()
  } },
  { name: 'preparation, setting the time', as: 'scheduler', at: '/preparation?tab=not-booked', then: press('Set exam time') },
  { name: 'preparation, a need', as: 'scheduler', at: '/preparation?tab=lab-work', then: press(/A creatinine drawn/) },
  { name: 'preparation, what was given', as: 'scheduler', at: '/preparation?tab=needs-something', then: more('booked', 'Record what was given') },
  { name: 'preparation, giving up a slot', as: 'scheduler', at: '/preparation?tab=needs-something', then: more('booked', 'Give up the slot') },
  { name: 'preparation, letter', as: 'scheduler', at: '/preparation?tab=needs-something', then: more('booked', 'Letter and consent') },
  { name: 'preparation, the day', as: 'scheduler', at: ({ day }) => `/preparation/day/${day}` },
  { name: 'preparation, the day on paper', as: 'scheduler', at: ({ day }) => `/preparation/day/${day}`, widths: ['wide'], then: (page) => page.emulateMedia({ media: 'print' }) },
  { name: 'preparation, a day without exams', as: 'scheduler', at: '/preparation/day/2031-01-01' },

  { name: 'guidance', as: 'clinician', at: '/guidance' },
  { name: 'guidance, a question', as: 'lead', at: '/guidance/first-seizure-adult' },

  { name: 'users', as: 'administrator', at: '/settings/users' },
  { name: 'users, invite', as: 'administrator', at: '/settings/users', then: press('Invite a user') },
  { name: 'users, nobody found', as: 'administrator', at: '/settings/users', then: (page) => page.getByLabel('Search').fill('nobody of that name') },
  { name: 'practices', as: 'administrator', at: '/settings/practices' },
  { name: 'connections', as: 'administrator', at: '/settings/connections', then: press('Check again') },
  { name: 'connections, record away', as: 'administrator', at: '/settings/connections', ...recordDown, then: (page) => page.getByRole('heading', { name: 'Hospital record' }).waitFor() },
  { name: 'policy', as: 'radiologist', at: '/settings/policy' },
  { name: 'audit trail', as: 'administrator', at: '/audit' },

  { name: 'e-mail, with details', at: mail('elin.strand@example.org'), html: true },
  { name: 'e-mail, neutral', at: mail('samuel.adjei@example.org'), html: true },
  { name: 'e-mail, second letter', at: mail('elin.strand@example.org', -1), html: true },
  { name: 'e-mail, to a clinician', at: mail('ines.okafor@millbrook.example'), html: true },
  { name: 'patient, date of birth', at: (cast) => letterLink(cast, 'ingrid.moller@example.org'), then: (page) => page.getByLabel('Month').waitFor() },
  { name: 'patient, wrong date of birth', at: (cast) => letterLink(cast, 'ingrid.moller@example.org'), then: birthDate('January', '2', '1903') },
  { name: 'patient, before the exam', at: (cast) => letterLink(cast, 'samuel.adjei@example.org'), then: birthDate('November', '5', '1979') },
  { name: 'patient, after the exam', at: (cast) => letterLink(cast, 'elin.strand@example.org'), then: birthDate('October', '5', '1997') },
  { name: 'patient, ended link', at: '/explanation/not-a-link-of-ours', then: birthDate('January', '2', '1990') },
  { name: 'patient, closed page', at: '/explanation/current' },
  { name: 'invitation, ended', at: '/invitation/not-a-link-of-ours' },
]
