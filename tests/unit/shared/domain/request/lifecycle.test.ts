import { describe, expect, it } from 'vitest'
import { roles } from '#shared/domain/access/roles'
import { requestStates, stateWords, transition, transitions } from '#shared/domain/request/lifecycle'
import { nextStep } from '#shared/domain/request/next-step'

describe('transition', () => {
  it('allows every row of the table and refuses every other pair of state and step', () => {
    for (const state of requestStates) {
      for (const row of transitions) {
        const allowed = (row.from as readonly string[]).includes(state)
        const by = row.by[0]
        expect(transition(state, row.name, by).ok, `${state} ${row.name}`).toBe(allowed)
      }
    }
  })

  it('refuses a role that the row does not name', () => {
    for (const row of transitions) {
      for (const role of roles) {
        const allowed = (row.by as readonly string[]).includes(role)
        const result = transition(row.from[0], row.name, role)
        expect(result).toEqual(allowed ? { ok: true, to: row.to } : { ok: false, why: 'role' })
      }
    }
  })

  it('keeps a standing slot when a reopened request is approved again', () => {
    expect(transition('reopened', 'approve', 'radiologist', { keepsSlot: true })).toEqual({ ok: true, to: 'booked' })
    expect(transition('reopened', 'approve', 'radiologist')).toEqual({ ok: true, to: 'approved' })
  })

  it('leaves final states final', () => {
    for (const state of ['closed', 'withdrawn', 'refused', 'discarded'] as const) {
      for (const row of transitions) expect(transition(state, row.name, row.by[0])).toEqual({ ok: false, why: 'state' })
    }
  })

  it('never approves a request whose query is unanswered', () => {
    expect(transition('queried', 'approve', 'radiologist')).toEqual({ ok: false, why: 'state' })
  })
})

describe('nextStep', () => {
  it('names a next step in every state, so that no request ends in silence', () => {
    for (const state of requestStates) {
      expect(stateWords[state]).not.toBe('')
      for (const awaiting of ['ordering', 'imaging', null] as const) {
        expect(nextStep({ state, awaiting, replyWaiting: false, slotStartsAt: null })).not.toBe('')
      }
    }
  })

  it('says who owes the answer', () => {
    expect(nextStep({ state: 'queried', awaiting: 'ordering', replyWaiting: false, slotStartsAt: null })).toBe('The ordering side owes an answer')
    expect(nextStep({ state: 'booked', awaiting: 'imaging', replyWaiting: false, slotStartsAt: null })).toBe('Imaging owes an answer')
  })
})
