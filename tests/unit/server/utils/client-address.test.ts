import { createEvent } from 'h3'
import { IncomingMessage, ServerResponse } from 'node:http'
import { Socket } from 'node:net'
import { describe, expect, it } from 'vitest'
import { clientAddress } from '#server/utils/client-address'

function from(socketAddress: string, forwarded?: string) {
  const socket = new Socket()
  Object.defineProperty(socket, 'remoteAddress', { value: socketAddress })
  const request = new IncomingMessage(socket)
  if (forwarded) request.headers['x-forwarded-for'] = forwarded
  return createEvent(request, new ServerResponse(request))
}

describe('the visitor\'s address', () => {
  it('is the caller\'s own without a proxy, whatever the caller claims', () => {
    expect(clientAddress(from('203.0.113.9', '198.51.100.1'), 0)).toBe('203.0.113.9')
  })

  it('is what our own proxy wrote, not what the visitor put before it', () => {
    expect(clientAddress(from('10.0.0.1', '198.51.100.1, 203.0.113.9'), 1)).toBe('203.0.113.9')
    expect(clientAddress(from('10.0.0.1', 'spoofed, 203.0.113.9, 10.0.0.2'), 2)).toBe('203.0.113.9')
  })

  it('is the proxy\'s where it wrote nothing', () => {
    expect(clientAddress(from('10.0.0.1'), 1)).toBe('10.0.0.1')
  })

  it('is the same in IPv4 and in its IPv6 dress', () => {
    expect(clientAddress(from('::ffff:203.0.113.9'), 0)).toBe('203.0.113.9')
  })
})
