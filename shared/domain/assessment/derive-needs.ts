import { DateTime } from 'luxon'
import type { AssessmentInputs } from './types'
import type { Need, NeedKind } from './needs'
import type { ContrastOutcome } from '../contrast/outcome'
import type { AgentId } from '../contrast/types'
import type { KidneyFunction } from '../kidney/types'
import type { Policy } from '../policy/types'
import type { SafetyFinding } from '../safety/types'
import { isIntravenous, usesContrast } from '../contrast/outcome'
import { safetySources } from '../safety/sources'
import { needKinds } from './needs'
import { windowWords } from './words'

export interface NeedsContext {
  inputs: AssessmentInputs
  policy: Policy
  kidney: KidneyFunction
  findings: SafetyFinding[]
  outcome: ContrastOutcome | null
  examName: string | null
  /** The agent suggested or chosen. */
  agent: AgentId | null
  /** True once a radiologist signed: the word is then given. */
  decided: boolean
}

/** Results and answers are wanted this long before the exam, hours: a working day to act on them. Local choice. */
const leadHours = 24

/** Whether the exam follows so soon that a day's lead would ask for something due before it was asked for. */
function isSameDay({ priority, setting }: Pick<AssessmentInputs, 'priority' | 'setting'>): boolean {
  return priority === 'stat' || priority === 'asap' || setting === 'emergency'
}

/** What still applies while contrast is open: what informs the radiologist, not what prepares the injection. */
const neededToDiscuss: readonly NeedKind[] = [
  'creatinine', 'pregnancy-answer', 'weight', 'height', 'reaction-history', 'radiologist-word', 'implant-clearance', 'interpreter', 'sedation',
]
const neededWithoutContrast: readonly NeedKind[] = ['radiologist-word', 'implant-clearance', 'interpreter', 'sedation']

/** Everything that must be in place before the exam, each with its owner and latest moment, in the order of `needKinds`. */
export function deriveNeeds(context: NeedsContext): Need[] {
  const wanted = wantedKinds(context)
  return needKinds.filter(kind => wanted.has(kind)).map(kind => describe(kind, context))
}

function wantedKinds({ inputs, findings, outcome, agent, decided }: NeedsContext): Set<NeedKind> {
  const kinds = new Set<NeedKind>(findings.flatMap(found => found.addsNeeds))
  const { specialNeeds } = inputs.screening
  if (specialNeeds.includes('interpreter')) kinds.add('interpreter')
  if (specialNeeds.includes('sedation')) kinds.add('sedation')
  if (outcome !== null && isIntravenous(outcome)) kinds.add('iv-start')
  if (outcome === 'intra-articular') kinds.add('radiologist-present')
  if (outcome !== null && usesContrast(outcome) && guideDue(inputs, agent)) kinds.add('medication-guide')
  if (outcome === 'discuss') kinds.add('radiologist-word')
  const kept = outcome === 'discuss' ? neededToDiscuss : outcome === null || outcome === 'none' ? neededWithoutContrast : needKinds
  return new Set([...kinds].filter(kind => kept.includes(kind) && !(decided && kind === 'radiologist-word')))
}

/** Outpatients get the agent's Medication Guide with its first dose here; the ledger tells which came before (21 CFR 208). */
function guideDue(inputs: AssessmentInputs, agent: AgentId | null): boolean {
  return inputs.setting === 'outpatient'
    && !inputs.exposures.some(exposure => exposure.source === 'ledger' && exposure.agent !== null && exposure.agent === agent)
}

/** Fast injections need the larger cannula: angiography, perfusion and the heart (3 mL/s and more). */
function needsPowerInjector(examName: string | null): boolean {
  return examName !== null && /\bMR[AV]\b|angiogra|perfusion|cardiac|heart/i.test(examName.replace(/non-contrast MR[AV]/gi, ''))
}

function describe(kind: NeedKind, context: NeedsContext): Need {
  const { inputs, policy } = context
  const before = (hours: number) => shifted(inputs.plannedAt, -hours)
  const sameDay = isSameDay(inputs)
  const lead = sameDay ? 0 : leadHours
  const why = context.findings.find(found => found.addsNeeds.includes(kind))
  const base = { kind, why: why?.text ?? '', source: why?.source ?? safetySources.practice }
  const premedication = policy.premedicationLeadHours.value
  switch (kind) {
    case 'creatinine': return { ...base, text: creatinineText(context), owner: 'ordering', dueAt: before(lead), dueText: `result in hand ${sameDay ? 'before contrast' : 'the day before the exam'}` }
    case 'iv-start': return {
      ...base, text: ivText(context), why: 'The agent is given by vein.', owner: 'scheduler', dueAt: inputs.plannedAt, dueText: 'on arrival',
      source: policy.cannula.source,
    }
    case 'pregnancy-answer': return { ...base, text: 'An answer to the pregnancy question', owner: 'ordering', dueAt: before(lead), dueText: sameDay ? 'before contrast' : 'the day before the exam' }
    case 'weight': return {
      ...base, text: inputs.patient.weightKg === null ? 'A weight, in kg' : 'The weight confirmed by a person',
      owner: 'ordering', dueAt: before(lead), dueText: 'before the dose is worked out',
    }
    case 'height': return { ...base, text: 'A height, in cm, for the child\'s eGFR', owner: 'ordering', dueAt: before(lead), dueText: 'before eGFR is read' }
    case 'premedication': {
      const accelerated = inputs.setting !== 'outpatient' || inputs.priority === 'stat'
      const { hours, note } = premedicationCourse(inputs, premedication, accelerated)
      return {
        ...base, text: `Premedication prescribed${note}`, owner: 'ordering', dueAt: before(hours ?? 0),
        dueText: hours === null ? 'before contrast' : `first dose ${hours} hours before the exam`, source: policy.premedicationLeadHours.source,
      }
    }
    case 'dialysis-after': return {
      ...base, owner: 'scheduler',
      dueAt: shifted(inputs.plannedAt, policy.dialysisWithinHours.value), dueText: `within ${policy.dialysisWithinHours.value} hours after the exam`,
      text: sameDay
        ? `The next hemodialysis session, best within ${policy.dialysisWithinHours.value} hours after the exam`
        : `Hemodialysis within ${policy.dialysisWithinHours.value} hours after the exam, not before it`,
      source: policy.dialysisWithinHours.source,
    }
    case 'radiologist-word': return {
      ...base, text: 'A named radiologist\'s word on contrast', why: base.why || 'Guidance leaves contrast to the radiologist.',
      owner: 'radiologist', dueAt: inputs.plannedAt, dueText: 'before contrast',
    }
    case 'reaction-history': return {
      ...base, text: 'Earlier reactions: which agent, what happened, how severe', owner: 'ordering',
      dueAt: before(sameDay ? 0 : premedication.oral + leadHours), dueText: sameDay ? 'before contrast' : 'in time for premedication',
    }
    case 'medication-guide': return {
      ...base, text: 'Medication Guide given to the patient', why: 'Outpatients get it with the first dose of an agent.',
      owner: 'scan-room', dueAt: inputs.plannedAt, dueText: 'before the injection',
      source: { ...safetySources.fdaRetention, title: 'Medication Guides, 21 CFR 208' },
    }
    case 'implant-clearance': return { ...base, text: 'MR safety clears the implant or metal', owner: 'scan-room', dueAt: before(lead), dueText: sameDay ? 'before the exam' : 'the day before the exam' }
    case 'interpreter': return { ...base, text: 'An interpreter', why: 'Asked for by the ordering clinician.', owner: 'scheduler', dueAt: inputs.plannedAt, dueText: 'on arrival' }
    case 'sedation': return {
      ...base, text: 'Sedation or anesthesia booked with the exam', why: 'Asked for by the ordering clinician. Fasting and consent belong to anesthesia.',
      owner: 'scheduler', dueAt: before(lead), dueText: 'when the exam is booked',
    }
    case 'radiologist-present': return {
      ...base,
      text: context.outcome === 'intra-articular' ? 'A radiologist to inject the joint' : 'A physician able to treat a reaction in the room',
      why: base.why || 'The agent is injected into the joint under imaging.',
      owner: 'scheduler', dueAt: inputs.plannedAt, dueText: 'at the exam',
    }
    case 'observation': return {
      ...base, text: `${policy.observationMinutes.value} minutes of observation after the injection`, owner: 'scan-room', dueAt: null, dueText: 'after the injection',
      source: policy.observationMinutes.source,
    }
  }
}

/** The course that still fits before the exam, with what to say where the usual one does not; `hours` is null where none fits. */
function premedicationCourse(
  { now, plannedAt }: AssessmentInputs, lead: Policy['premedicationLeadHours']['value'], accelerated: boolean,
): { hours: number | null, note: string } {
  const left = plannedAt === null ? Number.POSITIVE_INFINITY : DateTime.fromISO(plannedAt).diff(DateTime.fromISO(now), 'hours').hours
  const usual = accelerated ? lead.accelerated : lead.oral
  if (left >= usual) return { hours: usual, note: accelerated ? ', accelerated course' : ', oral course' }
  // A course already under way stays right: this judges only what could begin now.
  if (accelerated || left < lead.accelerated) {
    return { hours: null, note: `: no course that begins now is done in time (${lead.accelerated} hours at least), so a radiologist's word is needed` }
  }
  return { hours: lead.accelerated, note: `: the oral course (${lead.oral} hours) no longer fits if it has not begun, so the accelerated one (${lead.accelerated} hours) or a radiologist's word is needed` }
}

function shifted(at: string | null, hours: number): string | null {
  if (at === null) return null
  return DateTime.fromISO(at, { zone: 'utc' }).plus({ hours }).toISO({ suppressMilliseconds: true })
}

function creatinineText({ kidney }: NeedsContext): string {
  const fresh = kidney.windowDays === null ? 'A creatinine' : `A creatinine drawn within ${windowWords(kidney.windowDays)} of the exam`
  return kidney.currency === 'too-old' ? `${fresh}: the newest is ${kidney.ageWords ?? 'too old'}` : fresh
}

function ivText({ inputs, policy, examName, findings }: NeedsContext): string {
  if (findings.some(found => found.id === 'child-under-one')) return 'An IV start on arrival, as large as the veins of an infant allow, for injection by hand'
  const { usualGauge, powerGauge } = policy.cannula.value
  const gauge = needsPowerInjector(examName) ? `An IV start on arrival, ${powerGauge} or larger for the power injector` : `An IV start on arrival, ${usualGauge} or larger`
  const arm = inputs.screening.dialysis === 'hemodialysis' ? '; not in the fistula arm, not through the dialysis catheter' : ''
  const hard = inputs.screening.specialNeeds.includes('hard-iv-access') ? '; veins are hard to find, allow 10 minutes more' : ''
  return gauge + arm + hard
}

