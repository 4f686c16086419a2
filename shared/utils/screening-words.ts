import type { ScreeningQuestion } from '../domain/safety/screening'
import type { ScreeningAnswers } from '../domain/safety/types'
import { starterAgents } from '../domain/contrast/agents'

export interface ScreeningWords {
  /** The question as the clinician reads it. */
  ask: string
  help?: string
  /** A few words for a summary. */
  short: string
  options: readonly { value: string, label: string }[]
}

const yesNoUnknown = [
  { value: 'yes', label: 'Yes' },
  { value: 'no', label: 'No' },
  { value: 'unknown', label: 'Not known' },
] as const

/** Safety questions in the words a clinician reads, with every answer. */
export const screeningWords: Record<Exclude<ScreeningQuestion, 'nextDialysisAt'>, ScreeningWords> = {
  kidneyDisease: { ask: 'Known kidney disease?', short: 'Kidney disease', options: yesNoUnknown },
  kidneyRiskFactor: {
    ask: 'Any risk factor for kidney disease?',
    help: 'Treated high blood pressure, diabetes, gout, protein in the urine, a single kidney, kidney surgery or transplant.',
    short: 'Kidney risk factor',
    options: yesNoUnknown,
  },
  dialysis: {
    ask: 'On dialysis?',
    short: 'Dialysis',
    options: [
      { value: 'none', label: 'No' },
      { value: 'hemodialysis', label: 'Hemodialysis' },
      { value: 'peritoneal', label: 'Peritoneal dialysis' },
      { value: 'unknown', label: 'Not known' },
    ],
  },
  nephrogenicSystemicFibrosis: { ask: 'Nephrogenic systemic fibrosis, now or before?', short: 'Nephrogenic systemic fibrosis', options: yesNoUnknown },
  acuteIllness: {
    ask: 'Acutely ill in the last 7 days?',
    help: 'Acute illness, sepsis, dehydration or surgery: kidney function may be falling faster than the last sample shows.',
    short: 'Acute illness',
    options: yesNoUnknown,
  },
  liverDisease: { ask: 'Liver disease?', help: 'Cirrhosis, a liver transplant or one planned.', short: 'Liver disease', options: yesNoUnknown },
  earlierReaction: { ask: 'An earlier reaction to a gadolinium agent?', help: 'An iodinated agent is something else and does not count here.', short: 'Earlier reaction', options: yesNoUnknown },
  reactionAgent: {
    ask: 'To which agent?',
    short: 'Agent of the reaction',
    options: [...starterAgents.map(agent => ({ value: agent.id, label: agent.name })), { value: 'unknown', label: 'Not known' }],
  },
  reactionKind: {
    ask: 'What kind of reaction?',
    help: 'Allergic-like: hives, swelling, wheeze, a fall in blood pressure with these. Physiologic: nausea, warmth, a vasovagal faint.',
    short: 'Kind of reaction',
    options: [
      { value: 'allergic-like', label: 'Allergic-like' },
      { value: 'physiologic', label: 'Physiologic' },
      { value: 'unknown', label: 'Not known' },
    ],
  },
  reactionSeverity: {
    ask: 'How severe was it?',
    short: 'Severity of the reaction',
    options: [
      { value: 'mild', label: 'Mild' },
      { value: 'moderate', label: 'Moderate' },
      { value: 'severe', label: 'Severe' },
      { value: 'unknown', label: 'Not known' },
    ],
  },
  asthma: { ask: 'Asthma?', short: 'Asthma', options: yesNoUnknown },
  pregnancy: {
    ask: 'Pregnant?',
    short: 'Pregnancy',
    options: [
      { value: 'no', label: 'No' },
      { value: 'yes', label: 'Yes' },
      { value: 'possible', label: 'Possible' },
      { value: 'unknown', label: 'Not known' },
    ],
  },
  breastfeeding: { ask: 'Breastfeeding?', short: 'Breastfeeding', options: yesNoUnknown },
  implants: {
    ask: 'Pacemaker, pump, clip, other implant or metal in the body?',
    help: 'Passed on to MR safety, who judge it.',
    short: 'Implants or metal',
    options: yesNoUnknown,
  },
}

/** Things the team must prepare for. */
export const specialNeedWords = {
  'interpreter': 'Interpreter',
  'wheelchair': 'Wheelchair or lift',
  'claustrophobia': 'Claustrophobia',
  'sedation': 'Sedation or anesthesia',
  'cannot-consent': 'Cannot consent alone',
  'hard-iv-access': 'Hard to place an IV',
} as const satisfies Record<ScreeningAnswers['specialNeeds'][number], string>

/** The words of an answer, "Not answered" while it is open. */
export function answerWords(question: Exclude<ScreeningQuestion, 'nextDialysisAt'>, value: string | null): string {
  if (value === null) return 'Not answered'
  if (value === 'not-applicable') return 'Does not apply'
  return screeningWords[question].options.find(option => option.value === value)?.label ?? value
}
