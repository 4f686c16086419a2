import { expectAccessible, expectAccessibleOnPhone } from '../support/e2e/axe'
import { alerts, expect, go, people, signOut, test } from '../support/e2e/test'

test('a wrong password is refused in words that name neither what was wrong nor whether the account exists', async ({ desk }) => {
  desk.expectStatus(401)
  const page = await desk.stranger()
  await go(page, '/sign-in')
  await expectAccessible(page, 'the sign-in')
  await expectAccessibleOnPhone(page, 'the sign-in')
  for (const email of [people.otherClinician, 'nobody@example.org']) {
    await page.getByLabel('E-mail').fill(email)
    await page.getByLabel('Password', { exact: true }).fill('not the right words')
    await page.getByRole('button', { name: 'Sign in', exact: true }).click()
    await expect(alerts(page)).toContainText('That did not match')
    await expect(alerts(page)).toContainText('Check the e-mail address and the password.')
    await expect(page).toHaveTitle(/^Error: /)
  }
  await expectAccessible(page, 'the sign-in after a refusal')
})

test('nothing typed is told beside its field, and the summary takes the focus', async ({ desk }) => {
  const page = await desk.stranger()
  await go(page, '/sign-in')
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(alerts(page)).toBeFocused()
  await alerts(page).getByRole('link', { name: 'Type your e-mail address.' }).click()
  await expect(page.getByLabel('E-mail')).toBeFocused()
})

test('each role lands on its own work and sees only its own places', async ({ desk }) => {
  test.setTimeout(120_000)
  const homes = [
    { person: 'clinician', title: 'Your requests', sees: ['Requests', 'New request', 'Guidance'], never: ['Review', 'Preparation', 'Users'] },
    { person: 'radiologist', title: /to review/, sees: ['Review', 'Requests', 'Guidance'], never: ['New request', 'Users'] },
    { person: 'scheduler', title: 'What each exam still needs', sees: ['Preparation', 'Requests'], never: ['Review', 'New request', 'Users'] },
    { person: 'administrator', title: /Users|accounts|people/i, sees: ['Users', 'Practices', 'Connections', 'Audit trail'], never: ['Review', 'New request'] },
  ] as const
  for (const { person, title, sees, never } of homes) {
    const page = await desk.signedIn(person)
    await expect(page.getByRole('heading', { level: 1, name: title })).toBeVisible()
    const places = page.getByRole('navigation').first()
    for (const name of sees) await expect(places.getByRole('link', { name: new RegExp(`^${name}`) }), `${person} sees ${name}`).toBeVisible()
    for (const name of never) await expect(places.getByRole('link', { name: new RegExp(`^${name}`) }), `${person} does not see ${name}`).toHaveCount(0)
    await page.context().close()
  }
})

test('an address asked for before signing in is where one arrives afterwards', async ({ desk }) => {
  const page = await desk.stranger()
  await go(page, '/guidance')
  await expect(page).toHaveURL(/\/sign-in\?next=\/guidance/)
  await page.getByRole('button', { name: /Dr Tomas Brandt/ }).click()
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page).toHaveURL(/\/guidance$/)
})

test('a page that belongs to another role is refused in words', async ({ desk }) => {
  desk.expectStatus(403)
  const page = await desk.signedIn('scheduler')
  await page.goto('/settings/users')
  await expect(page.getByRole('heading', { level: 1, name: 'This is not open to you' })).toBeVisible()
  await expectAccessible(page, 'a page of another role')
})

test('after signing out, the back button shows nothing of the work before', async ({ desk }) => {
  const page = await desk.signedIn('radiologist')
  await go(page, '/requests')
  await signOut(page, 'Dr Tomas Brandt')
  await page.goBack()
  await expect(page).toHaveURL(/\/sign-in/)
  await expect(page.getByRole('heading', { name: 'Sign in' })).toBeVisible()
})

test('a session that has ended leads to the sign-in, and back to the same place after it', async ({ desk }) => {
  desk.expectStatus(401)
  const page = await desk.signedIn('scheduler')
  await page.context().clearCookies()
  await page.reload()
  await expect(page).toHaveURL(/\/sign-in\?next=/)
  await page.getByRole('button', { name: /Leila Farouk/ }).click()
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await expect(page).toHaveURL(/\/preparation/)
})
