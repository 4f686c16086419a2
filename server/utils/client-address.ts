import type { H3Event } from 'h3'

/**
 * The visitor's network address. X-Forwarded-For is believed only as far as our own proxies wrote it: each appends the address
 * it was called from, so the n-th entry from the right is the visitor with n proxies in front.
 */
export function clientAddress(event: H3Event, trustedProxies: number): string {
  const socket = event.node.req.socket?.remoteAddress ?? 'unknown'
  if (trustedProxies === 0) return plain(socket)
  const forwarded = String(event.node.req.headers['x-forwarded-for'] ?? '').split(',').map(part => part.trim()).filter(Boolean)
  return plain(forwarded.at(-trustedProxies) ?? socket)
}

/** IPv4 in its IPv6 dress is the same visitor. Length-bound, since it becomes part of a key. */
function plain(address: string): string {
  return address.replace(/^::ffff:/, '').slice(0, 64)
}
