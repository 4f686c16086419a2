import { z } from 'zod'

/** Without a kind: the letter that the request's state calls for. */
export const letterPreviewQuery = z.strictObject({ kind: z.enum(['before', 'after'], { error: 'Choose the letter before or after the exam.' }).optional() })

/** Writes that the address alone describes. */
export const noBodySchema = z.strictObject({})

/** Any text may stand in a link; one that never was a token is answered like one that no longer is. */
export const linkParams = z.strictObject({ token: z.string() })

const digits = (least: number, most: number) => z.string().trim().regex(new RegExp(`^\\d{${least},${most}}$`))

/**
 * The birth date as a plain HTML form sends it, whole or in three fields; an instant of that form is never read as a date.
 * Unknown fields, such as the name of a pressed button, are passed over.
 */
export const birthDateFormSchema = z.union([
  z.object({ birthDate: z.string().trim().pipe(z.iso.date()) }),
  z.object({ year: digits(4, 4), month: digits(1, 2), day: digits(1, 2) })
    .transform(({ year, month, day }) => ({ birthDate: `${year}-${month.padStart(2, '0')}-${day.padStart(2, '0')}` }))
    .pipe(z.object({ birthDate: z.iso.date() })),
])
