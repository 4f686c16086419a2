import { migrate } from '#server/database/migrate.mjs'
import { useApp } from '#server/utils/app'
import { readConfig } from '#server/utils/config'
import { log } from '#server/utils/log'
import { assertDurable, beginStart, databaseLevel } from '#server/utils/readiness'
import { assertDemoStaysHome, assertSecretIsRandom } from '#server/utils/start-checks'

// Both sign-in libraries read their own variable for what NUXT_ORIGIN says already, one of them before any plugin runs.
if (process.env.NUXT_ORIGIN) {
  process.env.AUTH_ORIGIN = `${process.env.NUXT_ORIGIN}/api/auth`
  process.env.NEXTAUTH_URL = process.env.AUTH_ORIGIN
}

/**
 * Brings the server up: settings first, then the database. Nitro does not wait for plugins, so calls wait here instead; a
 * server that cannot start says why and ends, rather than answer half.
 */
export default defineNitroPlugin((nitroApp) => {
  const config = readConfig(useRuntimeConfig())
  assertSecretIsRandom(config.authSecret)
  if (config.demo) assertDemoStaysHome(config.origin, process.env.NITRO_HOST ?? process.env.HOST)

  const ready = beginStart(async () => {
    if (config.ownerDatabaseUrl) {
      await migrate({ ownerUrl: config.ownerDatabaseUrl, workerUrl: config.workerDatabaseUrl, dir: config.migrationsDir })
    }
    const { pool } = useApp()
    await assertDurable(pool)
    const level = await databaseLevel(pool)
    if (level.applied < level.needed) {
      throw new Error(`Wherefore cannot start. The database has ${level.applied} of ${level.needed} migrations, and NUXT_OWNER_DATABASE_URL is not set to add them.`)
    }
    log.info({ migrations: level.applied, demo: config.demo }, 'ready')
  })
  ready.catch((error: unknown) => {
    log.fatal({ err: error instanceof Error ? error.message : 'unknown' }, 'cannot start')
    process.exit(1)
  })

  nitroApp.hooks.hook('request', async (event) => {
    // Whoever watches the process must get an answer while it starts.
    if (event.path !== '/healthz') await ready
  })
  nitroApp.hooks.hook('close', async () => {
    await useApp().pool.end()
  })
})
