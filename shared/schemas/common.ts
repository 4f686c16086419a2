import { z } from 'zod'

/** Free text as typed: trimmed, never empty, bounded. */
export const requiredText = (max: number, empty: string) => z.string().trim().min(1, empty).max(max, `At most ${max} characters.`)
export const optionalText = (max: number) => z.string().trim().max(max, `At most ${max} characters.`)

export const idParams = z.strictObject({ id: z.uuid() })

/** Keyset paging: an opaque mark of where the last page ended. */
export const pageQuery = z.object({ after: z.string().max(400).optional(), limit: z.coerce.number().int().min(1).max(100).default(50) })

export const instant = z.iso.datetime({ offset: true, error: 'Give a date and time.' })

/** One mail address, plain ASCII: quoting and homoglyphs could send a letter to somebody else. */
export const mailAddress = z.string().trim().max(254).regex(/^[A-Za-z0-9.!#$%&'*+/=?^_`{|}~-]+@[A-Za-z0-9](?:[A-Za-z0-9.-]*[A-Za-z0-9])?\.[A-Za-z]{2,}$/, 'Give one e-mail address, like name@example.org.')
