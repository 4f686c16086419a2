import { describe, expect, it } from 'vitest'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { priorities, priorityRank } from '#shared/domain/request/priority'
import { decisionDueAt } from '#shared/domain/request/promise'

describe('decisionDueAt', () => {
  it('promises more pressing requests sooner', () => {
    const due = priorities.map(priority => ({ rank: priorityRank[priority], at: decisionDueAt('2026-12-01T10:00:00.000Z', priority, starterPolicy) }))
    const byRank = [...due].sort((a, b) => a.rank - b.rank).map(entry => entry.at)
    expect([...byRank].sort()).toEqual(byRank)
  })

  it('counts from the moment of sending', () => {
    const minutes = starterPolicy.decisionWithinMinutes.value.stat
    expect(decisionDueAt('2026-12-01T10:00:00.000Z', 'stat', starterPolicy)).toBe(new Date(Date.UTC(2026, 11, 1, 10, minutes)).toISOString())
  })
})
