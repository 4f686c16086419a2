const loopback = new Set(['127.0.0.1', 'localhost', '::1', '[::1]'])

/**
 * Demo accounts share one published pass phrase, so they may exist only where nobody else can reach the server.
 *
 * @param listensOn the HOST setting; empty means every address of the machine.
 * @throws Error saying which setting stands in the way.
 */
export function assertDemoStaysHome(origin: string, listensOn: string | undefined): void {
  if (!loopback.has(new URL(origin).hostname)) throw new Error('Wherefore cannot start. NUXT_DEMO is on, but NUXT_ORIGIN is not a loopback address.')
  if (!listensOn || !loopback.has(listensOn)) throw new Error('Wherefore cannot start. NUXT_DEMO is on, but HOST is not a loopback address.')
}

/** A secret that somebody typed or copied out of a manual protects nothing. @throws Error */
export function assertSecretIsRandom(secret: string): void {
  if (new Set(secret).size < 12 || /secret|change|default|example|password/i.test(secret)) {
    throw new Error('Wherefore cannot start. NUXT_AUTH_SECRET does not look random; make one with: openssl rand -base64 48')
  }
}
