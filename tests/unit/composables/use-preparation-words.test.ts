import { describe, expect, it } from 'vitest'
import type { NeedView, PreparationRow } from '#shared/types/views'
import { csvHeader, csvLine, groupByDay, instantOf, localOf, nextNeed } from '~/composables/use-preparation-words'

const zone = 'America/Chicago'
const source = { title: 'Invented', body: 'Northshore Imaging', year: 2026, status: 'local' } as const

function need(facts: Partial<NeedView> = {}): NeedView {
  return {
    kind: 'iv-start', text: 'An IV start on arrival', why: '', owner: 'scheduler', dueAt: null, dueText: 'on arrival', source,
    state: 'open', note: '', by: null, at: null, overdue: false, ...facts,
  }
}

function row(id: string, startsAt: string | null, needs: NeedView[] = []): PreparationRow {
  return {
    id, reference: `WF-26-${id}`, state: startsAt ? 'booked' : 'approved', version: 1, priority: 'routine', sentence: null, outcome: 'none', decided: 'none',
    examName: 'MRI knee', region: 'knee', patient: { displayName: 'Joel Marsh', ageWords: '27 years', sex: 'male', recordNumber: '40-1' }, practice: 'Millbrook',
    kidneyLine: null, awaiting: null, replyWaiting: false, nextStep: '', preparedBy: 'Dr Okafor', signedBy: 'Dr Okafor', sentAt: null, dueAt: null,
    slot: startsAt ? { scannerId: 's', scanner: 'MR 1', place: 'Ground floor', startsAt, endsAt: startsAt } : null,
    updatedAt: '2026-12-01T12:00:00Z', needs, phone: null, minutes: 30, hasLetter: false,
  }
}

describe('grouping exams by day', () => {
  it('puts an exam late in the evening under the department\'s own day, not the day in UTC', () => {
    // 2 December 23:30 in Chicago is 3 December 05:30 in UTC.
    const groups = groupByDay([row('1', '2026-12-03T05:30:00Z'), row('2', '2026-12-03T14:00:00Z')], zone)
    expect(groups.map(group => group.label)).toEqual(['Wednesday 2 December', 'Thursday 3 December'])
  })

  it('gives exams without a time no heading', () => {
    expect(groupByDay([row('1', null), row('2', '2026-12-03T14:00:00Z')], zone).map(group => group.label)).toEqual([null, 'Thursday 3 December'])
  })
})

describe('a time typed on the department\'s clock', () => {
  it('becomes the right instant in winter and in summer', () => {
    expect(instantOf('2026-12-02', '10:20', zone)).toEqual({ ok: true, instant: '2026-12-02T16:20:00Z' })
    expect(instantOf('2026-07-02', '9:30', zone)).toEqual({ ok: true, instant: '2026-07-02T14:30:00Z' })
  })

  it('is refused where the change to summer time skips it', () => {
    // US clocks go from 02:00 to 03:00 on 14 March 2027 (second Sunday in March).
    expect(instantOf('2027-03-14', '02:30', zone)).toMatchObject({ ok: false })
  })

  it.each([['25:00'], ['930'], ['']])('is refused where it is no time: %j', (time) => {
    expect(instantOf('2026-12-02', time, zone)).toMatchObject({ ok: false })
  })

  it('is asked for its day where none is chosen', () => {
    expect(instantOf(null, '10:20', zone)).toEqual({ ok: false, message: 'Choose the day.' })
  })

  it('comes back as it was typed', () => {
    expect(localOf('2026-12-02T16:20:00Z', zone)).toEqual({ date: '2026-12-02', time: '10:20' })
  })
})

describe('the next thing to do', () => {
  it('is the overdue need before others', () => {
    expect(nextNeed([need(), need({ kind: 'creatinine', overdue: true })])?.kind).toBe('creatinine')
  })

  it('is nothing once every need is arranged, met or left out', () => {
    expect(nextNeed([need({ state: 'arranged' }), need({ state: 'met' }), need({ state: 'waived' })])).toBeNull()
  })
})

describe('the export', () => {
  it('has one cell for each heading and keeps needs apart by how they stand', () => {
    const line = csvLine(row('1', '2026-12-02T16:20:00Z', [need(), need({ state: 'met', text: 'A weight' })]), zone)
    expect(line).toHaveLength(csvHeader.length)
    expect(line[csvHeader.indexOf('Date')]).toBe('2026-12-02')
    expect(line[csvHeader.indexOf('Time')]).toBe('10:20')
    expect(line[csvHeader.indexOf('Still needed')]).toBe('An IV start on arrival')
    expect(line[csvHeader.indexOf('Met')]).toBe('A weight')
  })
})
