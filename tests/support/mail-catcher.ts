import { z } from 'zod'
import { testSetting } from './database'

const mailSchema = z.object({
  id: z.string(),
  subject: z.string(),
  text: z.string(),
  html: z.string(),
  to: z.array(z.object({ address: z.string() })),
  headers: z.record(z.string(), z.unknown()),
})
export type CaughtMail = z.output<typeof mailSchema>

/** Port of the mail catcher that `npm test` runs. */
export const catcherPort = (): number => Number(testSetting('WHEREFORE_TEST_SMTP_PORT'))

/** What the catcher holds for one address, oldest first. */
export async function mailTo(address: string): Promise<CaughtMail[]> {
  const answer = await fetch(`${testSetting('WHEREFORE_TEST_MAIL_URL')}/api/email`)
  const all = z.array(z.unknown()).parse(await answer.json())
  return all.map(one => mailSchema.parse(one)).filter(mail => mail.to.some(to => to.address === address))
}
