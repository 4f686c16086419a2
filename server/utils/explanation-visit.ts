import { getCookie, setCookie } from 'h3'
import type { H3Event } from 'h3'
import { visitMinutes } from '#server/services/explanation/open-explanation'
import { useApp } from './app'

/** The page that shows the explanation, and the call that fills it; a cookie can be bound to one path only. */
const paths = ['/explanation', '/api/explanations']

function cookieName(): string {
  return isSecure() ? '__Secure-wherefore-explanation' : 'wherefore-explanation'
}

function isSecure(): boolean {
  return useApp().config.origin.startsWith('https://')
}

/** Gives the browser the right to show one explanation for a short time. */
export function sendVisit(event: H3Event, visit: string): void {
  for (const path of paths) setCookie(event, cookieName(), visit, { httpOnly: true, sameSite: 'lax', secure: isSecure(), path, maxAge: visitMinutes * 60 })
}

export function readVisit(event: H3Event): string | null {
  return getCookie(event, cookieName()) ?? null
}
