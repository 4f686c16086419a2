import type { ServiceContext } from '#server/services/context'
import { useApp } from '#server/utils/app'

/** The context of a step that nobody is signed in for yet. */
export function nobodyContext(requestId: string): ServiceContext {
  const { db, ehr } = useApp()
  return { db, ehr, actor: { kind: 'nobody' }, requestId, now: new Date(), idempotency: null, permitted: new Set() }
}
