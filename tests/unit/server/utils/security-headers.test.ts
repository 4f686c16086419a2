import { describe, expect, it } from 'vitest'
import { pagePolicy, stampNonce, standingHeaders } from '#server/utils/security-headers'

describe('the nonce', () => {
  it('is put on every script, style and link that the framework wrote', () => {
    const head = '<meta charset="utf-8"><link rel="modulepreload" href="/a.js"><script type="module" src="/a.js"></script><style>p{}</style>'
    expect(stampNonce(head, 'N')).toBe('<meta charset="utf-8"><link nonce="N" rel="modulepreload" href="/a.js"><script nonce="N" type="module" src="/a.js"></script><style nonce="N">p{}</style>')
  })

  it('leaves other tags and their lookalikes alone', () => {
    const text = '<scripture>x</scripture><p title="<">y</p><linked></linked>'
    expect(stampNonce(text, 'N')).toBe(text)
  })

  it('is not put on twice', () => {
    expect(stampNonce(stampNonce('<script>1</script>', 'N'), 'M')).toBe('<script nonce="N">1</script>')
  })
})

describe('the policy of a page', () => {
  it('runs no script without the nonce and evaluates none', () => {
    const script = pagePolicy('N', false).split('; ').find(part => part.startsWith('script-src '))
    expect(script).toBe('script-src \'nonce-N\' \'strict-dynamic\'')
  })

  it.each(['object-src \'none\'', 'base-uri \'none\'', 'frame-ancestors \'none\'', 'form-action \'self\'', 'connect-src \'self\''])('holds %s', (part) => {
    expect(pagePolicy('N', false).split('; ')).toContain(part)
  })
})

describe('standing headers', () => {
  it('ask for TLS only where the public address has it', () => {
    expect(standingHeaders('https://wherefore.example.org')['strict-transport-security']).toBe('max-age=31536000; includeSubDomains')
    expect(standingHeaders('http://127.0.0.1:3900')).not.toHaveProperty('strict-transport-security')
  })
})
