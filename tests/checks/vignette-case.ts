import { DateTime } from 'luxon'
import { z } from 'zod'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import { agentIds } from '#shared/domain/contrast/types'
import type { LabReading } from '#shared/domain/kidney/types'
import type { GadoliniumExposure, ScreeningAnswers } from '#shared/domain/safety/types'

/** The moment every case is judged at. */
const now = DateTime.utc(2026, 12, 1, 15)

const iso = (at: DateTime) => at.toJSDate().toISOString()

const lab = z.array(z.object({ value: z.number(), unit: z.string(), daysAgo: z.number() }))
const words = z.union([z.string(), z.number(), z.boolean()]).nullable()

/**
 * A case: a patient as an ordering clinician would enter them. `expectedContrast` is the guidance's answer before any safety
 * finding; `expectedSafety` is prose for a person to compare; `daysAgo` takes hours as fractions of a day.
 */
export const vignetteSchema = z.object({
  id: z.string(),
  age: z.number(),
  sex: z.string().nullish(),
  history: z.string(),
  questionId: z.string(),
  answers: z.record(z.string(), z.string()),
  expectedContrast: z.string(),
  context: z.object({
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
    expectedEgfr: z.number().nullish(),
    expectedEgfrMain: z.number().nullish(),
    expectedEgfrCreatinineOnly: z.number().nullish(),
    expectedEgfrCombined: z.number().nullish(),
    expectedEgfrRange: z.tuple([z.number(), z.number()]).nullish(),
    expectedAkiStage: z.number().nullish(),
  }),
  expectedSafety: z.string().nullish(),
})
export type Vignette = z.infer<typeof vignetteSchema>

function readings(list: z.infer<typeof lab> | null | undefined, analyte: LabReading['analyte']): LabReading[] {
  return (list ?? []).map(({ value, unit, daysAgo }, index) => {
    const at = iso(now.minus({ milliseconds: Math.round(daysAgo * 86_400_000) }))
    return {
      id: `${analyte}-${index}`, analyte, source: 'record', sourceLabel: 'Laboratory', value, comparator: null, unit,
      collectedAt: at, collectedText: at, precision: 'instant', issuedAt: at, status: 'final', refusal: null,
    }
  })
}

/** The birth date that makes the person the stated age when the newest sample was drawn, or now without one. */
function birthDate({ age, context }: Vignette): string {
  const newest = Math.min(...(context.creatinine ?? []).map(entry => entry.daysAgo), ...(context.creatinine?.length ? [] : [0]))
  return iso(now.minus({ days: newest + 1 }).minus({ milliseconds: Math.round((age % 1) * 365.25 * 86_400_000) }).minus({ years: Math.floor(age) })).slice(0, 10)
}

function kidneyAnswers(text: string): Partial<ScreeningAnswers> | null {
  if (/peritoneal/i.test(text)) return { dialysis: 'peritoneal', kidneyDisease: 'yes' }
  if (/no (current )?dialysis|not on dialysis/i.test(text)) return { dialysis: 'none', kidneyDisease: 'yes' }
  if (/ha?emodialysis|on dialysis|dialysis/i.test(text)) return { dialysis: 'hemodialysis', kidneyDisease: 'yes' }
  if (/transplant|single kidney|solitary|nephrectomy|diabet|hypertens|proteinuria/i.test(text)) return { kidneyRiskFactor: 'yes' }
  if (/sepsis|septic|shock|acute|aki|dehydrat/i.test(text)) return { acuteIllness: 'yes' }
  return /ckd|kidney disease|stage/i.test(text) ? { kidneyDisease: 'yes' } : null
}

function pregnancyAnswers(text: string): Partial<ScreeningAnswers> | null {
  if (/breast|lactat|nursing/i.test(text)) return { breastfeeding: 'yes', pregnancy: 'no' }
  if (/^(no|none|false|not pregnant|negative)/i.test(text)) return { pregnancy: 'no' }
  if (/possible|late period|missed|maybe/i.test(text)) return { pregnancy: 'possible' }
  if (/unknown|not known|not asked/i.test(text)) return { pregnancy: 'unknown' }
  return /\d+\s*(weeks?|wk)|pregnan|trimester|^yes|^true/i.test(text) ? { pregnancy: 'yes' } : null
}

function reactionAnswers(text: string): Partial<ScreeningAnswers> | null {
  if (/^(no|none|false)\b/i.test(text)) return { earlierReaction: 'no' }
  if (/asthma/i.test(text) && !/gad|gbca|contrast/i.test(text)) return { asthma: 'yes' }
  const agent = agentIds.find(id => text.toLowerCase().includes(id))
  if (agent === undefined && !/gadolin|gbca|mri contrast|mr contrast/i.test(text)) return null
  const severity = /severe|anaphyla|shock/i.test(text) ? 'severe' : /moderate|wheez|diffuse|facial/i.test(text) ? 'moderate' : /mild|hives|itch|rash/i.test(text) ? 'mild' : 'unknown'
  return {
    earlierReaction: 'yes', reactionAgent: agent ?? 'unknown', reactionSeverity: severity,
    reactionKind: /nausea|vomit|vasovagal|warmth|physiolog/i.test(text) ? 'physiologic' : 'allergic-like',
  }
}

function exposures({ priorGadolinium, priorAgentType, priorGadoliniumHoursAgo }: Vignette['context'], note: (text: string) => void): GadoliniumExposure[] {
  const hours = priorGadoliniumHoursAgo ?? null
  const count = typeof priorGadolinium === 'number' ? priorGadolinium : Number.parseInt(/\d+/.exec(String(priorGadolinium ?? ''))?.[0] ?? (hours === null ? '0' : '1'), 10)
  if (typeof priorGadolinium === 'string' && !/\d/.test(priorGadolinium)) note(`priorGadolinium: ${priorGadolinium}`)
  const agent = typeof priorAgentType === 'string'
    ? agentIds.find(id => priorAgentType.toLowerCase().includes(id)) ?? (/linear/i.test(priorAgentType) ? 'gadodiamide' : /macro/i.test(priorAgentType) ? 'gadobutrol' : null)
    : null
  return Array.from({ length: Math.min(count, 50) }, (_, index) => ({
    id: `dose-${index}`, agent, agentText: String(priorAgentType ?? ''), amountMmol: null, source: 'record',
    givenAt: iso(now.minus({ hours: (hours ?? 24 * 365) + index * 24 * 180 })),
  }))
}

/** Inputs of a case, and what in its free words was not understood. */
export function inputsOf(vignette: Vignette): { inputs: AssessmentInputs, notUnderstood: string[] } {
  const { context } = vignette
  const notUnderstood: string[] = []
  const note = (text: string) => notUnderstood.push(text)
  const read = (key: string, value: z.infer<typeof words> | undefined, reader: (text: string) => Partial<ScreeningAnswers> | null) => {
    if (value === undefined || value === null || value === false) return {}
    const answers = reader(value === true ? 'yes' : String(value))
    if (answers === null) note(`${key}: ${value}`)
    return answers ?? {}
  }
  const female = vignette.sex === 'F'
  const inputs: AssessmentInputs = {
    now: iso(now),
    plannedAt: context.slotInDays == null ? null : iso(now.plus({ milliseconds: Math.round(context.slotInDays * 86_400_000) })),
    questionId: vignette.questionId,
    answers: vignette.answers,
    priority: 'routine',
    setting: 'outpatient',
    patient: {
      birthDate: birthDate(vignette), sex: female ? 'female' : vignette.sex === 'M' ? 'male' : 'unknown',
      weightKg: context.weightKg ?? (vignette.age >= 18 ? 75 : null), weightAt: null, heightCm: context.heightCm ?? null, heightAt: null,
    },
    readings: [...readings(context.creatinine, 'creatinine'), ...readings(context.cystatinC, 'cystatin-c')],
    record: { state: 'complete', readAt: iso(now) },
    screening: {
      kidneyDisease: 'no', kidneyRiskFactor: 'no', dialysis: 'none', nextDialysisAt: null, acuteIllness: 'no', liverDisease: 'no',
      earlierReaction: 'no', reactionAgent: null, reactionKind: null, reactionSeverity: null, asthma: 'no', pregnancy: 'no',
      breastfeeding: 'no', nephrogenicSystemicFibrosis: 'no', implants: 'no', implantDetail: '', specialNeeds: [],
      ...read('kidney', context.kidney, kidneyAnswers),
      ...read('pregnancy', context.pregnancy, pregnancyAnswers),
      ...read('allergy', context.allergy, reactionAnswers),
    },
    exposures: exposures(context, note),
  }
  if (context.bilirubinMgDl != null) note(`bilirubinMgDl: ${context.bilirubinMgDl}`)
  return { inputs, notUnderstood }
}
