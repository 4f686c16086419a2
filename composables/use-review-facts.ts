import { answerLabel } from '#shared/domain/guidance/deciders'
import type { Guidance } from '#shared/domain/guidance/types'
import type { RequestView } from '#shared/types/views'

export interface Fact { label: string, value: string, detail?: string, tone?: 'stop' | 'flare' }

/** How loudly a queue line about the kidneys is written; its words say the same. */
export function kidneyTone(line: string | null): 'stop' | 'flare' | 'plain' {
  if (line === null) return 'plain'
  if (/dialysis|acute|injury|not steady/i.test(line)) return 'stop'
  const figure = /eGFR\s*<?\s*(\d+(?:\.\d+)?)/.exec(line)?.[1]
  if (figure !== undefined) return Number(figure) < 30 ? 'stop' : 'plain'
  return /old|no creatinine|could not|missing|unknown/i.test(line) ? 'flare' : 'plain'
}

/** The clinical question's deciders with the clinician's answers. Without the guidance at hand the stored words are shown. */
export function answeredDeciders(view: Pick<RequestView, 'form'>, guidance: Guidance | null): Fact[] {
  const question = guidance?.questions.find(candidate => candidate.id === view.form.questionId) ?? null
  if (question === null) {
    return Object.entries(view.form.answers).map(([id, value]) => ({ label: spelledOut(id), value: spelledOut(value) }))
  }
  return question.deciders.map((decider) => {
    const value = view.form.answers[decider.id]
    return { label: decider.ask, value: value === undefined ? 'Not answered' : answerLabel(decider, value) }
  })
}

/** `tumorInfection` and `two-or-more` as words. */
function spelledOut(id: string): string {
  const words = id.replace(/([a-z])([A-Z])/g, '$1 $2').replace(/[-_]+/g, ' ').toLowerCase()
  return words.charAt(0).toUpperCase() + words.slice(1)
}

const needWords = {
  'interpreter': 'interpreter', 'wheelchair': 'wheelchair', 'claustrophobia': 'claustrophobia', 'sedation': 'sedation',
  'cannot-consent': 'cannot consent', 'hard-iv-access': 'hard IV access',
} as const

/** What else a radiologist scans for: weight, earlier gadolinium, reactions, MR safety. `day` writes a date in the department's zone. */
export function patientFacts(view: Pick<RequestView, 'form' | 'record' | 'ledger'>, day: (iso: string) => string): Fact[] {
  const { screening, specialNeeds } = { screening: view.form.screening, specialNeeds: view.form.screening.specialNeeds }
  const facts: Fact[] = [weightFact(view, day), exposureFact(view, day), reactionFact(view), implantFact(view)]
  if (screening.pregnancy !== null && screening.pregnancy !== 'not-applicable') {
    facts.push({ label: 'Pregnancy', value: known(screening.pregnancy), ...(screening.pregnancy === 'no' ? {} : { tone: 'flare' as const }) })
  }
  if (specialNeeds.length > 0) facts.push({ label: 'Special needs', value: sentenceCase(specialNeeds.map(need => needWords[need]).join(', ')) })
  return facts
}

function weightFact({ form, record }: Pick<RequestView, 'form' | 'record'>, day: (iso: string) => string): Fact {
  if (form.weightKg !== null) return { label: 'Weight', value: `${form.weightKg} kg`, detail: 'given with the request' }
  if (record?.weight) return { label: 'Weight', value: `${record.weight.kg} kg`, detail: `record, ${day(record.weight.at)}` }
  return { label: 'Weight', value: 'Not known', tone: 'flare' }
}

function exposureFact({ record, ledger }: Pick<RequestView, 'record' | 'ledger'>, day: (iso: string) => string): Fact {
  const all = [...(record?.exposures ?? []), ...ledger].sort((a, b) => b.givenAt.localeCompare(a.givenAt))
  const newest = all[0]
  const looked = record !== null && record.parts.exposures.state !== 'could-not-look'
  if (!newest) return { label: 'Earlier gadolinium', value: looked ? 'None found' : 'Could not look', ...(looked ? {} : { tone: 'flare' as const }) }
  return { label: 'Earlier gadolinium', value: all.length === 1 ? '1 dose' : `${all.length} doses`, detail: `${newest.agentText}, ${day(newest.givenAt)}` }
}

function reactionFact({ form, record }: Pick<RequestView, 'form' | 'record'>): Fact {
  const { earlierReaction, reactionSeverity, reactionKind } = form.screening
  const detail = record?.allergies[0]
  if (earlierReaction === 'yes') {
    const words = [reactionSeverity, reactionKind].filter(part => part !== null && part !== 'unknown').join(', ')
    return { label: 'Reactions to gadolinium', value: sentenceCase(words || 'yes, not described'), ...(detail ? { detail } : {}), tone: 'stop' }
  }
  if (earlierReaction === 'no') return { label: 'Reactions to gadolinium', value: 'None known', ...(detail ? { detail: `Record: ${detail}` } : {}) }
  return { label: 'Reactions to gadolinium', value: earlierReaction === 'unknown' ? 'Not known' : 'Not answered', tone: 'flare' }
}

function implantFact({ form }: Pick<RequestView, 'form'>): Fact {
  const { implants, implantDetail } = form.screening
  if (implants === 'yes') return { label: 'MR safety', value: implantDetail || 'Implant or metal declared', tone: 'stop' }
  if (implants === 'no') return { label: 'MR safety', value: 'Nothing declared' }
  return { label: 'MR safety', value: implants === 'unknown' ? 'Not known' : 'Not answered', tone: 'flare' }
}

function known(value: string): string {
  return value === 'unknown' ? 'Not known' : sentenceCase(value)
}

function sentenceCase(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
