import type { Assessment } from './types'
import { isIntravenous } from '../contrast/outcome'
import { isAcute } from '../kidney/injury'

/**
 * What a reader scans a list for: the kidney figure, or why there is none. A number stands alone here, without its cautions,
 * so that none is given while creatinine is not steady (KDIGO 2012: creatinine lags behind kidney function by days).
 */
export function kidneyLine({ kidney, suggestion, findings }: Pick<Assessment, 'kidney' | 'suggestion' | 'findings'>): string {
  if (kidney.status === 'dialysis') return 'dialysis'
  if (suggestion !== null && suggestion !== 'discuss' && !isIntravenous(suggestion)) return 'no lab needed'
  if (kidney.injury.status === 'aki' || kidney.injury.status === 'aki-presumed') return 'acute kidney injury'
  if (isAcute(kidney.injury)) return 'creatinine not steady'
  if (findings.some(found => found.id === 'child-under-one')) return 'under 1 year'
  if (kidney.currency === 'too-old' && kidney.creatinine) return `lab ${kidney.creatinine.ageDays} days old`
  if (kidney.egfr) return `eGFR ${kidney.egfr.display}`
  if (kidney.range) return `eGFR ${kidney.range.low.display} to ${kidney.range.high.display}`
  switch (kidney.status) {
    case 'no-creatinine': return kidney.currency === 'not-needed' ? 'no lab needed' : 'no creatinine'
    case 'could-not-look': return 'record not reachable'
    case 'needs-height': return 'height needed'
    case 'needs-sex': return 'sex needed'
    case 'no-equation': return 'under 1 year'
    default: return 'kidney function not known'
  }
}

/** Lines that a department watches like a low eGFR, which has no number to filter by. */
export const watchedKidneyLines = ['dialysis', 'acute kidney injury', 'creatinine not steady'] as const
