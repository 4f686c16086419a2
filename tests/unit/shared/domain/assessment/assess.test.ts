import { describe, expect, it } from 'vitest'
import { assess, assessDecision } from '#shared/domain/assessment/assess'
import { emptyScreening } from '#shared/domain/safety/screening'
import { quietScreening } from '../safety/situation'
import { creatinine, marta, rules } from './request-inputs'

const texts = (clauses: { text: string }[]) => clauses.map(clause => clause.text).join('\n')

describe('an assessment', () => {
  it('leads with a sentence: exam, contrast and reason', () => {
    expect(assess(marta, rules).sentence).toMatch(/^MRI brain, seizure protocol, without and with contrast, because a first seizure/)
  })

  it('says what is needed and what is not', () => {
    const { needs, provided } = assess(marta, rules)
    expect(needs.map(need => need.kind)).toEqual(['iv-start', 'medication-guide'])
    expect(texts(provided)).toContain('No new lab work: the creatinine is inside the 6-week window')
    expect(provided.find(clause => clause.text.startsWith('An IV start'))?.owner).toBe('scheduler')
  })

  it('never says that no lab is needed while creatinine is unsteady', () => {
    const rising = assess({ ...marta, readings: [creatinine(0.9, '2026-11-29T14:00:00Z'), creatinine(1.6, '2026-11-30T14:00:00Z')] }, rules)
    expect(rising.kidney.injury.status).toBe('aki')
    expect(texts(rising.provided)).not.toMatch(/No new lab work/)
  })

  it('asks for no creatinine under one year of age, where no equation uses one, and leaves contrast to the radiologist and the pediatric team', () => {
    const baby = assess({
      ...marta, readings: [], patient: { ...marta.patient, birthDate: '2026-06-01', weightKg: 7, heightCm: 65 }, screening: { ...quietScreening, kidneyDisease: 'yes' },
    }, rules)
    expect(baby.needs.map(need => need.kind)).not.toContain('creatinine')
    expect(baby.needs.map(need => need.kind)).toContain('radiologist-word')
    expect(texts(baby.because)).toMatch(/A radiologist decides with the pediatric team/)
    expect(texts([...baby.because, ...baby.provided])).not.toMatch(/6 weeks|policy asks for no creatinine|No lab work/i)
  })

  it('names the source of its main reason', () => {
    expect(assess(marta, rules).because[0]?.source?.body).toBe('American College of Radiology')
  })

  it('keeps the versions it was made with', () => {
    expect(assess(marta, rules)).toMatchObject({ guidanceVersion: '2026.1', policyVersion: '2026.1', assessedAt: marta.now })
  })

  it('works before a question is chosen and shows kidney function already', () => {
    const first = assess({ ...marta, questionId: null, answers: {}, screening: emptyScreening }, rules)
    expect(first).toMatchObject({ exam: null, guidance: null, suggestion: null, agents: null, needs: [], unless: [] })
    expect(first.kidney.egfr?.display).toBe('69')
    expect(first.sentence).toMatch(/^Choose the clinical question/)
  })

  it('says which answer decides while one is open, and where each would lead', () => {
    const open = assess({ ...marta, answers: {} }, rules)
    expect(open.sentence).toMatch(/one answer decides$/)
    expect(open.unless.map(clause => clause.leadsTo)).toEqual(['iv-with-and-without', 'none'])
  })

  it('lets nothing about contrast through where none is given', () => {
    const without = assess({ ...marta, answers: { tumorInfection: 'no' }, readings: [], patient: { ...marta.patient, weightKg: null } }, rules)
    expect(without.suggestion).toBe('none')
    expect(without.needs).toEqual([])
    expect(texts(without.provided)).toContain('No IV start and no lab work')
  })

  it('keeps the suggestion and asks for a radiologist below an eGFR of 30', () => {
    const low = assess({ ...marta, readings: [creatinine(2.4, '2026-11-30T14:00:00Z')] }, rules)
    expect(low.kidney.gateEgfr).toBeLessThan(30)
    expect(low).toMatchObject({ suggestion: 'iv-with-and-without', asksRadiologist: true })
    expect(low.needs.map(need => need.kind)).toContain('radiologist-word')
    expect(texts(low.because)).toMatch(/below 30/)
  })

  it('turns to a talk with the radiologist in pregnancy and still names the agent that would be used', () => {
    const pregnant = assess({ ...marta, patient: { ...marta.patient, birthDate: '1992-05-20' }, screening: { ...quietScreening, pregnancy: 'yes' } }, rules)
    expect(pregnant.suggestion).toBe('discuss')
    expect(pregnant.sentence).toMatch(/to be discussed with a radiologist, because pregnancy holds contrast back$/)
    expect(pregnant.agents?.best).toBe('gadobutrol')
    expect(pregnant.plain.why).toMatch(/pregnant/)
    expect(pregnant.needs.map(need => need.kind)).not.toContain('iv-start')
  })

  it('leaves contrast out with known nephrogenic systemic fibrosis and suggests no agent', () => {
    const known = assess({ ...marta, screening: { ...quietScreening, nephrogenicSystemicFibrosis: 'yes' } }, rules)
    expect(known).toMatchObject({ suggestion: 'none', agents: null, asksRadiologist: true })
    expect(known.alternatives).toMatch(/\S/)
  })

  it('suggests another agent after a reaction to the first', () => {
    const reacted = assess({ ...marta, screening: { ...quietScreening, earlierReaction: 'yes', reactionKind: 'allergic-like', reactionSeverity: 'mild', reactionAgent: 'gadobutrol' } }, rules)
    expect(reacted.agents?.best).toBe('gadoterate')
    expect(reacted.agents?.ranked.find(entry => entry.agent === 'gadobutrol')?.reasons).toContain('An earlier reaction to it')
  })

  it('never blocks a stat exam: a word stands in for the creatinine', () => {
    const stat = assess({ ...marta, priority: 'stat', readings: [] }, rules)
    expect(stat).toMatchObject({ suggestion: 'iv-with-and-without', asksRadiologist: true })
    expect(stat.needs.map(need => need.kind)).toEqual(expect.arrayContaining(['creatinine', 'radiologist-word']))
  })

  it('says that a record could not be read and never that nothing is in it', () => {
    const blind = assess({ ...marta, readings: [], record: { state: 'unreachable', readAt: null } }, rules)
    expect(blind.kidney.status).toBe('could-not-look')
    expect(texts(blind.because)).toMatch(/could not be read/)
  })
})

describe('Because', () => {
  it('holds what moved the answer and leaves what only adds a need to Provided', () => {
    const because = texts(assess({ ...marta, patient: { ...marta.patient, weightKg: null }, screening: { ...quietScreening, implants: 'yes', asthma: 'yes' } }, rules).because)
    expect(because).not.toMatch(/weight|implant|asthma/i)
    const reacted = texts(assess({ ...marta, screening: { ...quietScreening, earlierReaction: 'yes' } }, rules).because)
    expect(reacted).toMatch(/Earlier reaction to an agent that is not known: severity not known \(taken as moderate\), kind not known \(taken as allergic-like\)/)
  })

  it('says in one line that the kidneys give no reason to hold', () => {
    expect(texts(assess(marta, rules).because)).toMatch(/Kidney function: no reason found/)
  })

  it('says that an unknown answer would change nothing', () => {
    const questions = rules.guidance.questions.map(question => question.id === marta.questionId
      ? { ...question, branches: question.branches.map(branch => ({ ...branch, contrast: 'none' as const })) }
      : question)
    const made = assess({ ...marta, answers: { tumorInfection: 'unknown' } }, { ...rules, guidance: { version: 'x', questions } })
    expect(made.suggestion).toBe('none')
    expect(texts(made.because)).toMatch(/What is not known would not change this/)
  })
})

describe('needs after the radiologist has chosen', () => {
  it('follow the choice, and the word is given', () => {
    const low = { ...marta, readings: [creatinine(2.4, '2026-11-30T14:00:00Z')] }
    const signed = assessDecision(low, rules, { contrast: 'iv-with-and-without', agent: 'gadoterate' })
    expect(signed.needs.map(need => need.kind)).toEqual(['iv-start', 'medication-guide'])
    expect(assessDecision(low, rules, { contrast: 'none', agent: null }).needs).toEqual([])
  })

  it('ask no Medication Guide of an agent the patient had here before', () => {
    const exposures = [{ id: 'l1', agent: 'gadobutrol' as const, agentText: 'gadobutrol', givenAt: '2025-02-01T10:00:00Z', amountMmol: 7.4, source: 'ledger' as const }]
    const kinds = (agent: 'gadobutrol' | 'gadoterate') => assessDecision({ ...marta, exposures }, rules, { contrast: 'iv-with-and-without', agent }).needs.map(need => need.kind)
    expect(kinds('gadobutrol')).toEqual(['iv-start'])
    expect(kinds('gadoterate')).toEqual(['iv-start', 'medication-guide'])
  })
})

describe('due times', () => {
  const planned = { ...marta, plannedAt: '2026-12-03T15:00:00Z', readings: [], screening: { ...quietScreening, kidneyDisease: 'yes' as const, earlierReaction: 'yes' as const, reactionSeverity: 'moderate' as const } }
  const due = (kind: string) => assess(planned, rules).needs.find(need => need.kind === kind)?.dueAt

  it('count back from the planned start', () => {
    expect(due('creatinine')).toBe('2026-12-02T15:00:00Z')
    expect(due('premedication')).toBe('2026-12-03T02:00:00Z')
    expect(due('iv-start')).toBe('2026-12-03T15:00:00Z')
  })

  it('ask of an exam that follows at once nothing that was due the day before', () => {
    const now = { ...planned, priority: 'stat' as const, setting: 'emergency' as const, patient: { ...marta.patient, weightKg: null }, screening: { ...quietScreening, earlierReaction: 'unknown' as const, implants: 'unknown' as const } }
    const early = assess(now, rules).needs.filter(need => need.dueAt !== null && Date.parse(need.dueAt) < Date.parse(planned.plannedAt))
    expect(early).toEqual([])
    expect(assess(now, rules).needs.map(need => need.dueText).join()).not.toMatch(/day before/)
  })

  it('are open while no slot is set', () => {
    expect(assess({ ...planned, plannedAt: null }, rules).needs.every(need => need.dueAt === null)).toBe(true)
  })

  it('put dialysis after the exam', () => {
    const onDialysis = assess({ ...marta, plannedAt: '2026-12-03T15:00:00Z', screening: { ...quietScreening, dialysis: 'hemodialysis' } }, rules)
    expect(onDialysis.needs.find(need => need.kind === 'dialysis-after')?.dueAt).toBe('2026-12-04T15:00:00Z')
    expect(onDialysis.needs.find(need => need.kind === 'iv-start')?.text).toMatch(/not in the fistula arm/)
    expect(onDialysis.kidney.egfr).toBeNull()
  })
})

describe('the words of one sheet', () => {
  const infant = { ...marta.patient, birthDate: '2026-08-01', sex: 'male' as const, weightKg: 6.1 }
  const texts = (inputs: typeof marta) => {
    const { because, provided } = assess(inputs, rules)
    return [...because, ...provided].map(clause => clause.text).join('\n')
  }

  it('say of an infant that there is no eGFR, and ask for a cannula that fits', () => {
    const sheet = texts({ ...marta, patient: infant, readings: [creatinine(0.25, '2026-11-28T14:00:00Z')] })
    expect(sheet).toMatch(/No eGFR under 1 year of age; creatinine 0\.25 mg\/dL/)
    expect(sheet).not.toMatch(/not required|22 G/)
  })

  it('say what was found where policy asks for no creatinine', () => {
    const young = { ...marta, patient: { ...marta.patient, birthDate: '1981-01-01', sex: 'male' as const }, readings: [] }
    expect(texts(young)).toContain('No creatinine found in the record. Policy asks for no creatinine without a kidney risk factor.')
    expect(texts({ ...young, record: { state: 'unreachable', readAt: null } })).toContain('The record could not be read, so whether there is a creatinine is not known. Policy asks')
  })

  it('do not spare a lab that a person may want to judge acute injury', () => {
    const inpatient = texts({ ...marta, setting: 'inpatient', readings: [creatinine(0.94, '2026-12-01T00:00:00Z')] })
    expect(inpatient).toMatch(/do not suffice to judge acute kidney injury/)
    expect(inpatient).not.toMatch(/No new lab work/)
  })

  it('leave to a radiologist what nobody knows, with the safety findings in view', () => {
    const unknown = { ...marta, answers: { tumorInfection: 'unknown' }, screening: { ...quietScreening, dialysis: 'unknown' as const }, patient: { ...marta.patient, weightKg: null } }
    const made = assess(unknown, rules)
    expect(made).toMatchObject({ suggestion: 'discuss', asksRadiologist: true })
    expect(made.sentence).toBe('MRI brain, seizure protocol, with or without contrast, to be discussed with a radiologist, because what decides is not known')
    expect(texts(unknown)).toMatch(/not known: a radiologist decides[^]*on dialysis is not known/)
    expect(made.needs.map(need => need.kind)).toEqual(expect.arrayContaining(['radiologist-word', 'weight']))
    expect(made.unless.map(clause => clause.leadsTo)).toEqual(expect.arrayContaining(['iv-with-and-without', 'none']))
    expect(made.plain.why).toMatch(/A doctor decides/)
    expect(assess({ ...unknown, answers: {} }, rules)).toMatchObject({ suggestion: null, sentence: expect.stringMatching(/one answer decides$/) })
  })

  it('say so and ask a radiologist where no stocked agent fits', () => {
    const screening = { ...quietScreening, earlierReaction: 'yes' as const, reactionAgent: 'gadoxetate' as const, reactionKind: 'physiologic' as const, reactionSeverity: 'severe' as const }
    const liver = { ...marta, questionId: 'liver-lesion-characterize', answers: { fnhAdenoma: 'yes' } }
    const none = assess({ ...liver, screening }, rules)
    expect(none.agents?.best).toBeNull()
    expect(none.asksRadiologist).toBe(true)
    expect(texts({ ...liver, screening })).toContain('No stocked agent fits this exam and this patient: a radiologist chooses another way.')
    expect(none.needs.map(need => need.kind)).toContain('radiologist-word')
    expect(texts(liver)).not.toMatch(/No stocked agent/)
  })

  it('offer a protocol without a liver agent where no other liver agent is stocked', () => {
    const screening = { ...quietScreening, earlierReaction: 'yes' as const, reactionAgent: 'gadoxetate' as const, reactionKind: 'allergic-like' as const, reactionSeverity: 'moderate' as const }
    const liver = { ...marta, questionId: 'liver-lesion-characterize', answers: { fnhAdenoma: 'yes' }, screening }
    expect(texts(liver)).toMatch(/No other liver agent is stocked, so a protocol without a liver agent on the radiologist's word/)
    expect(texts(liver)).toMatch(/No stocked agent fits[^\n]*A protocol without a liver agent may answer the question/)
    expect(texts(liver)).not.toMatch(/Another agent/)
    const both = { ...rules, policy: { ...rules.policy, stockedAgents: { ...rules.policy.stockedAgents, value: ['gadoxetate' as const, 'gadobenate' as const] } } }
    const reaction = assess(liver, both).findings.find(found => found.id === 'reaction-allergic-moderate')
    expect(reaction?.text).toMatch(/Another agent/)
  })

  it('say of group I that liver disease is not known where it is not', () => {
    const reasons = (liverDisease: 'yes' | 'unknown') => assess({ ...marta, screening: { ...quietScreening, liverDisease } }, rules).agents?.ranked.find(one => one.agent === 'gadodiamide')?.reasons.join()
    expect(reasons('unknown')).toMatch(/whether there is severe liver disease is not known/)
    expect(reasons('yes')).toMatch(/not with severe liver disease/)
  })

  it('name the course of premedication that still fits', () => {
    const screening = { ...quietScreening, earlierReaction: 'yes' as const, reactionAgent: 'gadobutrol' as const, reactionKind: 'allergic-like' as const, reactionSeverity: 'moderate' as const }
    const needIn = (hours: number | null, setting: 'outpatient' | 'inpatient' = 'outpatient') => {
      const plannedAt = hours === null ? null : new Date(Date.parse(marta.now) + hours * 3_600_000).toISOString()
      return assess({ ...marta, plannedAt, setting, screening }, rules).needs.find(need => need.kind === 'premedication')
    }
    expect(needIn(48)).toMatchObject({ text: 'Premedication prescribed, oral course', dueText: 'first dose 13 hours before the exam' })
    expect(needIn(null)).toMatchObject({ text: 'Premedication prescribed, oral course' })
    expect(needIn(8)?.text).toMatch(/oral course \(13 hours\) no longer fits if it has not begun, so the accelerated one \(5 hours\) or a radiologist's word is needed/)
    expect(needIn(8)?.dueText).toBe('first dose 5 hours before the exam')
    expect(needIn(8, 'inpatient')?.text).toBe('Premedication prescribed, accelerated course')
    expect(needIn(3)).toMatchObject({ text: expect.stringMatching(/no course that begins now is done in time.*radiologist's word/), dueText: 'before contrast' })
  })

  it('tell a patient on dialysis one thing about the session, and no waiting for one where the exam cannot wait', () => {
    const screening = { ...quietScreening, dialysis: 'hemodialysis' as const }
    const lines = (priority: 'routine' | 'stat') => assess({ ...marta, priority, screening }, rules).plain.before.filter(line => /dialysis/.test(line))
    expect(lines('routine')).toEqual(['You have dialysis, so a doctor looks at contrast first. Keep your dialysis plan. We book the scan shortly before a session.'])
    expect(lines('stat')).toEqual(['You have dialysis, so a doctor looks at contrast first. Keep your dialysis plan. Your scan is urgent and does not wait for a session.'])
  })

  it('tell the patient each thing once', () => {
    const woman = { ...marta, patient: { ...marta.patient, birthDate: '1996-05-05' } }
    const pregnant = assess({ ...woman, screening: { ...quietScreening, pregnancy: 'yes' } }, rules).plain
    expect(pregnant.before).not.toContain(pregnant.why)
    const open = assess({ ...woman, screening: { ...quietScreening, pregnancy: 'unknown' } }, rules).plain
    expect(open.before.filter(line => /pregnant/.test(line))).toEqual(['Tell us if you may be pregnant. We may ask for a test first.'])
  })
})
