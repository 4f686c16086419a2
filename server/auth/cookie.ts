/** Seconds a session may last in all, however busy. */
export const absoluteSeconds = 12 * 60 * 60
/** Minutes without a person's doing after which a session ends. */
export const idleMinutes = 15

/** Name and attributes of the session cookie. `__Host-` binds it to this very host, and needs TLS. */
export function sessionCookie(origin: string) {
  const secure = origin.startsWith('https://')
  return {
    name: secure ? '__Host-wherefore-session' : 'wherefore-session',
    options: { httpOnly: true, sameSite: 'lax', path: '/', secure },
  } as const
}
