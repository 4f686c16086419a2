import { escapeHtml } from '../escape'

/** A message before MJML turns it into a page that mail programs understand. */
export interface MailDraft { subject: string, mjml: string, text: string }

const ink = '#16202a'
const ink2 = '#3b4954'
const ink3 = '#5c6a75'
const tide = '#0c4f5b'
const flare = '#e39a1c'

/** A column of text beside the frame's bar. `parts` are MJML elements; whatever came from a person is escaped in them already. */
export function frame({ title, from, parts, caution }: { title: string, from: string, parts: string[], caution: string }): string {
  return `<mjml lang="en" dir="ltr">
  <mj-head>
    <mj-title>${escapeHtml(title)}</mj-title>
    <mj-attributes>
      <mj-all font-family="'Public Sans', Arial, Helvetica, sans-serif" color="${ink}" />
      <mj-text font-size="18px" line-height="28px" padding="0 24px 16px" />
      <mj-section padding="0" background-color="#ffffff" />
    </mj-attributes>
    <mj-raw><meta name="color-scheme" content="light"></mj-raw>
  </mj-head>
  <mj-body background-color="#ffffff" width="600px">
    <mj-section>
      <mj-group>
        <mj-column width="62%" background-color="${ink}" padding="0"><mj-spacer height="8px" /></mj-column>
        <mj-column width="38%" background-color="${flare}" padding="0"><mj-spacer height="8px" /></mj-column>
      </mj-group>
    </mj-section>
    <mj-section padding="32px 0 0">
      <mj-column>
        <mj-text font-size="16px" line-height="24px" color="${ink3}">${escapeHtml(from)}</mj-text>
        ${parts.join('\n        ')}
        <mj-text font-size="16px" line-height="24px" color="${ink3}" padding="16px 24px 32px">${escapeHtml(caution)}</mj-text>
      </mj-column>
    </mj-section>
  </mj-body>
</mjml>`
}

export function heading(text: string): string {
  return `<mj-text font-size="28px" line-height="36px" font-weight="700"><h1 style="margin:0;font-size:28px;line-height:36px;font-weight:700">${escapeHtml(text)}</h1></mj-text>`
}

export function subheading(text: string): string {
  return `<mj-text padding="16px 24px 8px"><h2 style="margin:0;font-size:20px;line-height:28px;font-weight:700">${escapeHtml(text)}</h2></mj-text>`
}

export function paragraph(text: string): string {
  return `<mj-text>${escapeHtml(text)}</mj-text>`
}

export function list(items: readonly string[]): string {
  if (items.length === 0) return ''
  return `<mj-text><ul style="margin:0;padding:0 0 0 24px">${items.map(item => `<li style="margin:0 0 8px">${escapeHtml(item)}</li>`).join('')}</ul></mj-text>`
}

/** A link whose words say where it goes; the address stands below it for those whose program shows no links. */
export function link(words: string, href: string): string {
  const address = escapeHtml(href)
  return `<mj-button href="${address}" background-color="${tide}" color="#ffffff" font-size="18px" line-height="28px" font-weight="600" border-radius="6px" inner-padding="12px 20px" align="left" padding="8px 24px 16px">${escapeHtml(words)}</mj-button>
        <mj-text font-size="16px" line-height="24px" color="${ink2}">If the button does not work, copy this address into your browser:<br /><span style="word-break:break-all">${address}</span></mj-text>`
}

/** The text part: blank lines between paragraphs, and no line left over. */
export function plainText(blocks: readonly (string | null)[]): string {
  return `${blocks.filter(block => block !== null && block !== '').join('\n\n')}\n`
}
