import { roleMay } from '#shared/domain/access/permissions'
import type { Action } from '#shared/domain/access/permissions'
import { roleHome } from '#shared/domain/access/roles'
import { useSessionStore } from '~/stores/session'

/** Pages that nobody signs in for: their link is the key. */
const openToAll = ['/sign-in', '/invitation/', '/explanation/', '/explanation']

/** What a page is for; the longest beginning that fits counts. */
const pageActions: readonly [string, Action][] = [
  ['/requests/new', 'request.create'],
  ['/requests', 'request.list'],
  ['/review', 'review.list'],
  ['/preparation', 'preparation.list'],
  ['/guidance', 'guidance.read'],
  ['/settings/users', 'user.list'],
  ['/settings/practices', 'practice.list'],
  ['/settings/connections', 'connection.read'],
  ['/settings/policy', 'policy.read'],
  ['/audit', 'audit.read'],
]

/** Shows each person the pages of their role. Comfort only: every route of the server decides for itself. */
export default defineNuxtRouteMiddleware(async (to) => {
  const session = useSessionStore()
  const open = openToAll.some(place => place.endsWith('/') ? to.path.startsWith(place) : to.path === place)
  if (open && to.path !== '/sign-in') return
  if (!session.asked) {
    const status = await session.refresh()
    if (status !== 200 && status !== 401) throw createError({ statusCode: 503, statusMessage: 'Not available right now' })
  }
  const { me } = session
  if (open) return me ? navigateTo(roleHome[me.actor.role], { replace: true }) : undefined
  if (!me) return navigateTo({ path: '/sign-in', query: to.fullPath === '/' ? {} : { next: to.fullPath } }, { replace: true })
  const action = pageActions.find(([place]) => to.path === place || to.path.startsWith(`${place}/`))?.[1]
  if (action && !roleMay(me.actor.role, action)) throw createError({ statusCode: 403, statusMessage: 'Not allowed' })
})
