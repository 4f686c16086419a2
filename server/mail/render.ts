import mjml2html from 'mjml'
import type { MailDraft } from './templates/frame'

export interface RenderedMail { subject: string, html: string, text: string }

/**
 * Turns a draft into what is sent. Nothing is fetched by whoever reads it: no fonts, no images.
 *
 * @throws Error where a template is not MJML.
 */
export async function renderMail({ subject, mjml, text }: MailDraft): Promise<RenderedMail> {
  // Without `fonts: {}` the page would link an outside font host.
  const { html } = await mjml2html(mjml, { fonts: {}, ignoreIncludes: true, keepComments: false, validationLevel: 'strict' })
  return { subject, html, text }
}
