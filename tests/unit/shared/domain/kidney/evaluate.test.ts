import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countsAsBelow, evaluateKidney } from '#shared/domain/kidney/evaluate'
import { daysAgo, kidneyInput, now, reading } from './sample'
import type { KidneyChanges } from './sample'

const evaluate = (changes?: KidneyChanges) => evaluateKidney(kidneyInput(changes))
const cautions = (changes?: KidneyChanges) => evaluate(changes).cautions.map(({ id }) => id)
const child = { birthDate: '2016-12-01', sex: 'female', heightCm: 140, heightAt: daysAgo(30) } as const

describe('kidney function of an adult', () => {
  it('is estimated from the newest creatinine, with its age in words', () => {
    const kidney = evaluate({ readings: [reading({ value: 1, collectedAt: daysAgo(19) })] })
    expect(kidney).toMatchObject({
      status: 'estimated', ageWords: '19 days old', headline: 'eGFR 69; creatinine 1.00 mg/dL, 19 days old',
      egfr: { display: '69', equation: 'ckd-epi-2021-cr', equationLabel: 'CKD-EPI 2021', ageYears: 50, stage: 'G2', bound: 'exact' },
      range: null, cautions: [],
    })
    expect(kidney.gateEgfr).toBe(kidney.egfr?.value)
  })

  it('uses the age at the sample', () => {
    expect(evaluate({ patient: { birthDate: '1976-11-25' }, readings: [reading({ collectedAt: daysAgo(19) })] }).egfr?.ageYears).toBe(49)
  })

  it('keeps the value below 30 below 30 on the screen', () => {
    const { egfr, gateEgfr } = evaluate({ patient: { birthDate: '1955-01-01' }, readings: [reading({ value: 1.79 })] })
    expect(gateEgfr).toBeLessThan(30)
    expect(gateEgfr).toBeGreaterThan(29.5)
    expect(egfr?.display).toBe('29.9')
  })

  it('gives the lower bound of an eGFR for a creatinine below a limit', () => {
    const kidney = evaluate({ readings: [reading({ value: 0.5, comparator: '<' })] })
    expect(kidney.egfr).toMatchObject({ bound: 'at-least', display: '≥ 114' })
    expect(kidney.headline).toContain('creatinine <0.50 mg/dL')
    expect(kidney.cautions.map(({ id }) => id)).toContain('bound')
  })

  it('reckons with nothing where the eGFR is only known to be below a value', () => {
    const kidney = evaluate({ readings: [reading({ value: 1.5, comparator: '>' })] })
    expect(kidney.egfr?.bound).toBe('at-most')
    expect(kidney.gateEgfr).toBe(0)
  })

  it('takes the older age where only the year of birth is known', () => {
    const kidney = evaluate({ patient: { birthDate: '1976' } })
    expect(kidney.egfr?.ageYears).toBe(50)
    expect(kidney.cautions.map(({ id }) => id)).toContain('birth-date-partial')
  })
})

describe('a sex that no equation knows', () => {
  it('gives a range, and the lower end to the gate', () => {
    const kidney = evaluate({ patient: { sex: 'unknown' } })
    expect(kidney).toMatchObject({ status: 'needs-sex', egfr: null, range: { low: { display: '69' }, high: { display: '92' } } })
    expect(kidney.gateEgfr).toBe(kidney.range?.low.value)
    expect(kidney.headline).toBe('eGFR 69 to 92: the sex for the equation is not known; creatinine 1.00 mg/dL, 10 days old')
    expect(kidney.series[0]?.egfr).toBeNull()
  })
})

describe('cystatin C', () => {
  const with2 = (creatinine: number, cystatin: number, comparator: '<' | '>' | null = null) => ({
    readings: [reading({ value: creatinine }), reading({ analyte: 'cystatin-c', unit: 'mg/L', value: cystatin, comparator })],
  })

  it('stands beside the creatinine eGFR, and leads between 20 and 45', () => {
    expect(evaluate(with2(1, 1))).toMatchObject({ egfr: { equation: 'ckd-epi-2021-cr' }, beside: { equation: 'ckd-epi-2021-cr-cys' } })
    expect(evaluate(with2(1.9, 1.6))).toMatchObject({ egfr: { equation: 'ckd-epi-2021-cr-cys' }, beside: { equation: 'ckd-epi-2021-cr' } })
  })

  it('gates on the combined value where it leads, and on the lower one where it does not', () => {
    const leads = evaluate(with2(2.1, 1.2))
    expect(leads.beside?.value).toBeLessThan(30)
    expect(leads.gateEgfr).toBe(leads.egfr?.value)
    const beside = evaluate(with2(1, 2.8))
    expect(beside.gateEgfr).toBe(beside.beside?.value)
    expect(beside.cautions.map(({ id }) => id)).toContain('cystatin-disagrees')
  })

  it('makes a bound of the combined value where either result is one', () => {
    expect(evaluate(with2(1.9, 1.6, '<')).egfr).toMatchObject({ equation: 'ckd-epi-2021-cr-cys', bound: 'at-least' })
    expect(evaluate({ readings: [reading({ value: 1.9, comparator: '>' }), reading({ analyte: 'cystatin-c', unit: 'mg/L', value: 1.6, comparator: '>' })] }).egfr)
      .toMatchObject({ equation: 'ckd-epi-2021-cr-cys', bound: 'at-most' })
  })

  it('is left out where the two limits point to opposite sides', () => {
    const kidney = evaluate({ readings: [reading({ value: 1.9, comparator: '<' }), reading({ analyte: 'cystatin-c', unit: 'mg/L', value: 1.6, comparator: '>' })] })
    expect(kidney).toMatchObject({ egfr: { equation: 'ckd-epi-2021-cr' }, beside: null })
  })
})

describe('kidney function of a child', () => {
  it('is estimated by CKiD U25 with bedside Schwartz beside it', () => {
    expect(evaluate({ patient: child, readings: [reading({ value: 0.6 })] })).toMatchObject({
      status: 'estimated', egfr: { equation: 'ckid-u25-cr' }, beside: { equation: 'schwartz-2009', display: '96' },
    })
  })

  it('waits for a height, never guesses one', () => {
    const kidney = evaluate({ patient: { ...child, heightCm: null } })
    expect(kidney).toMatchObject({ status: 'needs-height', egfr: null, gateEgfr: null, creatinine: { mgPerDl: 1 } })
    expect(kidney.headline).toBe('A height is needed for the eGFR of a child; creatinine 1.00 mg/dL, 10 days old')
  })

  it('does not take a height of more than twelve months ago', () => {
    expect(evaluate({ patient: { ...child, heightAt: '2025-12-01' } }).status).toBe('needs-height')
    expect(evaluate({ patient: { ...child, heightAt: '2025-12-02' } }).status).toBe('estimated')
  })

  it('marks a height without a date, and inputs outside the equation', () => {
    expect(cautions({ patient: { ...child, heightAt: null }, readings: [reading({ value: 11 })] })).toEqual(['height-undated', 'outside-equation'])
    expect(cautions({ patient: { ...child, heightCm: 60 }, readings: [reading({ value: 10 })] })).toEqual([])
    expect(cautions({ patient: { ...child, heightCm: 59 } })).toEqual(['outside-equation'])
    expect(cautions({ patient: { heightCm: 230, heightAt: null } })).toEqual([])
  })

  it('has none under one year of age, also where the birth date leaves that open', () => {
    const infant = { ...child, birthDate: '2026-02-01' }
    expect(evaluate({ patient: infant })).toMatchObject({ status: 'no-equation', egfr: null, gateEgfr: null })
    expect(evaluate({ patient: infant }).headline).toContain('No eGFR under 1 year of age')
    expect(evaluate({ patient: { ...child, birthDate: '2025' } }).status).toBe('no-equation')
  })

  it('changes to the adult equation on the 18th birthday, not a day before', () => {
    const at = (collectedAt: string) => evaluate({
      patient: { birthDate: '2008-11-20', heightCm: 165, heightAt: daysAgo(30) }, readings: [reading({ value: 0.8, collectedAt })],
    }).egfr
    expect(at('2026-11-19T18:00:00Z')?.equation).toBe('ckid-u25-cr')
    expect(at('2026-11-20T18:00:00Z')).toMatchObject({ equation: 'ckd-epi-2021-cr', ageYears: 18 })
  })

  it('has an equation for every age up to 120', () => {
    expect(evaluate({ patient: { birthDate: '1906-01-01' } })).toMatchObject({ status: 'estimated', egfr: { ageYears: 120 } })
    expect(evaluate({ patient: { birthDate: '1905-01-01' } }).status).toBe('no-equation')
  })

  it('is the lower of both equations where the year leaves open whether the patient is 18', () => {
    const kidney = evaluate({ patient: { ...child, birthDate: '2008', heightCm: 165 }, readings: [reading({ value: 0.8 })] })
    expect(kidney.egfr?.equation).toBe('ckid-u25-cr')
    expect(evaluate({ patient: { ...child, birthDate: '2008', heightCm: null } }).status).toBe('needs-height')
  })

  it.each(['', '1890-01-01', '2027-05-01'])('asks for the birth date where it is %j', (birthDate) => {
    expect(evaluate({ patient: { birthDate } })).toMatchObject({ status: 'no-equation', headline: expect.stringContaining('check the date of birth') })
  })
})

describe('no creatinine', () => {
  it.each([
    ['complete', 'no-creatinine', 'No creatinine found in the record'],
    ['incomplete', 'could-not-look', 'The record was only partly read, without a usable creatinine so far'],
    ['unreachable', 'could-not-look', 'The record could not be read, so whether there is a creatinine is not known'],
    ['not-read', 'not-looked', 'The record has not been read for a creatinine'],
  ] as const)('with a record that is %s: %s', (state, status, headline) => {
    expect(evaluate({ readings: [], record: { state } })).toMatchObject({ status, headline, egfr: null, gateEgfr: null, ageWords: null })
  })

  it('is not said to be none where results were found but not usable', () => {
    const one = [reading({ status: 'preliminary' })]
    expect(evaluate({ readings: one }).headline).toBe('No usable creatinine: the result found cannot be used')
    expect(evaluate({ readings: [...one, reading({ unit: null })] }).headline).toBe('No usable creatinine: none of the 2 results found can be used')
    expect(evaluate({ readings: one, record: { state: 'unreachable' } }).headline).toContain('1 result could not be used')
  })

  it('is missing only where policy asks for one', () => {
    expect(evaluate({ readings: [] }).currency).toBe('not-needed')
    expect(evaluate({ readings: [], screening: { kidneyDisease: 'yes' } }).currency).toBe('missing')
  })
})

describe('dialysis', () => {
  it.each(['hemodialysis', 'peritoneal'] as const)('gives no number (%s)', (dialysis) => {
    const kidney = evaluate({ screening: { dialysis }, readings: [reading({ value: 6 }), reading({ value: 7.5, collectedAt: daysAgo(9) })] })
    expect(kidney).toMatchObject({
      status: 'dialysis', egfr: null, beside: null, range: null, gateEgfr: null, currency: 'not-needed', windowDays: null,
      injury: { status: 'not-applicable' }, creatinine: { mgPerDl: 7.5 },
    })
    expect(kidney.series.every(({ egfr }) => egfr === null)).toBe(true)
    expect(countsAsBelow(kidney, 30)).toBe(true)
  })

  it('not ruled out is a reason for doubt', () => {
    expect(cautions({ screening: { dialysis: 'unknown' } })).toContain('dialysis-unknown')
  })
})

describe('reasons for doubt', () => {
  it('put injury before everything else in the headline', () => {
    const kidney = evaluate({
      readings: [reading({ value: 0.8, collectedAt: daysAgo(41) }), reading({ value: 1.6, collectedAt: daysAgo(40) })],
      screening: { kidneyDisease: 'yes' },
    })
    expect(kidney.injury).toMatchObject({ status: 'aki', stageCurrent: 2 })
    expect(kidney.headline).toMatch(/^Acute kidney injury\. eGFR 39 cannot be relied on; creatinine 1\.60 mg\/dL, 40 days old, too old for the exam$/)
    expect(kidney.cautions[0]?.id).toBe('acute-injury')
    expect(countsAsBelow(kidney, 30)).toBe(true)
  })

  it('name a newer result that could not be used', () => {
    const kidney = evaluate({ readings: [reading(), reading({ collectedAt: daysAgo(1), status: 'preliminary', value: 3 })] })
    expect(kidney.cautions).toEqual([expect.objectContaining({ id: 'newer-set-aside', text: 'A newer creatinine could not be used. Reason: Not final yet' })])
  })

  it('do not name an older one, or one entered in error', () => {
    expect(cautions({ readings: [reading(), reading({ collectedAt: daysAgo(20), unit: null }), reading({ collectedAt: daysAgo(1), status: 'entered-in-error' })] })).toEqual([])
  })

  it.each([
    ['incomplete', 'The hospital record was only partly read: a newer creatinine may exist'],
    ['unreachable', 'The hospital record could not be read: a newer creatinine may exist'],
    ['not-read', 'The hospital record has not been read: a newer creatinine may exist'],
  ] as const)('say that the record is %s', (state, text) => {
    expect(evaluate({ record: { state } }).cautions).toEqual([expect.objectContaining({ id: `record-${state}`, text })])
  })

  it.each([
    [[1, 40], [1.8, 5], 'Acute kidney injury presumed'],
    [[2.4, 5], [1.6, 3], 'Creatinine not steady'],
  ] as const)('name what is unsteady in the headline', (before, last, words) => {
    const readings = [before, last].map(([value, days]) => reading({ value, collectedAt: daysAgo(days) }))
    expect(evaluate({ readings }).headline).toMatch(new RegExp(`^${words}\\. eGFR \\d+ cannot be relied on`))
  })

  it('name an injury that has just passed', () => {
    const readings = [[1, 8], [2.2, 6], [1.2, 3]].map(([value = 0, days = 0]) => reading({ value, collectedAt: daysAgo(days) }))
    expect(evaluate({ readings }).headline).toMatch(/^Recent acute kidney injury\. eGFR/)
  })

  it('come from the answers: acute illness, pregnancy, liver disease', () => {
    expect(cautions({ screening: { acuteIllness: 'unknown', pregnancy: 'possible', liverDisease: 'yes' } })).toEqual(['acute-illness', 'pregnancy', 'liver-disease'])
  })

  it('speak of no change or pregnancy where no number is given for them to mislead', () => {
    const answers = { acuteIllness: 'yes', pregnancy: 'yes' } as const
    expect(cautions({ screening: { ...answers, dialysis: 'hemodialysis' } })).toEqual([])
    expect(cautions({ screening: answers, readings: [] })).not.toContain('pregnancy')
    expect(cautions({ screening: answers })).toContain('pregnancy')
  })

  it('say that a creatinine below the measuring range of an adult suggests little muscle, and offer cystatin C', () => {
    const low = reading({ value: 0.3, comparator: '<' })
    expect(evaluate({ readings: [low] }).cautions.find(({ id }) => id === 'low-muscle-mass')?.text).toMatch(/little muscle.*cystatin C/)
    expect(cautions({ readings: [low], patient: { sex: 'unknown' } })).toContain('low-muscle-mass')
    expect(cautions({ readings: [low, reading({ analyte: 'cystatin-c', unit: 'mg/L', value: 1 })] })).not.toContain('low-muscle-mass')
    expect(cautions({ readings: [low], patient: child })).not.toContain('low-muscle-mass')
    expect(cautions({ readings: [reading({ value: 0.3 })] })).not.toContain('low-muscle-mass')
  })

  it('say that injury cannot be judged where it matters', () => {
    expect(cautions({ setting: 'inpatient' })).toEqual(['injury-not-judged'])
    expect(cautions()).toEqual([])
  })

  it('come from the results: a possible eGFR, two results, a tenfold jump', () => {
    const at = daysAgo(2)
    expect(cautions({
      readings: [reading({ value: 18, collectedAt: at }), reading({ value: 16, collectedAt: at }), reading({ value: 1, collectedAt: daysAgo(300) })],
    })).toEqual(['acute-injury', 'may-be-egfr', 'two-results', 'tenfold-jump'])
  })

  it('each name a source', () => {
    for (const { source } of evaluate({ setting: 'inpatient', record: { state: 'incomplete' }, patient: { birthDate: '1976' } }).cautions) {
      expect(source.title).not.toBe('')
    }
  })
})

describe('the age of the sample', () => {
  const risk = { screening: { kidneyDisease: 'yes' as const }, readings: [reading({ value: 0.8, collectedAt: daysAgo(40) })] }

  it('is counted to the planned exam, and to the present while none is planned', () => {
    expect(evaluate(risk)).toMatchObject({ currency: 'current', windowDays: 42 })
    expect(evaluate({ ...risk, plannedAt: '2026-12-05T15:00:00Z' }).currency).toBe('too-old')
  })

  it('never changes the number', () => {
    expect(evaluate({ ...risk, plannedAt: '2027-03-01T15:00:00Z' }).egfr?.display).toBe(evaluate(risk).egfr?.display)
  })
})

describe('an evaluation', () => {
  it('gives the trend oldest first, each point with its own eGFR', () => {
    const { series } = evaluate({ readings: [reading({ value: 1, collectedAt: daysAgo(10) }), reading({ value: 1.4, collectedAt: daysAgo(400) })] })
    expect(series.map(({ mgPerDl }) => mgPerDl)).toEqual([1.4, 1])
    expect(series.map(({ egfr }) => Math.round(egfr ?? 0))).toEqual([46, 69])
  })

  it('does not depend on the order of the readings', () => {
    const readings = [1, 1.3, 0.9, 2.4].map((value, index) => reading({ value, collectedAt: daysAgo(index + 1) }))
    const straight = evaluate({ readings })
    fc.assert(fc.property(fc.shuffledSubarray(readings, { minLength: 4 }), (shuffled) => {
      expect(evaluate({ readings: shuffled })).toEqual(straight)
    }))
  })

  it('never reckons with more kidney function than it shows', () => {
    fc.assert(fc.property(
      fc.double({ min: 0.1, max: 30, noNaN: true }), fc.constantFrom(null, '<' as const, '>' as const), fc.integer({ min: 1920, max: 2025 }),
      fc.constantFrom('female' as const, 'male' as const, 'other' as const, 'unknown' as const),
      (value, comparator, year, sex) => {
        const kidney = evaluate({
          readings: [reading({ value, comparator })], patient: { birthDate: `${year}-06-01`, sex, heightCm: 150, heightAt: daysAgo(5) },
        })
        const shown = [kidney.egfr, kidney.range?.low].flatMap(one => one?.value ?? [])
        for (const one of shown) expect(kidney.gateEgfr).toBeLessThanOrEqual(one)
        expect(kidney.status === 'estimated').toBe(kidney.egfr !== null)
      },
    ))
  })

  it('refuses a present that is no instant', () => {
    expect(() => evaluate({ now: '2026-12-01' })).toThrow(RangeError)
    expect(() => evaluate({ now, plannedAt: 'tomorrow' })).toThrow(RangeError)
  })
})

describe('whether a gate counts the kidneys as below a threshold', () => {
  it('follows the lowest value to reckon with, and leaves an unknown value alone', () => {
    expect(countsAsBelow(evaluate(), 30)).toBe(false)
    expect(countsAsBelow(evaluate(), 75)).toBe(true)
    expect(countsAsBelow(evaluate({ readings: [] }), 30)).toBe(false)
  })
})
