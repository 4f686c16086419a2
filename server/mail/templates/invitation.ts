import { frame, heading, link, paragraph, plainText } from './frame'
import type { MailDraft } from './frame'

export interface InvitationMail {
  name: string
  department: string
  phone: string
  href: string
  /** The account had a password already: this sets a new one. */
  again: boolean
  /** How long the link works, in words: "3 days", "30 minutes". */
  validFor: string
}

/** Brings a colleague the link with which they choose their password. */
export function invitationMail({ name, department, phone, href, again, validFor }: InvitationMail): MailDraft {
  const title = again ? 'Choose a new password for Wherefore' : 'Your account for Wherefore'
  const words = again ? 'Choose a new password' : 'Choose your password'
  const lines = [
    `Hello ${name},`,
    again
      ? `an administrator of ${department} made a link for you to choose a new password.`
      : `${department} uses Wherefore to settle which MRI exams need contrast. An account was made for you.`,
    `The link works once, for ${validFor}.`,
  ]
  const caution = `If you did not expect this, do not open the link and call ${department} at ${phone}.`
  return {
    subject: `${title} (${department})`,
    mjml: frame({ title, from: department, caution, parts: [heading(title), ...lines.map(paragraph), link(words, href)] }),
    text: plainText([title.toUpperCase(), ...lines, `${words}:\n${href}`, caution]),
  }
}
