import { describe, expect, it } from 'vitest'
import type { Assessment } from '#shared/domain/assessment/types'
import { assess } from '#shared/domain/assessment/assess'
import { inputsFrom } from '#shared/domain/assessment/inputs'
import { starterAgents } from '#shared/domain/contrast/agents'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { emptyScreening } from '#shared/domain/safety/screening'
import { namedField, spokenChange } from '~/composables/use-request-form'

const question = starterQuestions.find(candidate => candidate.question === 'Adult with a first or new seizure: is there a lesion?')
if (!question) throw new Error('the starter guidance holds a question on a first seizure')
const decider = question.deciders[0]
if (!decider) throw new Error('that question has a decider')

function assessment(questionId: string | null, answers: Record<string, string>): Assessment {
  return assess(inputsFrom({
    form: {
      region: null, questionId, answers, priority: 'routine', setting: 'outpatient', history: '', wish: null, weightKg: 74, heightCm: null,
      screening: emptyScreening, typedReadings: [], screeningConfirmed: false, contactNumber: '', detailsByEmail: null, patientEmail: null,
    },
    record: null, ledger: [], patient: { birthDate: '1965-03-04', sex: 'female' }, plannedAt: null, now: '2026-12-01T16:00:00.000Z',
  }), { guidance: { version: 'test', questions: [...starterQuestions] }, policy: starterPolicy, agents: starterAgents })
}

describe('the live sheet', () => {
  it('says in one sentence what an answer changed', () => {
    const change = spokenChange(assessment(question.id, { [decider.id]: 'no' }), assessment(question.id, { [decider.id]: 'yes' }))
    expect(change?.spoken).toMatch(/^Suggestion changed\. Now without and with contrast; it was without contrast/)
    expect(change?.texts.length).toBeGreaterThan(0)
  })

  it('speaks the new sentence when another question is chosen', () => {
    const after = assessment(question.id, { [decider.id]: 'no' })
    expect(spokenChange(assessment(null, {}), after)).toEqual({ texts: [], spoken: `${after.sentence}.` })
  })

  it('stays silent while nothing weighty changes', () => {
    const same = assessment(question.id, { [decider.id]: 'no' })
    expect(spokenChange(same, same)).toBeNull()
  })
})

describe('a missing answer', () => {
  it('is named by its question, so that the summary can be read alone', () => {
    expect(namedField({ path: `answers.${decider.id}`, message: 'x' }, question).message).toBe(`Answer “${decider.ask}”, or say that it is not known.`)
    expect(namedField({ path: 'screening.asthma', message: 'x' }, null).message).toContain('Asthma?')
  })

  it('keeps its own words where no question stands behind it', () => {
    expect(namedField({ path: 'history', message: 'Tell the history.' }, question).message).toBe('Tell the history.')
  })
})
