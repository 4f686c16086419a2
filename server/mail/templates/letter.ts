import type { NeutralMessage } from '#shared/domain/letter/compose'
import type { Letter } from '#shared/domain/letter/types'
import { frame, heading, link, list, paragraph, plainText, subheading } from './frame'
import type { MailDraft } from './frame'
import { markPart } from './mark'

const openPage = 'Open this explanation on our page'
const askedThere = 'We will ask for your date of birth there.'
const openMessage = 'Open your message'

/** The explanation itself, for a patient who agreed to details by e-mail. */
export function detailedLetter(letter: Letter, href: string): MailDraft {
  const from = `${letter.from}, for ${letter.to}`
  return {
    subject: letter.detailedSubject,
    mjml: frame({
      title: letter.detailedSubject,
      from,
      caution: letter.caution,
      parts: [
        letter.mark ? markPart(letter.mark) : '',
        heading(letter.title),
        ...letter.opening.map(paragraph),
        ...letter.sections.flatMap(section => [subheading(section.heading), ...section.paragraphs.map(paragraph), list(section.items)]),
        link(openPage, href),
        paragraph(askedThere),
      ],
    }),
    text: plainText([
      from,
      letter.title.toUpperCase(),
      ...letter.opening,
      ...letter.sections.flatMap(section => [
        section.heading.toUpperCase(), ...section.paragraphs, section.items.map(item => `- ${item}`).join('\n'),
      ]),
      `${openPage}:\n${href}`,
      askedThere,
      letter.caution,
    ]),
  }
}

/** Says only that there is a message: no name, no exam, no reason. */
export function neutralLetter(message: NeutralMessage, department: string, href: string): MailDraft {
  return {
    subject: message.subject,
    mjml: frame({
      title: message.subject,
      from: department,
      caution: message.caution,
      parts: [heading(message.subject), ...message.paragraphs.map(paragraph), link(openMessage, href)],
    }),
    text: plainText([message.subject.toUpperCase(), ...message.paragraphs, `${openMessage}:\n${href}`, message.caution]),
  }
}
