import { describe, expect, it } from 'vitest'
import { composeLetter, composeNeutral } from '#shared/domain/letter/compose'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { escapeHtml, oneLine } from '#server/mail/escape'
import { renderMail } from '#server/mail/render'
import { invitationMail } from '#server/mail/templates/invitation'
import { detailedLetter, neutralLetter } from '#server/mail/templates/letter'
import { noticeMail, noticeWords } from '#server/mail/templates/notice'
import type { NoticeEvent } from '#server/mail/templates/notice'
import { bodyOf, common, linesOf, slot } from '../../shared/domain/letter/letter-inputs'

const href = 'https://imaging.example.org/explanation/Zm9vYmFyYmF6cXV4cXV1eGNvcmdlZ3JhdWx0Z2Fy'
const letter = composeLetter({ ...common('iv-with-and-without'), kind: 'before', slot })

/** What a mail program shows of a page. */
function shown(html: string): string {
  return html.replace(/<head>[\s\S]*?<\/head>/, '').replace(/<!--[\s\S]*?-->/g, '').replace(/<[^>]+>/g, ' ')
    .replaceAll('&quot;', '"').replaceAll('&#39;', '\'').replaceAll('&lt;', '<').replaceAll('&gt;', '>').replaceAll('&amp;', '&')
    .replace(/\s+/g, ' ')
}

const hostile = [
  '<img src=x onerror=alert(1)>', '</mj-text><mj-include path="/etc/passwd" />', '"><script>alert(1)</script>', '<!-- O\'Brien & Sons -->', '{{name}} ]]>',
]

describe('the e-mail to a patient who agreed to details', () => {
  it('holds every line of the explanation in both parts', async () => {
    const mail = await renderMail(detailedLetter(letter, href))
    const text = mail.text.replace(/\s+/g, ' ').toLowerCase()
    for (const line of linesOf(letter)) {
      expect(shown(mail.html)).toContain(line)
      expect(text).toContain(line.replace(/\s+/g, ' ').toLowerCase())
    }
  })

  it('says in words where its link goes, and gives the address to those who cannot press it', async () => {
    const mail = await renderMail(detailedLetter(letter, href))
    expect(mail.html).toMatch(new RegExp(`<a[^>]+href="${href}"[^>]*>\\s*Open this explanation on our page\\s*</a>`))
    expect(shown(mail.html)).toContain(href)
    expect(mail.text).toContain(href)
  })

  it('has a language, a title, one main heading, and layout tables that are not read out as tables', async () => {
    const { html } = await renderMail(detailedLetter(letter, href))
    expect(html).toMatch(/<html[^>]* lang="en"/)
    expect(html).toContain(`<title>${escapeHtml(letter.detailedSubject)}</title>`)
    expect(html.match(/<h1/g)).toHaveLength(1)
    for (const [table] of html.matchAll(/<table[^>]*>/g)) expect(table).toContain('role="presentation"')
  })

  it('fetches nothing from anywhere: no images, no fonts, no style sheets', async () => {
    const { html } = await renderMail(detailedLetter(letter, href))
    expect(html).not.toMatch(/<img|<link|@import|url\(|<script|<iframe/i)
    const addresses = [...html.matchAll(/https?:\/\/[^"'\s<)]+/g)].map(([address]) => address)
    expect(addresses.filter(address => address !== href && !address.startsWith('http://www.w3.org/'))).toEqual([])
  })

  it('is never smaller than 16 pixels where it is read', async () => {
    const { html } = await renderMail(detailedLetter(letter, href))
    const sizes = [...html.matchAll(/font-size:\s*(\d+)px/g)].map(match => Number(match[1])).filter(size => size > 0)
    expect(sizes.length).toBeGreaterThan(5)
    expect(Math.min(...sizes)).toBeGreaterThanOrEqual(16)
  })

  it.each(hostile)('shows a name as written and never as markup: %s', async (name) => {
    const written = composeLetter({ ...common('iv-with-and-without'), kind: 'before', slot, patient: { fullName: name, birthDate: '1965-03-14', sex: 'female' } })
    const mail = await renderMail(detailedLetter(written, href))
    expect(shown(mail.html)).toContain(name.replace(/\s+/g, ' '))
    expect(mail.html).toContain(escapeHtml(name))
    expect(mail.html).not.toContain(name)
    expect(mail.text).toContain(name)
  })

  it('has no mark where no exam takes place', async () => {
    const off = composeLetter({ ...common('iv-with-and-without'), kind: 'changed', change: 'called-off' })
    expect((await renderMail(detailedLetter(off, href))).html).not.toContain('border-radius:50%')
    expect((await renderMail(detailedLetter(letter, href))).html).toContain('border-radius:50%')
  })
})

describe('the neutral e-mail', () => {
  it('names neither patient nor exam nor reason, in subject, page or text', async () => {
    const mail = await renderMail(neutralLetter(composeNeutral(starterPolicy), starterPolicy.department.name, href))
    for (const part of [mail.subject, mail.html, mail.text]) expect(part).not.toMatch(/Marta|Lindqvist|brain|contrast|scan|seizure|gadolinium|kidney|MRI/i)
    expect(mail.text).toContain(href)
    expect(mail.text).toContain(starterPolicy.department.phone)
  })

  it('carries the caution like every letter', async () => {
    const neutral = composeNeutral(starterPolicy)
    const mail = await renderMail(neutralLetter(neutral, starterPolicy.department.name, href))
    expect(mail.text).toContain(neutral.caution)
    expect(shown(mail.html)).toContain(neutral.caution)
    expect(bodyOf(letter)).toContain(neutral.caution)
  })
})

describe('e-mail to colleagues', () => {
  const department = { department: 'Northshore Imaging', phone: '555 0142' }

  it.each(Object.keys(noticeWords) as NoticeEvent[])('names the request alone: %s', async (event) => {
    const mail = await renderMail(noticeMail({ event, reference: 'WF-26-004318', href: 'https://imaging.example.org/requests/WF-26-004318', ...department }))
    expect(mail.subject).toContain('WF-26-004318')
    expect(mail.text).toContain('https://imaging.example.org/requests/WF-26-004318')
    expect(mail.html).not.toMatch(/contrast|brain|Lindqvist/i)
  })

  it('shows the name of an invited person as written', async () => {
    const mail = await renderMail(invitationMail({ name: '<b>Robin</b>', href, again: false, validFor: '3 days', ...department }))
    expect(mail.html).toContain('&lt;b&gt;Robin&lt;/b&gt;')
    expect(mail.html).not.toContain('<b>Robin</b>')
    expect(mail.text).toContain('once, for 3 days')
  })
})

describe('header text', () => {
  it('stays on one line, so that no name begins another header', () => {
    expect(oneLine('A message\r\nBcc: someone@example.org')).toBe('A message Bcc: someone@example.org')
    expect(oneLine('a\u0000b\u2028c')).toBe('a b c')
  })
})
