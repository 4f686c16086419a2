import fc from 'fast-check'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import { agentIds } from '#shared/domain/contrast/types'
import type { AgentId } from '#shared/domain/contrast/types'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { observationStatuses } from '#shared/domain/kidney/types'
import type { LabReading } from '#shared/domain/kidney/types'
import { priorities } from '#shared/domain/request/priority'
import type { GadoliniumExposure, ScreeningAnswers } from '#shared/domain/safety/types'
import { creatinine, marta } from './request-inputs'

const instant = fc.date({ min: new Date('2024-01-01'), max: new Date('2028-01-01'), noInvalidDate: true }).map(date => date.toISOString())
const yesNoUnknown = fc.constantFrom('yes', 'no', 'unknown', null)

const reading: fc.Arbitrary<LabReading> = fc.record({
  id: fc.uuid(),
  analyte: fc.constantFrom('creatinine', 'cystatin-c'),
  source: fc.constantFrom('record', 'typed'),
  sourceLabel: fc.string(),
  value: fc.oneof(fc.double({ min: 0.1, max: 12, noNaN: true }), fc.constantFrom(null, 0, -1, 88.4, 1e9)),
  comparator: fc.constantFrom(null, null, '<', '<=', '>=', '>'),
  unit: fc.constantFrom('mg/dL', 'umol/L', 'mg/L', null, 'bananas'),
  collectedAt: fc.option(instant),
  collectedText: fc.option(fc.string()),
  precision: fc.constantFrom('instant', 'day', 'unknown'),
  issuedAt: fc.option(instant),
  status: fc.constantFrom(...observationStatuses),
  refusal: fc.constantFrom(null, null, 'Urine specimen'),
})

const exposure: fc.Arbitrary<GadoliniumExposure> = fc.record({
  id: fc.uuid(),
  agent: fc.option(fc.constantFrom<AgentId>(...agentIds)),
  agentText: fc.string(),
  givenAt: fc.oneof(instant, instant.map(text => text.slice(0, 10)), fc.constantFrom('2021', '2021-07', 'long ago', '')),
  amountMmol: fc.option(fc.double({ min: 0, max: 30, noNaN: true })),
  source: fc.constantFrom('record', 'ledger', 'typed'),
})

const screening: fc.Arbitrary<ScreeningAnswers> = fc.record({
  kidneyDisease: yesNoUnknown,
  kidneyRiskFactor: yesNoUnknown,
  dialysis: fc.constantFrom('none', 'hemodialysis', 'peritoneal', 'unknown', null),
  nextDialysisAt: fc.option(instant),
  acuteIllness: yesNoUnknown,
  liverDisease: yesNoUnknown,
  earlierReaction: yesNoUnknown,
  reactionAgent: fc.constantFrom<AgentId | 'unknown' | null>(...agentIds, 'unknown', null),
  reactionKind: fc.constantFrom('allergic-like', 'physiologic', 'unknown', null),
  reactionSeverity: fc.constantFrom('mild', 'moderate', 'severe', 'unknown', null),
  asthma: yesNoUnknown,
  pregnancy: fc.constantFrom('yes', 'no', 'possible', 'unknown', 'not-applicable', null),
  breastfeeding: fc.constantFrom('yes', 'no', 'unknown', 'not-applicable', null),
  nephrogenicSystemicFibrosis: yesNoUnknown,
  implants: yesNoUnknown,
  implantDetail: fc.string(),
  specialNeeds: fc.subarray(['interpreter', 'wheelchair', 'claustrophobia', 'sedation', 'cannot-consent', 'hard-iv-access']),
})

type Asked = Pick<AssessmentInputs, 'questionId' | 'answers'>

/** A question with any mixture of answered, unknown, open and invalid deciders, or none chosen. */
const asked: fc.Arbitrary<Asked> = fc.oneof(
  { weight: 1, arbitrary: fc.constantFrom<Asked>({ questionId: null, answers: {} }, { questionId: 'gone', answers: { a: 'b' } }) },
  {
    weight: 9,
    arbitrary: fc.constantFrom(...starterQuestions).chain(question => fc.record({
      questionId: fc.constant(question.id),
      answers: fc.tuple(...question.deciders.map(decider => fc.constantFrom(
        null, 'unknown', 'nonsense', ...(decider.kind === 'yesno' ? ['yes', 'no'] : decider.options.map(option => option.id)),
      ))).map(values => Object.fromEntries(question.deciders.flatMap((decider, index) => {
        const value = values[index]
        return value == null ? [] : [[decider.id, value]]
      }))),
    })),
  },
)

/** Any inputs of the declared types, from the first step of the form to a complete request with a slot. */
export const arbitraryInputs: fc.Arbitrary<AssessmentInputs> = fc.record({
  asked,
  now: instant,
  plannedAt: fc.option(instant),
  priority: fc.constantFrom(...priorities),
  setting: fc.constantFrom('outpatient', 'inpatient', 'emergency'),
  patient: fc.record({
    birthDate: fc.oneof(
      fc.date({ min: new Date('1920-01-01'), max: new Date('2027-01-01'), noInvalidDate: true }).map(date => date.toISOString().slice(0, 10)),
      fc.constantFrom('1970', '2015-06', '', 'not a date'),
    ),
    sex: fc.constantFrom('female', 'male', 'other', 'unknown'),
    weightKg: fc.oneof(fc.double({ min: 1, max: 250, noNaN: true }), fc.constantFrom(null, 0, -3)),
    weightAt: fc.option(instant),
    heightCm: fc.oneof(fc.double({ min: 40, max: 210, noNaN: true }), fc.constantFrom(null, 0)),
    heightAt: fc.option(instant),
  }),
  readings: fc.array(reading, { maxLength: 5 }),
  record: fc.record({ state: fc.constantFrom('complete', 'incomplete', 'unreachable', 'not-read'), readAt: fc.option(instant) }),
  screening,
  exposures: fc.array(exposure, { maxLength: 3 }),
}).map(({ asked: { questionId, answers }, ...rest }) => ({ ...rest, questionId, answers }))

/** Any person and answers beside a question that asks for contrast and a recent creatinine, where most rules have something to say. */
export const arbitraryContrastInputs: fc.Arbitrary<AssessmentInputs> = fc.record({
  inputs: arbitraryInputs,
  daysAgo: fc.integer({ min: 0, max: 60 }),
  mgPerDl: fc.double({ min: 0.4, max: 4, noNaN: true }),
}).map(({ inputs: { screening, patient, priority, setting, exposures, record, plannedAt }, daysAgo, mgPerDl }) => {
  const readings = [creatinine(mgPerDl, new Date(Date.parse(marta.now) - daysAgo * 86_400_000).toISOString())]
  return { ...marta, screening, patient, priority, setting, exposures, record, plannedAt, readings }
})
