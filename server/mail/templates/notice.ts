import { frame, heading, link, paragraph, plainText } from './frame'
import type { MailDraft } from './frame'

/** What a clinician is written to about. */
export const noticeWords = {
  query: { title: 'Imaging has a question about your request', line: 'A radiologist needs to know something before this request can go on.' },
  answer: { title: 'Imaging answered your question', line: 'There is an answer in the thread of this request.' },
  decision: { title: 'There is news on your request', line: 'What was decided, and why, is with the request.' },
  reopened: { title: 'Your request was reopened', line: 'Something changed after it was approved. A radiologist looks at it again.' },
} as const satisfies Record<string, { title: string, line: string }>

export type NoticeEvent = keyof typeof noticeWords

/** Tells a clinician to look at a request. It names the request alone: no patient, no exam. */
export function noticeMail({ event, reference, department, phone, href }: {
  event: NoticeEvent
  reference: string
  department: string
  phone: string
  href: string
}): MailDraft {
  const { title, line } = noticeWords[event]
  const words = `Open request ${reference}`
  const caution = `This message was written by Wherefore for ${department}. Questions: ${phone}.`
  return {
    subject: `${reference}: ${title}`,
    mjml: frame({ title, from: department, caution, parts: [heading(title), paragraph(`Request ${reference}. ${line}`), link(words, href)] }),
    text: plainText([title.toUpperCase(), `Request ${reference}. ${line}`, `${words}:\n${href}`, caution]),
  }
}
