import { describe, expect, it } from 'vitest'
import { readConfig } from '#server/utils/config'

/** As the framework hands it over: numbers where the environment held digits. */
const raw = {
  databaseUrl: 'postgres://app@127.0.0.1/wherefore', ownerDatabaseUrl: '', workerDatabaseUrl: 'postgres://worker@127.0.0.1/wherefore', migrationsDir: '',
  authSecret: 'q7Zt0bX2mN5vK9cR4wL8sJ1hG6dF3aPq', origin: 'https://wherefore.example.org', demo: '', trustedProxies: 1, ehr: {},
  smtp: { host: 'mail.example.org', port: 587, user: 1234, password: 100000, tls: 'required', from: 'imaging@example.org' }, logLevel: 'info',
}

describe('settings from the environment', () => {
  it('keep a mail password of digits, and one that reads like a number, as it was written', () => {
    const config = readConfig(raw, { NUXT_SMTP_USER: '1234', NUXT_SMTP_PASSWORD: '1e5' })
    expect(config.smtp).toMatchObject({ user: '1234', password: '1e5', port: 587 })
    expect(config.trustedProxies).toBe(1)
  })

  it('keep a mail password that reads like a truth or a list', () => {
    const smtp = { ...raw.smtp, user: 'imaging' }
    expect(readConfig({ ...raw, smtp: { ...smtp, password: true } }, { NUXT_SMTP_PASSWORD: 'true' }).smtp.password).toBe('true')
    expect(readConfig({ ...raw, smtp: { ...smtp, password: ['x'] } }, { NUXT_SMTP_PASSWORD: '["x"]' }).smtp.password).toBe('["x"]')
  })

  it('that are missing or wrong are named, and their values never repeated', () => {
    const start = () => readConfig({ ...raw, authSecret: 'short-secret', smtp: { ...raw.smtp, port: 0, user: '', password: '' } }, {})
    expect(start).toThrow(/NUXT_AUTH_SECRET.*NUXT_SMTP_PORT/)
    expect(start).not.toThrow(/short-secret/)
  })
})
