import type { Policy } from '../policy/types'
import type { Priority } from './priority'

/**
 * When a request should be decided, from the department's promise for its priority.
 *
 * @param sentAt ISO instant at which it was sent.
 * @returns ISO instant in UTC.
 */
export function decisionDueAt(sentAt: string, priority: Priority, policy: Policy): string {
  const minutes = policy.decisionWithinMinutes.value[priority]
  return new Date(Date.parse(sentAt) + minutes * 60_000).toISOString()
}
