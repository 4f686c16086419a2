import { createHash, randomBytes } from 'node:crypto'

/** 256 random bits for a link or a cookie, as text that fits in both. */
export function newSecret(): string {
  return randomBytes(32).toString('base64url')
}

/** What the database keeps of such a secret: SHA-256, hex. Enough here, since nobody can guess 256 bits. */
export function hashSecret(secret: string): string {
  return createHash('sha256').update(secret).digest('hex')
}
