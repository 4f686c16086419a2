import type { z } from 'zod'
import { BadRequest } from './errors'

/** A page's end as an opaque mark: the sort values of its last row. */
export function encodeCursor(parts: readonly (string | number | null)[]): string {
  return Buffer.from(JSON.stringify(parts)).toString('base64url')
}

/** @throws BadRequest for a mark this server did not make. */
export function decodeCursor<Schema extends z.ZodType>(text: string, schema: Schema): z.output<Schema> {
  try {
    return schema.parse(JSON.parse(Buffer.from(text, 'base64url').toString('utf8')))
  }
  catch {
    throw new BadRequest('The page mark is not one of ours.')
  }
}

/** Escapes LIKE wildcards, so that searching "%" finds a percent sign. */
export function likePrefix(text: string): string {
  return text.replace(/[\\%_]/g, match => `\\${match}`)
}
