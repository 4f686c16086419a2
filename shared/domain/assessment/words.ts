import type { NeedKind } from './needs'

/** A number of days as people say it: "6 weeks" for 42, "2 days" for 2. */
export function windowWords(days: number): string {
  if (days >= 14 && days % 7 === 0 && days <= 84) return `${days / 7} weeks`
  return days === 1 ? '1 day' : `${days} days`
}

/** The same before a noun: "6-week window". */
export function windowAdjective(days: number): string {
  return windowWords(days).replace(' weeks', '-week').replace(/ days?$/, '-day')
}

/** "a, b and c". */
export function listed(parts: readonly string[]): string {
  if (parts.length < 2) return parts[0] ?? ''
  return `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`
}

/** A need inside a sentence. */
export const needWords = {
  'creatinine': 'a new creatinine',
  'iv-start': 'an IV start',
  'pregnancy-answer': 'an answer on pregnancy',
  'weight': 'a weight',
  'height': 'a height',
  'premedication': 'premedication',
  'dialysis-after': 'dialysis after the exam',
  'radiologist-word': 'a radiologist\'s word',
  'reaction-history': 'the reaction\'s history',
  'medication-guide': 'the Medication Guide',
  'implant-clearance': 'clearance of the implant',
  'interpreter': 'an interpreter',
  'sedation': 'sedation',
  'radiologist-present': 'a radiologist in the room',
  'observation': 'observation afterward',
} as const satisfies Record<NeedKind, string>
