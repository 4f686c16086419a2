import { getHeader, parseCookies } from 'h3'
import type { H3Event } from 'h3'
import { getToken } from 'next-auth/jwt'
import { z } from 'zod'
import type { Actor } from '#shared/domain/access/roles'
import { findSession, touchSession } from '#server/services/session/find-session'
import { useApp } from '#server/utils/app'
import { sessionCookie } from './cookie'
import { hashSecret } from './secrets'

/** Polling sets it, so that an open but abandoned screen still signs itself out. */
const backgroundHeader = 'x-wherefore-background'

const tokenSchema = z.object({ sid: z.string().min(1) })

declare module 'h3' {
  interface H3EventContext {
    requestId: string
    actor?: Promise<Actor | null>
  }
}

/**
 * Who asks, as the database knows them now: the cookie only names the session row. Null where there is none, or it has ended,
 * or the account was disabled since.
 */
export function currentActor(event: H3Event): Promise<Actor | null> {
  event.context.actor ??= readActor(event)
  return event.context.actor
}

async function readActor(event: H3Event): Promise<Actor | null> {
  const { db, config } = useApp()
  const secret = await sessionSecret(event)
  if (secret === null) return null
  const idHash = hashSecret(secret)
  const session = await findSession(db, idHash)
  if (!session || (session.demo && !config.demo)) return null
  if (session.isStale && getHeader(event, backgroundHeader) !== '1') await touchSession(db, idHash)
  return session.actor
}

/** The random id that the encrypted cookie carries. */
async function sessionSecret(event: H3Event): Promise<string | null> {
  const { config } = useApp()
  const token = await getToken({
    // Cookies alone: a bearer header is no way in.
    req: { cookies: parseCookies(event), headers: {} } as Parameters<typeof getToken>[0]['req'],
    secret: config.authSecret,
    cookieName: sessionCookie(config.origin).name,
  })
  const parsed = tokenSchema.safeParse(token)
  return parsed.success ? parsed.data.sid : null
}
