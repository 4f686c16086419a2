import type { IncomingMessage } from 'node:http'

/** Bytes of a body that is read at all. */
export const maxBodyBytes = 256 * 1024

/**
 * Reads a body and stops as soon as it is too large, so that a huge one never fills the memory.
 *
 * @returns the body, or null where it was too large.
 */
export function readLimitedBody(request: IncomingMessage, limit: number = maxBodyBytes): Promise<Buffer | null> {
  if (Number(request.headers['content-length'] ?? 0) > limit) return Promise.resolve(null)
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = []
    let size = 0
    request.on('data', (chunk: Buffer) => {
      size += chunk.length
      if (size > limit) {
        request.pause()
        request.removeAllListeners('data')
        resolve(null)
      }
      else {
        chunks.push(chunk)
      }
    })
    request.once('end', () => resolve(Buffer.concat(chunks)))
    request.once('error', reject)
    request.once('aborted', () => reject(new Error('The body was cut off.')))
  })
}
