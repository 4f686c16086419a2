import { z } from 'zod'

/** Without a kind: the letter that the request's state calls for. */
export const letterPreviewQuery = z.strictObject({ kind: z.enum(['before', 'after'], { error: 'Choose the letter before or after the exam.' }).optional() })

/** Writes that the address alone describes. */
export const noBodySchema = z.strictObject({})

/** Any text may stand in a link; one that never was a token is answered like one that no longer is. */
export const linkParams = z.strictObject({ token: z.string() })
