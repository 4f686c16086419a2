import type { ScreeningHint } from '#shared/domain/record/types'
import { nameOf } from './codes'
import { acuteTopic, conditionTopics, fits, pregnancyTopic } from './condition-topics'
import { daysBetween, readFhirTime } from './fhir-time'
import { pregnancyStaleAfterDays } from './map-pregnancy'
import type { ConditionResource, ProcedureResource } from './resources'

/** Acute illness counts for the safety question while this recent, days. */
const acuteDays = 7
/** A dialysis session this recent means dialysis goes on (our rule). */
const dialysisSessionDays = 90

const presentStatuses = ['active', 'recurrence', 'relapse']

/** What the problem list brings: short lines of what is present, and suggestions for the safety questions. */
export function mapConditions(conditions: readonly ConditionResource[], { zone, now }: { zone: string, now: string }): { lines: string[], hints: ScreeningHint[] } {
  const present = conditions.filter(isPresent)
  const lines = new Set<string>()
  const hints: ScreeningHint[] = []
  for (const condition of present) {
    const name = nameOf(condition.code)
    if (name !== null) lines.add(name)
    const at = readFhirTime(condition.onsetDateTime ?? condition.onsetPeriod?.start ?? condition.recordedDate, zone).at
    const recordedAt = readFhirTime(condition.recordedDate, zone).at ?? at
    const topic = conditionTopics.find(candidate => fits(candidate, condition.code))
    if (topic) hints.push({ ...topic.suggests, because: problemList(name), recordedAt })
    if (topic?.id === 'end-stage-kidney-disease') {
      hints.push({ field: 'dialysis', value: 'unknown', because: `${problemList(name)}; whether on dialysis is not said`, recordedAt })
    }
    if (topic?.suggests.field === 'dialysis') hints.push({ field: 'kidneyDisease', value: 'yes', because: problemList(name), recordedAt })
    hints.push(...acute(condition, name, recordedAt ?? at, now), ...pregnancy(condition, name, at ?? recordedAt, now))
  }
  return { lines: [...lines], hints: onePerField(hints) }
}

/** Dialysis sessions among the procedures. */
export function mapDialysisSessions(procedures: readonly ProcedureResource[], { zone, now }: { zone: string, now: string }): ScreeningHint[] {
  const sessions = procedures.flatMap((procedure): ScreeningHint[] => {
    if (!['completed', 'in-progress'].includes(procedure.status ?? '')) return []
    const topic = conditionTopics.find(candidate => candidate.suggests.field === 'dialysis' && fits(candidate, procedure.code))
    const { at } = readFhirTime(procedure.performedDateTime ?? procedure.performedPeriod?.end ?? procedure.performedPeriod?.start, zone)
    const age = daysBetween(at, now)
    if (!topic || age === null || age > dialysisSessionDays) return []
    return [{ ...topic.suggests, because: `Procedure: ${nameOf(procedure.code) ?? 'dialysis'}`, recordedAt: at }]
  })
  return onePerField(sessions.sort((a, b) => (b.recordedAt ?? '').localeCompare(a.recordedAt ?? '')))
}

/** Of several hints for one question the most specific stays; special needs are joined. */
export function onePerField(hints: readonly ScreeningHint[]): ScreeningHint[] {
  const kept = new Map<string, ScreeningHint>()
  for (const hint of hints) {
    const held = kept.get(hint.field)
    if (!held || (held.value === 'unknown' && hint.value !== 'unknown')) kept.set(hint.field, hint)
    else if (held.field === 'specialNeeds' && hint.field === 'specialNeeds') {
      kept.set(hint.field, { ...held, value: [...new Set([...held.value, ...hint.value])], because: `${held.because}; ${hint.because}` })
    }
  }
  return [...kept.values()]
}

function isPresent(condition: ConditionResource): boolean {
  const clinical = condition.clinicalStatus?.coding.find(({ code }) => code)?.code
  const verification = condition.verificationStatus?.coding.find(({ code }) => code)?.code
  if (verification === 'refuted' || verification === 'entered-in-error') return false
  if (clinical !== undefined) return presentStatuses.includes(clinical)
  return condition.abatementDateTime === undefined && condition.abatementPeriod === undefined && condition.abatementBoolean !== true
}

function acute(condition: ConditionResource, name: string | null, at: string | null, now: string): ScreeningHint[] {
  if (!fits(acuteTopic, condition.code)) return []
  const age = daysBetween(at, now)
  const recent = age !== null && age <= acuteDays
  return [{
    field: 'acuteIllness',
    value: recent ? 'yes' : 'unknown',
    because: recent ? problemList(name) : `${problemList(name)}; still listed, ask whether it is over`,
    recordedAt: at,
  }]
}

function pregnancy(condition: ConditionResource, name: string | null, at: string | null, now: string): ScreeningHint[] {
  if (!fits(pregnancyTopic, condition.code)) return []
  const age = daysBetween(at, now)
  const current = age !== null && age <= pregnancyStaleAfterDays
  return [{
    field: 'pregnancy',
    value: current ? 'yes' : 'unknown',
    because: current ? problemList(name) : `${problemList(name)}; noted long ago or without a date, ask`,
    recordedAt: at,
  }]
}

const problemList = (name: string | null): string => `Problem list: ${name ?? 'entry without a name'}`
