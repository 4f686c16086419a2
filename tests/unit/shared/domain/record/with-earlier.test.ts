import { describe, expect, it } from 'vitest'
import type { RecordPart, RecordReading } from '#shared/domain/record/types'
import { withEarlier } from '#shared/domain/record/with-earlier'
import { reading as labReading } from '../kidney/sample'

const whole: RecordPart = { state: 'found', complete: true, problem: null, words: null }
const nothing: RecordPart = { state: 'none', complete: true, problem: null, words: null }
const missed: RecordPart = { state: 'could-not-look', complete: false, problem: 'unreachable', words: 'The hospital record did not answer in time' }

function record(changes: Partial<Omit<RecordReading, 'parts'>> & { parts?: Partial<RecordReading['parts']> } = {}): RecordReading {
  const { parts, ...others } = changes
  return {
    state: 'complete', readAt: '2026-03-02T08:00:00Z', ehrPatientId: 'p1',
    patient: null, readings: [], laboratoryEgfr: [], weight: null, height: null, hints: [], exposures: [], allergies: [], noKnownAllergy: false, conditions: [], warnings: [],
    parts: { patient: whole, laboratory: whole, weight: whole, height: whole, pregnancy: nothing, conditions: whole, allergies: whole, exposures: whole, ...parts },
    ...others,
  }
}

const creatinine = labReading({ id: 'obs-1' })
const dose = { id: 'dose-1', agent: 'gadobutrol', agentText: 'Gadobutrol', givenAt: '2026-02-20T09:00:00Z', amountMmol: 7, source: 'record' } as const
const earlier = record({
  readings: [creatinine], exposures: [dose], weight: { kg: 74, at: '2026-01-10', observationId: 'w1' }, allergies: ['Gadobutrol: severe (2022)'],
})

describe('a reading that reached the record only in part', () => {
  it('keeps the creatinine, the earlier dose and the weight that it could not look at, and stays incomplete', () => {
    const now = record({ state: 'incomplete', readAt: '2026-03-02T09:00:00Z', parts: { laboratory: missed, exposures: missed, weight: missed, allergies: missed } })
    const filled = withEarlier(now, earlier)
    expect(filled).toMatchObject({ state: 'incomplete', readings: [{ id: 'obs-1' }], exposures: [{ id: 'dose-1' }], weight: { kg: 74 }, allergies: ['Gadobutrol: severe (2022)'] })
    expect(filled.parts.laboratory).toEqual(missed)
  })

  it('puts a new result before the kept ones and counts none twice', () => {
    const cut: RecordPart = { state: 'found', complete: false, problem: 'cut-short', words: null }
    const now = record({ state: 'incomplete', readings: [labReading({ id: 'obs-2' }), creatinine], parts: { laboratory: cut } })
    expect(withEarlier(now, earlier).readings.map(row => row.id)).toEqual(['obs-2', 'obs-1'])
  })

  it('lets go of what the record was looked through for and no longer holds', () => {
    const now = record({ state: 'incomplete', parts: { laboratory: nothing, weight: nothing, conditions: missed } })
    expect(withEarlier(now, earlier)).toMatchObject({ readings: [], weight: null })
  })

  it('keeps nothing where the date of birth differs, or another patient was read before', () => {
    const doubtful = record({ state: 'incomplete', parts: { laboratory: missed }, warnings: [{ id: 'birth-date-differs', text: 'differs' }] })
    expect(withEarlier(doubtful, earlier).readings).toEqual([])
    expect(withEarlier(record({ state: 'incomplete', parts: { laboratory: missed } }), { ...earlier, ehrPatientId: 'p2' }).readings).toEqual([])
  })
})
