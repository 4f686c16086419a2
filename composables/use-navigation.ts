import type { ComputedRef } from 'vue'
import { computed } from 'vue'
import type { Action } from '#shared/domain/access/permissions'
import { roleMay } from '#shared/domain/access/permissions'
import type { Role } from '#shared/domain/access/roles'
import type { MeView } from '#shared/types/views'
import { useSessionStore } from '~/stores/session'

export interface NavigationEntry { to: string, label: string, count: number | null, current: boolean }

interface Place { to: string, label: string, action: Action, count?: keyof MeView['counts'], only?: readonly Role[] }

/** The navigation, in order; who sees an entry follows from the permission table. */
const places: readonly Place[] = [
  { to: '/review', label: 'Review', action: 'review.list', count: 'review' },
  { to: '/preparation', label: 'Preparation', action: 'preparation.list', count: 'preparation' },
  { to: '/requests', label: 'Requests', action: 'request.list', count: 'requests' },
  { to: '/requests/new', label: 'New request', action: 'request.create' },
  { to: '/settings/users', label: 'Users', action: 'user.list' },
  { to: '/settings/practices', label: 'Practices', action: 'practice.list' },
  { to: '/settings/connections', label: 'Connections', action: 'connection.read' },
  { to: '/audit', label: 'Audit trail', action: 'audit.read' },
  { to: '/guidance', label: 'Guidance', action: 'guidance.read' },
  // Everybody may read it; it is daily reading only for those who answer for it.
  { to: '/settings/policy', label: 'Policy', action: 'policy.read', only: ['radiologist', 'administrator'] },
]

/** Entries one role sees, with the one that holds `path` marked: the longest address that begins it. */
export function navigationFor(me: Pick<MeView, 'actor' | 'counts'>, path: string): NavigationEntry[] {
  const seen = places.filter(place => roleMay(me.actor.role, place.action) && (place.only?.includes(me.actor.role) ?? true))
  const holding = seen
    .filter(place => path === place.to || path.startsWith(`${place.to}/`))
    .sort((a, b) => b.to.length - a.to.length)[0]
  return seen.map(place => ({
    to: place.to,
    label: place.label,
    // Only orderers work from the list of requests; to others its count would say nothing to do.
    count: place.count === undefined || (place.count === 'requests' && me.actor.role !== 'orderer') ? null : me.counts[place.count],
    current: place === holding,
  }))
}

export function useNavigation(): ComputedRef<NavigationEntry[]> {
  const session = useSessionStore()
  const route = useRoute()
  return computed(() => (session.me ? navigationFor(session.me, route.path) : []))
}
