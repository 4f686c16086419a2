import { openDatabase } from '#server/database/client'
import type { DatabaseHandle } from '#server/database/client'
import { createEhrClient } from '#server/ehr/client'
import type { EhrClient } from '#server/ehr/client'
import { parseEhrSettings } from '#server/ehr/settings'
import { registerPool } from '#server/services/transaction'
import { readConfig } from './config'
import type { ServerConfig } from './config'
import { log } from './log'

/** What one server process holds: configuration, connections, clients. Correctness never rests on its memory. */
export interface App extends DatabaseHandle {
  config: ServerConfig
  /** Null where no hospital record is connected. */
  ehr: EhrClient | null
}

let app: App | undefined

/** The process's one set of connections, made at first use. */
export function useApp(): App {
  app ??= createApp()
  return app
}

function createApp(): App {
  const config = readConfig(useRuntimeConfig())
  const handle = openDatabase(config.databaseUrl, error => log.error({ err: error.message }, 'database connection lost'))
  registerPool(handle.db, handle.pool)
  const ehrSettings = parseEhrSettings(config.ehr)
  return { ...handle, config, ehr: ehrSettings ? createEhrClient(ehrSettings) : null }
}
