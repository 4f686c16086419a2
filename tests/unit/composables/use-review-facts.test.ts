import { describe, expect, it } from 'vitest'
import { emptyScreening } from '#shared/domain/safety/screening'
import type { RequestForm } from '#shared/domain/request/form'
import { starterQuestions } from '#shared/domain/guidance/questions'
import { answeredDeciders, kidneyTone, patientFacts } from '~/composables/use-review-facts'

const form: RequestForm = {
  region: 'brain', questionId: 'first-seizure-adult', answers: { tumorInfection: 'yes' }, priority: 'urgent', setting: 'outpatient', history: '', wish: null,
  weightKg: null, heightCm: null, screening: emptyScreening, typedReadings: [], screeningConfirmed: true, contactNumber: '', detailsByEmail: null, patientEmail: null,
}
const facts = (screening: Partial<RequestForm['screening']>) =>
  patientFacts({ form: { ...form, screening: { ...emptyScreening, ...screening } }, record: null, ledger: [] }, day => day)
const value = (screening: Partial<RequestForm['screening']>, label: string) => facts(screening).find(fact => fact.label === label)?.value

describe('what a radiologist scans for', () => {
  it('names the clinician\'s answers in the question\'s own words', () => {
    const [first] = answeredDeciders({ form }, { version: 'x', questions: starterQuestions })
    expect(first?.label).toMatch(/cancer|tumor/i)
    expect(first?.value).toBe('Yes')
  })

  it('still shows an answer whose question is not in the guidance at hand', () => {
    expect(answeredDeciders({ form }, null)).toEqual([{ label: 'Tumor infection', value: 'Yes' }])
  })

  it('never takes a record that was not read for a patient without earlier doses', () => {
    expect(value({}, 'Earlier gadolinium')).toBe('Could not look')
  })

  it('tells an unanswered question from one answered with no and one not known', () => {
    expect([value({}, 'Reactions to gadolinium'), value({ earlierReaction: 'no' }, 'Reactions to gadolinium'), value({ earlierReaction: 'unknown' }, 'Reactions to gadolinium')])
      .toEqual(['Not answered', 'None known', 'Not known'])
  })

  it('passes a declared implant on in the clinician\'s words', () => {
    expect(value({ implants: 'yes', implantDetail: 'Clip, 2019' }, 'MR safety')).toBe('Clip, 2019')
  })
})

describe('the kidney line of the queue', () => {
  it.each([['hemodialysis', 'stop'], ['eGFR 24', 'stop'], ['creatinine not steady', 'stop'], ['creatinine 94 days old', 'flare'], ['no creatinine', 'flare'], ['eGFR 69', 'plain'], [null, 'plain']])(
    '%j is written %s', (line, tone) => {
      expect(kidneyTone(line)).toBe(tone)
    })
})
