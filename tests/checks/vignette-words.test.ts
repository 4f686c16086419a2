import { describe, expect, it } from 'vitest'
import { evaluateKidney } from '#shared/domain/kidney/evaluate'
import { ageAt } from '#shared/domain/kidney/age'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { inputsOf, vignetteSchema } from './rows/vignette'
import { scoreVignette } from './rows/vignette-score'
import { earlierDoses, kidneyAnswers, pregnancyAnswers, reactionAnswers } from './rows/vignette-words'

describe('words on the kidneys', () => {
  it.each([
    ['hemodialysis', { dialysis: 'hemodialysis', kidneyDisease: 'yes' }],
    ['Haemodialysis three times a week', { dialysis: 'hemodialysis', kidneyDisease: 'yes' }],
    ['ESRD on HD via fistula', { dialysis: 'hemodialysis', kidneyDisease: 'yes' }],
    ['peritoneal dialysis', { dialysis: 'peritoneal', kidneyDisease: 'yes' }],
    ['CAPD', { dialysis: 'peritoneal', kidneyDisease: 'yes' }],
    ['CKD stage 4, not on dialysis', { dialysis: 'none', kidneyDisease: 'yes' }],
    ['CKD 4 predialysis', { dialysis: 'none', kidneyDisease: 'yes' }],
    ['transplant', { kidneyRiskFactor: 'yes' }],
    ['kidney transplant 2019, off haemodialysis since', { dialysis: 'none', kidneyDisease: 'yes', kidneyRiskFactor: 'yes' }],
    ['end-stage kidney disease', { dialysis: 'unknown', kidneyDisease: 'yes' }],
    ['acute kidney injury from sepsis', { acuteIllness: 'yes' }],
    ['CRRT in the ICU', { dialysis: 'hemodialysis', kidneyDisease: 'yes', acuteIllness: 'yes' }],
    ['single kidney after nephrectomy, diabetes', { kidneyRiskFactor: 'yes' }],
    ['hepatorenal syndrome', { acuteIllness: 'yes', liverDisease: 'yes' }],
    ['no known kidney disease', {}],
    ['none', {}],
    ['unknown', { kidneyDisease: 'unknown', kidneyRiskFactor: 'unknown' }],
    ['blue', null],
  ])('reads %j', (text, answers) => {
    expect(kidneyAnswers(text)).toEqual(answers)
  })
})

describe('words on pregnancy', () => {
  it.each([
    ['9 weeks', { pregnancy: 'yes' }], ['20', { pregnancy: 'yes' }], ['second trimester', { pregnancy: 'yes' }], ['pregnant, 30-week', { pregnancy: 'yes' }],
    ['possible', { pregnancy: 'possible' }], ['period overdue by 5 days', { pregnancy: 'possible' }], ['unknown', { pregnancy: 'unknown' }],
    ['not pregnant', { pregnancy: 'no' }], ['no', { pregnancy: 'no' }], ['negative test', { pregnancy: 'no' }], ['hysterectomy', { pregnancy: 'no' }],
    ['breastfeeding', { breastfeeding: 'yes', pregnancy: 'no' }], ['breast-feeding, 6 weeks postpartum', { breastfeeding: 'yes', pregnancy: 'no' }],
    ['not breastfeeding, 12 weeks pregnant', { pregnancy: 'yes' }], ['blue', null],
  ])('reads %j', (text, answers) => {
    expect(pregnancyAnswers(text)).toEqual(answers)
  })
})

describe('words on earlier reactions', () => {
  it.each([
    ['severe anaphylaxis to gadobutrol', { earlierReaction: 'yes', reactionAgent: 'gadobutrol', reactionSeverity: 'severe', reactionKind: 'allergic-like' }],
    ['hives after gadolinium, agent unknown', { earlierReaction: 'yes', reactionAgent: 'unknown', reactionSeverity: 'mild', reactionKind: 'allergic-like' }],
    ['vomited after gadoterate meglumine', { earlierReaction: 'yes', reactionAgent: 'gadoterate', reactionSeverity: 'mild', reactionKind: 'physiologic' }],
    ['moderate reaction to MRI contrast: diffuse urticaria', { earlierReaction: 'yes', reactionAgent: 'unknown', reactionSeverity: 'moderate', reactionKind: 'allergic-like' }],
    ['shellfish', { earlierReaction: 'no' }],
    ['anaphylaxis to iodinated contrast', { earlierReaction: 'no' }],
    ['contrast allergy', { earlierReaction: 'unknown' }],
    ['asthma', { asthma: 'yes' }],
    ['no known allergies', { earlierReaction: 'no' }],
    ['blue', null],
  ])('reads %j', (text, answers) => {
    expect(reactionAnswers(text)).toEqual(answers)
  })
})

describe('words on earlier doses', () => {
  it.each([
    ['3', { count: 3, hoursAgo: null }], ['two doses', { count: 2, hoursAgo: null }], ['none', { count: 0, hoursAgo: null }],
    ['6 hours ago', { count: 1, hoursAgo: 6 }], ['4 doses, last 2 days ago', { count: 4, hoursAgo: 48 }], ['yesterday', { count: 1, hoursAgo: 24 }],
    ['one in 2019', { count: 1, hoursAgo: null }], ['gadolinium in 2019', { count: 1, hoursAgo: null }], ['blue', null],
  ])('reads %j', (text, doses) => {
    expect(earlierDoses(text)).toEqual(doses)
  })
})

describe('a case', () => {
  const made = (changes: object) => vignetteSchema.parse({ id: 'c', age: 50, sex: 'F', questionId: 'low-back-pain-sciatica', expectedContrast: 'none', ...changes })
  const of = (changes: object) => inputsOf(made(changes)).inputs

  it.each([50, 0.5, 1, 7.5, 17.9, 17.999, 18, 70.25])('makes the person %d years old when the newest creatinine was drawn', (age) => {
    for (const daysAgo of [0, 0.25, 12, 300]) {
      const { patient, readings } = of({ age, context: { creatinine: [{ value: 1, unit: 'mg/dL', daysAgo }, { value: 1.1, unit: 'mg/dL', daysAgo: daysAgo + 400 }] } })
      const ages = ageAt(patient.birthDate, Date.parse(readings[0]?.collectedAt ?? ''), starterPolicy.department.timeZone)
      expect(ages?.youngest.completedYears).toBe(Math.floor(age))
      expect(Math.abs((ages?.youngest.decimalYears ?? 0) - age)).toBeLessThan(0.006)
    }
  })

  it.each([['F', 'female'], ['male', 'male'], ['X', 'other'], [null, 'unknown'], [undefined, 'unknown'], ['?', 'unknown']])('takes the sex %j', (sex, read) => {
    expect(of({ sex }).patient.sex).toBe(read)
  })

  it('takes creatinine in both units and hours as fractions of a day', () => {
    const inputs = of({ context: { creatinine: [{ value: 88.4, unit: 'umol/L', daysAgo: 0.25 }, { value: 1, unit: 'mg/dL', daysAgo: 1 }] } })
    const kidney = evaluateKidney({ ...inputs, policy: starterPolicy })
    expect(kidney.series.map(point => point.mgPerDl)).toEqual([1, 1])
    expect(Date.parse(inputs.now) - Date.parse(inputs.readings[0]?.collectedAt ?? '')).toBe(6 * 3_600_000)
  })

  it('takes answers that are not known, and yes and no as JSON writes them', () => {
    expect(of({ answers: { redFlag: 'unknown', priorSurgery: true, other: null } }).answers).toEqual({ redFlag: 'unknown', priorSurgery: 'yes' })
  })

  it('takes doses from a count, a kind and hours', () => {
    const { exposures } = of({ context: { priorGadolinium: 2, priorAgentType: 'linear', priorGadoliniumHoursAgo: 10 } })
    expect(exposures.map(dose => dose.agent)).toEqual(['gadodiamide', 'gadodiamide'])
    expect(of({ context: { priorGadoliniumHoursAgo: 10 } }).exposures).toHaveLength(1)
  })

  it('scores both ends where sex is not known, and an eGFR that none may be shown', () => {
    const creatinine = [{ value: 1.2, unit: 'mg/dL', daysAgo: 1 }]
    const score = (context: object, sex: string | null) => scoreVignette(made({ age: 60, sex, answers: { redFlag: 'none', priorSurgery: 'no' }, context: { creatinine, ...context } })).shortfalls
    // CKD-EPI 2021 at 60 years and 1.2 mg/dL: 52 for a woman, 69 for a man (Inker 2021, computed).
    expect(score({ expectedEgfr: null, expectedEgfrRange: [52, 69] }, null)).toEqual([])
    expect(score({ expectedEgfr: 52 }, 'F')).toEqual([])
    expect(score({ expectedEgfr: null }, 'F')).toHaveLength(1)
    expect(score({ expectedEgfr: null, kidney: 'Haemodialysis' }, 'F')).toEqual([])
  })
})
