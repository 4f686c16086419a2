import { describe, expect, it } from 'vitest'
import { countText, fleschKincaidGrade, readingGradeCeiling } from '#shared/domain/letter/readability'
import { findSafety } from '#shared/domain/safety/index'
import type { GadoliniumExposure } from '#shared/domain/safety/types'
import type { Situation } from './situation'
import { situation } from './situation'

interface Row { when: string, given: Situation, ids: string[], needs?: string[], asks?: boolean, bars?: string[], turns?: string | null }

const unsteady = { status: 'aki', stageCurrent: 1, stagePeak: 1, steady: false, rule: '', text: '' } as const
const unjudged = { status: 'insufficient', stageCurrent: null, stagePeak: null, steady: null, rule: '', text: '' } as const
const sample = {
  reading: {
    id: 'c1', analyte: 'creatinine', source: 'record', sourceLabel: 'Laboratory', value: 0.9, comparator: null, unit: 'mg/dL',
    collectedAt: '2026-11-30T08:00:00Z', collectedText: null, precision: 'instant', issuedAt: null, status: 'final', refusal: null,
  },
  mgPerDl: 0.9, umolPerL: 79.56, comparator: null, collectedAt: '2026-11-30T08:00:00Z', ageDays: 1,
} as const
const noValue = { status: 'no-creatinine', gateEgfr: null, currency: 'missing' } as const
// ACR group I, reference list of the ACR Manual on Contrast Media and ACR-NKF 2021; gadofosveset stands on no list.
const groupOne = ['gadopentetate', 'gadodiamide', 'gadoversetamide']
const woman = { sex: 'female', birthDate: '1992-05-20' } as const

const tables: Record<string, Row[]> = {
  kidney: [
    { when: 'eGFR is 95', given: {}, ids: [] },
    { when: 'eGFR is exactly 30', given: { kidney: { gateEgfr: 30 } }, ids: ['kidney-30-to-59'], asks: false },
    { when: 'eGFR is 29.96', given: { kidney: { gateEgfr: 29.96 } }, ids: ['kidney-below-hold'], asks: true, bars: groupOne, needs: ['radiologist-word'] },
    { when: 'creatinine shows acute injury', given: { kidney: { injury: unsteady } }, ids: ['kidney-unsteady'], asks: true, bars: groupOne },
    { when: 'no creatinine is found though one is needed', given: { kidney: noValue }, ids: ['kidney-creatinine-missing', 'kidney-group-one-without-value'], needs: ['creatinine'], asks: false, bars: groupOne },
    { when: 'the creatinine is too old', given: { kidney: { currency: 'too-old' } }, ids: ['kidney-creatinine-too-old', 'kidney-group-one-without-value'], needs: ['creatinine'] },
    { when: 'a stat exam has no creatinine', given: { kidney: noValue, priority: 'stat' }, ids: ['kidney-unknown-urgent', 'kidney-group-one-without-value'], needs: ['creatinine', 'radiologist-word'], asks: true },
    { when: 'the patient is acutely ill and injury cannot be judged', given: { screening: { acuteIllness: 'yes' }, kidney: { injury: unjudged, creatinine: sample } }, ids: ['kidney-injury-not-judged'], asks: true },
    { when: 'the injection goes into a joint and eGFR is 12', given: { outcome: 'intra-articular', kidney: { gateEgfr: 12, injury: unsteady } }, ids: ['kidney-joint-not-needed'], needs: [], asks: false, bars: [] },
    { when: 'no contrast is wanted and eGFR is 12', given: { outcome: 'none', kidney: { gateEgfr: 12 } }, ids: [] },
    { when: 'a child has no height', given: { patient: { birthDate: '2018-01-01' }, kidney: { status: 'needs-height', gateEgfr: null } }, ids: ['kidney-needs-height', 'kidney-group-one-without-value'], needs: ['height'] },
  ],
  dialysis: [
    { when: 'on hemodialysis', given: { screening: { dialysis: 'hemodialysis' }, kidney: { status: 'dialysis', gateEgfr: null } }, ids: ['dialysis-hemodialysis'], needs: ['radiologist-word', 'dialysis-after'], asks: true, bars: groupOne },
    { when: 'the next session is 30 hours after the exam', given: { planned: true, at: '2026-12-02T08:00:00Z', screening: { dialysis: 'hemodialysis', nextDialysisAt: '2026-12-03T14:00:00Z' }, kidney: { status: 'dialysis', gateEgfr: null } }, ids: ['dialysis-hemodialysis', 'dialysis-timing'] },
    { when: 'the next session is 6 hours after the exam', given: { planned: true, at: '2026-12-02T08:00:00Z', screening: { dialysis: 'hemodialysis', nextDialysisAt: '2026-12-02T14:00:00Z' }, kidney: { status: 'dialysis', gateEgfr: null } }, ids: ['dialysis-hemodialysis'] },
    { when: 'the session comes before the exam', given: { planned: true, at: '2026-12-02T18:00:00Z', screening: { dialysis: 'hemodialysis', nextDialysisAt: '2026-12-02T14:00:00Z' }, kidney: { status: 'dialysis', gateEgfr: null } }, ids: ['dialysis-hemodialysis', 'dialysis-timing'] },
    { when: 'on peritoneal dialysis', given: { screening: { dialysis: 'peritoneal' }, kidney: { status: 'dialysis', gateEgfr: null } }, ids: ['dialysis-peritoneal'], asks: true, bars: groupOne },
    { when: 'dialysis is not known', given: { screening: { dialysis: 'unknown' } }, ids: ['dialysis-unknown'], asks: true },
  ],
  reaction: [
    { when: 'mild allergic-like to a named agent', given: { screening: { earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'mild', reactionAgent: 'gadobutrol' } }, ids: ['reaction-allergic-mild'], bars: ['gadobutrol'], needs: ['radiologist-word', 'observation'], asks: true },
    { when: 'mild allergic-like to an agent not known', given: { screening: { earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'mild', reactionAgent: 'unknown' } }, ids: ['reaction-allergic-mild-agent-unknown'], needs: ['radiologist-word', 'premedication', 'observation', 'reaction-history'] },
    { when: 'moderate allergic-like', given: { screening: { earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'moderate', reactionAgent: 'gadobutrol' } }, ids: ['reaction-allergic-moderate'], needs: ['radiologist-word', 'premedication', 'observation'], bars: ['gadobutrol'] },
    { when: 'severe allergic-like', given: { screening: { earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'severe', reactionAgent: 'gadobutrol' } }, ids: ['reaction-allergic-severe'], needs: ['radiologist-word', 'premedication', 'radiologist-present', 'observation'], turns: 'discuss' },
    { when: 'nothing is known about it', given: { screening: { earlierReaction: 'yes' } }, ids: ['reaction-allergic-moderate'], needs: ['radiologist-word', 'premedication', 'observation', 'reaction-history'] },
    { when: 'mild physiologic', given: { screening: { earlierReaction: 'yes', reactionKind: 'physiologic', reactionSeverity: 'mild' } }, ids: ['reaction-physiologic-mild'], needs: [], asks: false },
    { when: 'severe physiologic', given: { screening: { earlierReaction: 'yes', reactionKind: 'physiologic', reactionSeverity: 'severe' } }, ids: ['reaction-physiologic-severe'], needs: ['radiologist-word', 'radiologist-present', 'observation'], asks: true },
    { when: 'it is not known whether there was one', given: { screening: { earlierReaction: 'unknown' } }, ids: ['reaction-history-unknown'], needs: ['reaction-history', 'observation'] },
    { when: 'moderate and the contrast goes into a joint', given: { outcome: 'intra-articular', screening: { earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'moderate', reactionAgent: 'gadobutrol' } }, ids: ['reaction-allergic-moderate', 'kidney-joint-not-needed'] },
    { when: 'severe and no contrast is wanted', given: { outcome: 'none', screening: { earlierReaction: 'yes', reactionSeverity: 'severe' } }, ids: [] },
  ],
  pregnancy: [
    { when: 'pregnant', given: { patient: woman, screening: { pregnancy: 'yes' } }, ids: ['pregnancy-yes'], turns: 'discuss', asks: true },
    { when: 'possibly pregnant', given: { patient: woman, screening: { pregnancy: 'possible' } }, ids: ['pregnancy-possible'], needs: ['pregnancy-answer', 'radiologist-word'], turns: null },
    { when: 'not known', given: { patient: woman, screening: { pregnancy: 'unknown' } }, ids: ['pregnancy-open'], needs: ['pregnancy-answer', 'radiologist-word'], asks: true },
    { when: 'not asked yet', given: { patient: woman, screening: { pregnancy: null } }, ids: ['pregnancy-open'], needs: ['pregnancy-answer'], asks: false },
    { when: 'marked not applicable though it applies', given: { patient: woman, screening: { pregnancy: 'not-applicable' } }, ids: ['pregnancy-open'] },
    { when: 'not pregnant', given: { patient: woman, screening: { pregnancy: 'no' } }, ids: [] },
    { when: 'aged 70 and not asked', given: { patient: { sex: 'female', birthDate: '1956-05-20' }, screening: { pregnancy: null } }, ids: [] },
    { when: 'pregnant and no contrast is wanted', given: { outcome: 'none', patient: woman, screening: { pregnancy: 'yes' } }, ids: ['pregnancy-without-contrast'], asks: false },
    { when: 'pregnant and contrast goes into a joint', given: { outcome: 'intra-articular', patient: woman, screening: { pregnancy: 'yes' } }, ids: ['pregnancy-yes', 'kidney-joint-not-needed'] },
  ],
  breastfeeding: [
    { when: 'breastfeeding', given: { screening: { breastfeeding: 'yes' } }, ids: ['breastfeeding-yes'], asks: false, needs: [] },
    { when: 'breastfeeding and no contrast is wanted', given: { outcome: 'none', screening: { breastfeeding: 'yes' } }, ids: [] },
  ],
  child: [
    { when: 'five months old', given: { patient: { birthDate: '2026-07-01', weightKg: 7 } }, ids: ['child-under-one'], asks: true, bars: ['gadopiclenol', 'gadobenate', 'gadoxetate', ...groupOne] },
    { when: 'four years old and gadoxetate, kept for liver exams, is labeled for adults only', given: { patient: { birthDate: '2022-07-01', weightKg: 16 } }, ids: [] },
    { when: 'four years old with a liver exam: below the label of gadoxetate', given: { outcome: 'iv-hepatobiliary', patient: { birthDate: '2022-07-01', weightKg: 16 } }, ids: ['child-age-below-label'], asks: false, bars: [] },
  ],
  exposure: [
    { when: 'a dose 3 hours ago and eGFR above 60', given: { exposures: [dose('2026-12-01T12:00:00Z')] }, ids: ['exposure-interval-under-least', 'exposure-earlier-doses'], asks: true },
    { when: 'a dose 5 hours ago and eGFR above 60', given: { exposures: [dose('2026-12-01T10:00:00Z')] }, ids: ['exposure-interval-under-optimal', 'exposure-earlier-doses'], asks: false },
    { when: 'a dose 13 hours ago and eGFR above 60', given: { exposures: [dose('2026-12-01T02:00:00Z')] }, ids: ['exposure-earlier-doses'] },
    { when: 'a dose 50 hours ago and eGFR 20', given: { exposures: [dose('2026-11-29T13:00:00Z')], kidney: { gateEgfr: 20 } }, ids: ['kidney-below-hold', 'exposure-interval-under-least', 'exposure-earlier-doses'] },
    { when: 'a dose on a day only known by date, today', given: { exposures: [dose('2026-12-01')] }, ids: ['exposure-interval-under-least', 'exposure-earlier-doses'] },
    { when: 'a dose 50 hours ago and a creatinine that is not steady', given: { exposures: [dose('2026-11-29T13:00:00Z')], kidney: { gateEgfr: 45, injury: unsteady } }, ids: ['kidney-unsteady', 'exposure-interval-under-least', 'exposure-earlier-doses'] },
    { when: 'a dose 50 hours ago and dialysis not ruled out', given: { exposures: [dose('2026-11-29T13:00:00Z')], screening: { dialysis: 'unknown' } }, ids: ['dialysis-unknown', 'exposure-interval-under-least', 'exposure-earlier-doses'] },
    { when: 'a dose in a year only', given: { exposures: [dose('2026')] }, ids: ['exposure-earlier-doses'] },
    { when: 'an old linear dose', given: { exposures: [{ ...dose('2014-05-01'), agent: 'gadodiamide' }] }, ids: ['exposure-earlier-doses', 'exposure-earlier-linear'] },
  ],
  weight: [
    { when: 'no weight', given: { patient: { weightKg: null } }, ids: ['weight-missing'], needs: ['weight'] },
    { when: '140 kg', given: { patient: { weightKg: 140 } }, ids: [] },
    { when: '140.1 kg', given: { patient: { weightKg: 140.1 } }, ids: ['weight-above-tables'], needs: ['weight'] },
    { when: 'no weight and a joint', given: { outcome: 'intra-articular', patient: { weightKg: null } }, ids: ['kidney-joint-not-needed'] },
  ],
  condition: [
    { when: 'known NSF', given: { screening: { nephrogenicSystemicFibrosis: 'yes' } }, ids: ['condition-nsf'], turns: 'none', asks: true },
    { when: 'known NSF and the exam is stat', given: { priority: 'stat', screening: { nephrogenicSystemicFibrosis: 'yes' } }, ids: ['condition-nsf'], turns: 'discuss' },
    { when: 'severe liver disease, outpatient', given: { screening: { liverDisease: 'yes' } }, ids: ['condition-liver'], asks: false, bars: groupOne },
    { when: 'severe liver disease, inpatient', given: { setting: 'inpatient', screening: { liverDisease: 'yes' } }, ids: ['condition-liver-acute'], asks: true },
    { when: 'severe liver disease and the liver agent', given: { outcome: 'iv-hepatobiliary', screening: { liverDisease: 'yes' } }, ids: ['condition-liver', 'condition-liver-uptake'] },
    { when: 'asthma', given: { screening: { asthma: 'yes' } }, ids: ['condition-asthma'], needs: ['observation'], asks: false },
  ],
  history: [
    { when: 'no history can be taken', given: { setting: 'emergency', priority: 'stat', screening: { earlierReaction: null, specialNeeds: ['cannot-consent'] } }, ids: ['history-not-obtainable'], asks: true, needs: ['radiologist-word', 'implant-clearance'] },
    { when: 'the record could not be read', given: { recordState: 'unreachable' }, ids: ['history-record-unreachable'] },
  ],
  implant: [
    { when: 'an implant is declared and no contrast is wanted', given: { outcome: 'none', screening: { implants: 'yes', implantDetail: 'pacemaker' } }, ids: ['implant-declared'], needs: ['implant-clearance'], asks: false },
    { when: 'implants are not known and no question is chosen', given: { outcome: null, screening: { implants: 'unknown' } }, ids: ['implant-unknown'] },
  ],
}

function dose(givenAt: string): GadoliniumExposure {
  return { id: 'e1', agent: 'gadobutrol', agentText: 'gadobutrol', givenAt, amountMmol: 7.4, source: 'record' }
}

for (const [topic, rows] of Object.entries(tables)) {
  describe(`safety: ${topic}`, () => {
    it.each(rows)('$when', ({ given, ids, needs, asks, bars, turns }) => {
      const findings = findSafety(situation(given))
      expect(findings.map(found => found.id).sort()).toEqual([...ids].sort())
      if (needs) expect([...new Set(findings.flatMap(found => found.addsNeeds))].sort()).toEqual([...needs].sort())
      if (asks !== undefined) expect(findings.some(found => found.asksRadiologist)).toBe(asks)
      if (bars) {
        const barred = new Set<string>(findings.flatMap(found => found.barsAgents))
        barred.delete('gadofosveset')
        expect([...barred].sort()).toEqual([...bars].sort())
      }
      if (turns !== undefined) expect(findings.find(found => found.turns)?.turns ?? null).toBe(turns)
    })
  })
}

describe('safety findings', () => {
  it('speak to the patient at grade 8 or below, in short sentences', () => {
    const all = Object.values(tables).flat().flatMap(row => findSafety(situation(row.given)))
    for (const { id, plain } of all) {
      expect(fleschKincaidGrade(plain), id).toBeLessThanOrEqual(readingGradeCeiling)
      for (const sentence of plain.split(/(?<=\.)\s+/)) expect(countText(sentence).words, id).toBeLessThanOrEqual(20)
    }
  })

  it('stand gravest first', () => {
    const found = findSafety(situation({ screening: { nephrogenicSystemicFibrosis: 'yes', asthma: 'yes', breastfeeding: 'yes' }, kidney: { gateEgfr: 20 } }))
    expect(found.map(item => item.severity)).toEqual(['stop', 'hold', 'caution', 'info'])
  })

  it('never promise safety and never blame iodine or dye', () => {
    const all = Object.values(tables).flat().flatMap(row => findSafety(situation(row.given)))
    for (const { text, plain } of all) expect(`${text} ${plain}`).not.toMatch(/\bsafe\b|allergic to (iodine|dye)/i)
  })

  it('show both positions where label and ACR differ', () => {
    const [hold] = findSafety(situation({ kidney: { gateEgfr: 20 } }))
    expect(hold?.text).toMatch(/US labels/)
    expect(hold?.text).toMatch(/ACR/)
  })

  it('count a dose once that both the department and the hospital record hold', () => {
    const twice = [dose('2025-03-04T16:00:00Z'), { ...dose('2025-03-04'), id: 'l1', source: 'ledger' as const }]
    const text = (exposures: typeof twice) => findSafety(situation({ exposures })).find(found => found.id === 'exposure-earlier-doses')?.text
    expect(text(twice)).toMatch(/^1 earlier gadolinium dose on Mar 4, 2025, 7\.4 mmol\./)
    expect(text([dose('2022-10')])).toMatch(/^1 earlier gadolinium dose in Oct 2022,/)
    expect(text([dose('2022')])).toMatch(/^1 earlier gadolinium dose in 2022,/)
    expect(text([...twice, dose('2025-09-01')])).toMatch(/^2 earlier gadolinium doses from Mar 4, 2025 to Sep 1, 2025, 14\.8 mmol/)
  })

  it('say when the last dose was given, and claim no hour of a dose known by its day', () => {
    const text = (givenAt: string) => findSafety(situation({ exposures: [dose(givenAt)], kidney: { gateEgfr: 20 } })).find(found => found.id.startsWith('exposure-interval'))?.text
    expect(text('2026-12-01T05:00:00Z')).toMatch(/^The last gadolinium dose was given 10 hours ago\. With an eGFR below 30, 168 hours/)
    // The day ended at 06:00 UTC in the department's zone, 33 hours before.
    expect(text('2026-11-29')).toMatch(/was given on Nov 29, 2026, at least 33 hours ago\./)
    expect(text('2026-12-01')).toMatch(/was given on Dec 1, 2026, the hour not known\./)
  })

  it('claim no eGFR below the hold where only the lowest of several is', () => {
    const one = { display: '28', bound: 'exact', equation: 'ckd-epi-2021-cr', equationLabel: 'CKD-EPI 2021', ageYears: 46, stage: 'G4' } as const
    const range = { low: { ...one, value: 28 }, high: { ...one, value: 37, display: '37', stage: 'G3b' as const } }
    const hold = (kidney: Situation['kidney']) => findSafety(situation({ kidney })).find(found => found.id === 'kidney-below-hold')
    expect(hold({ gateEgfr: 28, range, status: 'needs-sex' })).toMatchObject({ text: expect.stringMatching(/^eGFR may be below 30 and counts as such/), plain: expect.stringMatching(/may work less well/) })
    expect(hold({ gateEgfr: 28, egfr: { ...one, value: 28 } })?.text).toMatch(/^eGFR is below 30/)
    expect(hold({ gateEgfr: 28, egfr: { ...one, value: 28 }, currency: 'too-old' })?.text).toMatch(/^The last eGFR was below 30/)
  })

  it('tell no patient of an illness that is only not ruled out', () => {
    const [liver] = findSafety(situation({ setting: 'inpatient', screening: { liverDisease: 'unknown' } }))
    expect(liver).toMatchObject({ id: 'condition-liver-acute', plain: 'We need to know if your liver is ill.' })
  })

  it('let no urgent exam wait for a dialysis session', () => {
    const timing = (priority: 'routine' | 'stat') => findSafety(situation({
      planned: true, at: '2026-12-02T08:00:00Z', priority, screening: { dialysis: 'hemodialysis', nextDialysisAt: '2026-12-03T14:00:00Z' }, kidney: { status: 'dialysis', gateEgfr: null },
    })).find(found => found.id === 'dialysis-timing')
    expect(timing('stat')?.text).toMatch(/need not wait for it/)
    expect(timing('stat')?.plain).not.toMatch(/move the time/)
    expect(timing('routine')?.text).not.toMatch(/need not wait/)
  })

  it('follow the department\'s own hold', () => {
    const base = situation({ kidney: { gateEgfr: 38 } })
    const strict = { ...base, policy: { ...base.policy, holdBelowEgfr: { ...base.policy.holdBelowEgfr, value: 40 } } }
    expect(findSafety(strict).map(found => found.id)).toContain('kidney-below-hold')
    const lenient = { ...base, kidney: { ...base.kidney, gateEgfr: 25 }, policy: { ...base.policy, holdBelowEgfr: { ...base.policy.holdBelowEgfr, value: 15 } } }
    const found = findSafety(lenient)
    expect(found.map(item => item.id)).toEqual(['kidney-group-one-barred'])
    expect(found[0]?.barsAgents).toContain('gadodiamide')
  })
})
