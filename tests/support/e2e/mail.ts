import { expect } from '@playwright/test'
import { z } from 'zod'
import { setting } from './settings'

const mailSchema = z.object({
  id: z.string(),
  subject: z.string().default(''),
  to: z.array(z.object({ address: z.string() })),
  html: z.string().default(''),
  text: z.string().default(''),
})
export type Mail = z.output<typeof mailSchema>

async function everyMail(): Promise<Mail[]> {
  return z.array(mailSchema).parse(await (await fetch(`${setting('WHEREFORE_TEST_MAIL_URL')}/api/email`)).json())
}

/** Every e-mail to one address, oldest first. */
export async function mailTo(address: string): Promise<Mail[]> {
  return (await everyMail()).filter(mail => mail.to.some(to => to.address === address))
}

/** Waits until `count` e-mails to the address have come. @returns the latest of them */
export async function awaitMail(address: string, count = 1): Promise<Mail> {
  await expect.poll(async () => (await mailTo(address)).length, { message: `e-mails to ${address}`, timeout: 30_000 }).toBeGreaterThanOrEqual(count)
  const latest = (await mailTo(address)).at(-1)
  if (!latest) throw new Error(`no e-mail to ${address}`)
  return latest
}

/** The address behind the one link of an e-mail that fits. @throws Error where there is none */
export function linkIn(mail: Mail, pattern: RegExp): string {
  const links = [...mail.html.matchAll(/href="([^"]+)"/g)].map(match => (match[1] ?? '').replaceAll('&amp;', '&'))
  const found = links.find(link => pattern.test(link))
  if (!found) throw new Error(`no link like ${pattern} in "${mail.subject}"`)
  return found
}
