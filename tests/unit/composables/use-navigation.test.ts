import { describe, expect, it } from 'vitest'
import type { Role } from '#shared/domain/access/roles'
import { idleStep, warningSeconds } from '~/composables/use-idle'
import { navigationFor } from '~/composables/use-navigation'
import { stepOf } from '~/composables/use-request-form'

function me(role: Role) {
  return {
    actor: { userId: 'u', name: 'Somebody', role, maySign: true, guidanceLead: false, practiceIds: [] },
    counts: { requests: 2, review: 17, preparation: 40 },
  }
}

describe('the navigation', () => {
  it('shows each role its own work first, with what is open', () => {
    expect(navigationFor(me('orderer'), '/requests').map(entry => entry.label)).toEqual(['Requests', 'New request', 'Guidance'])
    expect(navigationFor(me('radiologist'), '/review')[0]).toMatchObject({ label: 'Review', count: 17, current: true })
    expect(navigationFor(me('scheduler'), '/preparation')[0]).toMatchObject({ label: 'Preparation', count: 40 })
  })

  it('never offers an administrator a list of patients', () => {
    const labels = navigationFor(me('administrator'), '/settings/users').map(entry => entry.label)
    expect(labels).not.toContain('Requests')
    expect(labels).not.toContain('Review')
    expect(labels).toContain('Audit trail')
  })

  it('marks the entry that holds the page: the form belongs to "New request", an open request to "Requests"', () => {
    const current = (path: string) => navigationFor(me('orderer'), path).filter(entry => entry.current).map(entry => entry.label)
    expect(current('/requests/new/safety')).toEqual(['New request'])
    expect(current('/requests/WF-26-004318')).toEqual(['Requests'])
  })
})

describe('idleness', () => {
  const start = Date.parse('2026-12-01T10:00:00Z')
  const after = (minutes: number) => idleStep(start, start + minutes * 60_000, 15).step

  it('warns two minutes before the end and ends at the end', () => {
    expect(after(12.9)).toBe('work')
    expect(after(13)).toBe('warn')
    expect(after(14.9)).toBe('warn')
    expect(after(15)).toBe('end')
  })

  it('leaves at least the 20 seconds that WCAG 2.2.1 asks for', () => {
    expect(warningSeconds).toBeGreaterThanOrEqual(20)
  })
})

describe('a missing answer', () => {
  it('is found on the step where it is asked', () => {
    expect(['questionId', 'answers.cancer', 'history', 'wish.reason', 'screening.pregnancy', 'screeningConfirmed', 'weightKg'].map(stepOf))
      .toEqual(['question', 'question', 'question', 'contrast', 'safety', 'safety', 'safety'])
  })
})
