import type { Server } from 'node:http'
import { exportJWK, generateKeyPair } from 'jose'
import { z } from 'zod'
import { createFake, listen } from '../../fhir-fixtures/server.mjs'
import { parseEhrSettings, type EhrLimits, type EhrSettings } from '#server/ehr/settings'

const logSchema = z.array(z.object({ method: z.string(), url: z.string(), body: z.string(), headers: z.record(z.string(), z.unknown()), at: z.number() }))
export type LoggedRequest = z.output<typeof logSchema>[number]

export interface FhirFake {
  baseUrl: string
  /** Settings of the product's client for this server. */
  settings: (limits?: Partial<EhrLimits>, raw?: Record<string, unknown>) => EhrSettings
  /** Environment of `ehr:read` for this server. */
  env: Record<string, string>
  /** Posts to the control address: faults, quirks, resources. */
  control: (body: Record<string, unknown>) => Promise<void>
  reset: () => Promise<void>
  log: () => Promise<LoggedRequest[]>
  stop: () => Promise<void>
}

export interface FhirFakeOptions {
  auth?: 'none' | 'backend-services'
  algorithm?: 'RS384' | 'ES384'
  /** Moment that the fixtures' dates are moved to. */
  now?: number
  pageCap?: number
  tokenLifeSeconds?: number
}

/** Starts the fake hospital record on a free port of this process. */
export async function startFhirFake(options: FhirFakeOptions = {}): Promise<FhirFake> {
  const { auth = 'none', algorithm = 'ES384' } = options
  const { publicKey, privateKey } = await generateKeyPair(algorithm, { extractable: true })
  const kid = 'test-key'
  const clientId = 'wherefore-test'
  const guarded = auth === 'backend-services'
  const publicJwk = { ...await exportJWK(publicKey), kid, alg: algorithm }
  const privateJwk = JSON.stringify({ ...await exportJWK(privateKey), kid })
  const server: Server = createFake({
    now: options.now, pageCap: options.pageCap,
    client: guarded ? { clientId, jwks: { keys: [publicJwk] }, lifeSeconds: options.tokenLifeSeconds } : undefined,
  })
  const baseUrl = `http://127.0.0.1:${await listen(server, 0)}`
  const post = async (body: Record<string, unknown>) => {
    const answer = await fetch(`${baseUrl}/__control`, { method: 'POST', body: JSON.stringify(body) })
    if (!answer.ok) throw new Error(await answer.text())
  }
  const raw = guarded ? { baseUrl, auth, clientId, privateJwk } : { baseUrl, auth }
  return {
    baseUrl,
    settings(limits, more = {}) {
      const settings = parseEhrSettings({ ...raw, ...more }, limits)
      if (!settings) throw new Error('No base URL')
      return settings
    },
    env: {
      NUXT_EHR_BASE_URL: baseUrl,
      NUXT_EHR_AUTH: auth,
      ...(guarded ? { NUXT_EHR_CLIENT_ID: clientId, NUXT_EHR_PRIVATE_JWK: privateJwk } : {}),
    },
    control: post,
    reset: () => post({ reset: true }),
    log: async () => logSchema.parse(await (await fetch(`${baseUrl}/__control/log`)).json()),
    stop: () => new Promise((resolve) => {
      server.close(() => resolve())
      server.closeAllConnections()
    }),
  }
}
