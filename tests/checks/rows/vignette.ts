import { DateTime } from 'luxon'
import { z } from 'zod'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import type { AgentId } from '#shared/domain/contrast/types'
import type { LabReading, Sex } from '#shared/domain/kidney/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import type { GadoliniumExposure } from '#shared/domain/safety/types'
import { agentNamed, earlierDoses, kidneyAnswers, plain, pregnancyAnswers, reactionAnswers } from './vignette-words'
import type { Answered } from './vignette-words'

/** The moment every case is judged at. */
const now = DateTime.fromISO('2026-12-01T09:00', { zone: starterPolicy.department.timeZone })
const dayMs = 86_400_000
const iso = (at: DateTime) => at.toJSDate().toISOString()

const lab = z.array(z.object({ value: z.number().nullish(), unit: z.string().nullish(), daysAgo: z.number().nullish() }))
/** Words, a number or yes and no; what else may stand there is listed as not understood. */
const words = z.unknown()
const answer = z.union([z.string(), z.boolean().transform(value => (value ? 'yes' : 'no')), z.number().transform(String)])

/** A case, described in DEVELOPERS.md. */
export const vignetteSchema = z.object({
  id: z.union([z.string(), z.number().transform(String)]),
  age: z.number().min(0).max(130),
  sex: z.string().nullish(),
  history: z.string().nullish(),
  region: z.string().nullish(),
  questionId: z.string(),
  answers: z.record(z.string(), answer.nullable()).nullish(),
  expectedContrast: z.string(),
  context: z.looseObject({
    creatinine: lab.nullish(),
    cystatinC: lab.nullish(),
    kidney: words.optional(),
    pregnancy: words.optional(),
    allergy: words.optional(),
    priorGadolinium: words.optional(),
    priorAgentType: words.optional(),
    priorGadoliniumHoursAgo: z.number().nullish(),
    heightCm: z.number().nullish(),
    weightKg: z.number().nullish(),
    bilirubinMgDl: z.number().nullish(),
    slotInDays: z.number().nullish(),
    equation: z.string().nullish(),
    expectedEgfr: z.number().nullish(),
    expectedEgfrMain: z.number().nullish(),
    expectedEgfrCreatinineOnly: z.number().nullish(),
    expectedEgfrCombined: z.number().nullish(),
    expectedEgfrRange: z.tuple([z.number(), z.number()]).nullish(),
    expectedAkiStage: z.number().nullish(),
  }).nullish(),
  expectedSafety: z.string().nullish(),
  arguable: z.unknown().optional(),
})
export type Vignette = z.infer<typeof vignetteSchema>
type Context = NonNullable<Vignette['context']>

const contextKeys = new Set([
  'creatinine', 'cystatinC', 'kidney', 'pregnancy', 'allergy', 'priorGadolinium', 'priorAgentType', 'priorGadoliniumHoursAgo', 'heightCm', 'weightKg',
  'bilirubinMgDl', 'slotInDays', 'equation', 'expectedEgfr', 'expectedEgfrMain', 'expectedEgfrCreatinineOnly', 'expectedEgfrCombined', 'expectedEgfrRange',
  'expectedAkiStage',
])

function readings(list: Context['creatinine'], analyte: LabReading['analyte']): LabReading[] {
  return (list ?? []).map(({ value, unit, daysAgo }, index) => {
    const at = daysAgo == null ? null : iso(now.minus({ milliseconds: Math.round(daysAgo * dayMs) }))
    return {
      id: `${analyte}-${index}`, analyte, source: 'record', sourceLabel: 'Laboratory', value: value ?? null, comparator: null, unit: unit ?? null,
      collectedAt: at, collectedText: at, precision: at === null ? 'unknown' : 'instant', issuedAt: at, status: 'final', refusal: null,
    }
  })
}

/**
 * The birth date that makes the person exactly the stated age when the newest creatinine was drawn, or now without one: the
 * expected eGFR was worked out for that age.
 */
function birthDate(age: number, { creatinine }: Context): string {
  const ages = (creatinine ?? []).flatMap(({ daysAgo }) => daysAgo ?? [])
  const at = now.minus({ milliseconds: Math.round((ages.length > 0 ? Math.min(...ages) : 0) * dayMs) })
  // A part of a year must not round up to the next birthday. Some parts are a hair below a whole day in floating point.
  const days = Math.min(364, Math.floor((age % 1) * 365.25 + 1e-6))
  return at.minus({ years: Math.floor(age) }).minus({ days }).toFormat('yyyy-MM-dd')
}

function sexOf(text: string | null | undefined): Sex {
  switch (plain(text ?? '').trim()) {
    case 'f': case 'female': case 'woman': case 'girl': return 'female'
    case 'm': case 'male': case 'man': case 'boy': return 'male'
    case 'x': case 'o': case 'd': case 'other': case 'diverse': case 'non-binary': case 'nonbinary': return 'other'
    default: return 'unknown'
  }
}

/** A stand-in of the same structure where only that is known: what follows from an earlier dose looks at nothing else. */
function agentOfType(text: string): AgentId | null {
  return agentNamed(text) ?? (/macro/.test(plain(text)) ? 'gadobutrol' : /linear/.test(plain(text)) ? 'gadodiamide' : null)
}

function textOf(value: unknown): string | null {
  if (value === null || value === undefined || value === false || value === '') return null
  if (value === true) return 'yes'
  if (Array.isArray(value)) return value.map(textOf).filter(text => text !== null).join('; ')
  return typeof value === 'string' || typeof value === 'number' ? String(value) : JSON.stringify(value)
}

type Note = (key: string, value: unknown) => void

function exposures({ priorGadolinium, priorAgentType, priorGadoliniumHoursAgo }: Context, note: Note): GadoliniumExposure[] {
  const given = textOf(priorGadolinium)
  const type = textOf(priorAgentType)
  const read = given === null ? null : earlierDoses(given)
  const typeText = type ?? given ?? ''
  const agent = agentOfType(typeText)
  if (given !== null && read === null && agent === null) note('priorGadolinium', given)
  if (type !== null && agent === null && !/^(none|unknown|not known|n\/a)$/i.test(type)) note('priorAgentType', type)
  const hours = priorGadoliniumHoursAgo ?? read?.hoursAgo ?? null
  const named = agent !== null || hours !== null
  const count = given === null ? (named ? 1 : 0) : read?.count ?? (named ? 1 : 0)
  return Array.from({ length: Math.min(Math.round(count), 100) }, (_, index) => ({
    id: `dose-${index}`, agent, agentText: typeText, amountMmol: null, source: 'record',
    givenAt: iso(now.minus({ hours: (hours ?? 24 * 365) + index * 24 * 180 })),
  }))
}

/**
 * Inputs of a case, and what in it was not understood. What a case leaves out is answered without a risk; an adult without a
 * weight has 75 kg, so that the missing weight does not hide what the case is about.
 */
export function inputsOf(vignette: Vignette): { inputs: AssessmentInputs, notUnderstood: string[] } {
  const context: Context = vignette.context ?? {}
  const notUnderstood: string[] = []
  const note: Note = (key, value) => notUnderstood.push(`${key}: ${typeof value === 'string' ? value : JSON.stringify(value)}`)
  for (const key of Object.keys(context)) if (!contextKeys.has(key)) note(key, context[key])
  const read = (key: string, value: unknown, reader: (text: string) => Answered) => {
    const text = textOf(value)
    if (text === null) return {}
    const answers = reader(text)
    if (answers === null) note(key, text)
    return answers ?? {}
  }
  const sex = sexOf(vignette.sex)
  // Above 3 mg/dL the liver takes up its agent poorly. Source: US prescribing information, gadoxetate.
  const liver = context.bilirubinMgDl != null && context.bilirubinMgDl > 3 ? { liverDisease: 'yes' as const } : {}
  const inputs: AssessmentInputs = {
    now: iso(now),
    plannedAt: context.slotInDays == null ? null : iso(now.plus({ milliseconds: Math.round(context.slotInDays * dayMs) })),
    questionId: vignette.questionId,
    answers: Object.fromEntries(Object.entries(vignette.answers ?? {}).flatMap(([decider, value]) => (value === null ? [] : [[decider, value]]))),
    priority: 'routine',
    setting: 'outpatient',
    patient: {
      birthDate: birthDate(vignette.age, context), sex,
      weightKg: context.weightKg ?? (vignette.age >= 18 ? 75 : null), weightAt: null, heightCm: context.heightCm ?? null, heightAt: null,
    },
    readings: [...readings(context.creatinine, 'creatinine'), ...readings(context.cystatinC, 'cystatin-c')],
    record: { state: 'complete', readAt: iso(now) },
    screening: {
      kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', nextDialysisAt: null, acuteIllness: 'no', liverDisease: 'no',
      earlierReaction: 'no', reactionAgent: null, reactionKind: null, reactionSeverity: null, asthma: 'no', pregnancy: 'no',
      breastfeeding: 'no', nephrogenicSystemicFibrosis: 'no', implants: 'no', implantDetail: '', specialNeeds: [],
      ...read('kidney', context.kidney, kidneyAnswers),
      ...liver,
      ...read('pregnancy', context.pregnancy, pregnancyAnswers),
      ...read('allergy', context.allergy, reactionAnswers),
    },
    exposures: exposures(context, note),
  }
  return { inputs, notUnderstood }
}
