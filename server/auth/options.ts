import type { AuthOptions } from 'next-auth'
import * as credentialsModule from 'next-auth/providers/credentials'
import { z } from 'zod'
import { beginSession } from '#server/services/session/begin-session'
import { endSession } from '#server/services/session/end-session'
import { findSession } from '#server/services/session/find-session'
import { Unavailable } from '#server/services/errors'
import { useApp } from '#server/utils/app'
import { describeError, log } from '#server/utils/log'
import { currentAuthCall } from './attempt'
import { absoluteSeconds, sessionCookie } from './cookie'
import { hashSecret } from './secrets'
import { nobodyContext } from './system-context'
import { createSignInThrottle } from './throttle'

type Credentials = typeof import('next-auth/providers/credentials').default

/** next-auth is CommonJS: depending on who loads it, the function is the module's default or its default's default. */
function credentialsProvider(): Credentials {
  const found: unknown = credentialsModule.default
  if (typeof found === 'function') return credentialsModule.default
  return (found as { default: Credentials }).default
}

const credentialsSchema = z.object({ email: z.string().min(3).max(254), password: z.string().min(1).max(1_000) })
const tokenSchema = z.object({ sid: z.string() })
const signedInSchema = z.object({ secret: z.string() })

/** How next-auth works here: it carries the cookie and its own forgery guard; the session row decides. */
export function authOptions(): AuthOptions {
  const { config, db, pool } = useApp()
  const throttle = createSignInThrottle(pool)

  return {
    secret: config.authSecret,
    session: { strategy: 'jwt', maxAge: absoluteSeconds },
    cookies: { sessionToken: sessionCookie(config.origin) },
    pages: { signIn: '/sign-in', signOut: '/sign-in', error: '/sign-in' },
    providers: [credentialsProvider()({
      name: 'E-mail and password',
      credentials: { email: {}, password: {} },
      async authorize(given) {
        const parsed = credentialsSchema.safeParse(given)
        if (!parsed.success) return null
        const call = currentAuthCall()
        try {
          const begun = await beginSession({
            ctx: nobodyContext(call.requestId),
            input: { ...parsed.data, address: call.address, demo: config.demo, throttle },
          })
          return begun && { id: begun.userId, secret: begun.secret }
        }
        catch (error) {
          if (!(error instanceof Unavailable)) log.error({ requestId: call.requestId, error: describeError(error) }, 'sign-in failed')
          call.busy = true
          throw new Error('Busy')
        }
      },
    })],
    callbacks: {
      /** The cookie holds the session's random id and nothing about the person. */
      async jwt({ token, user }) {
        const signedIn = signedInSchema.safeParse(user)
        if (signedIn.success) return { sid: signedIn.data.secret }
        const { sid } = tokenSchema.parse(token)
        // Throwing makes next-auth clear the cookie.
        if (!await findSession(db, hashSecret(sid))) throw new Error('The session has ended.')
        return { sid }
      },
      session: ({ session }) => ({ expires: session.expires, user: {} }),
      /** Where to go next is the sign-in page's own business, so no address from outside is ever kept or followed. */
      redirect: () => `${config.origin}/`,
    },
    events: {
      async signOut({ token }) {
        const parsed = tokenSchema.safeParse(token)
        if (parsed.success) await endSession({ ctx: nobodyContext(currentAuthCall().requestId), input: { secret: parsed.data.sid } })
      },
    },
    logger: {
      error: code => code === 'JWT_SESSION_ERROR' ? undefined : log.warn({ code, requestId: currentAuthCall().requestId }, 'sign-in library'),
      warn: () => undefined,
      debug: () => undefined,
    },
  }
}
