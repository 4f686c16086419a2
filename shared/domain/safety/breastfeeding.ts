import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** Breastfeeding informs only: no interruption is needed. */
export function findBreastfeeding(context: SafetyContext): SafetyFinding[] {
  if (!mayUseContrast(context) || context.screening.breastfeeding !== 'yes') return []
  return [finding({
    id: 'breastfeeding-yes', topic: 'breastfeeding', severity: 'info',
    text: 'Breastfeeding: no interruption is needed; the infant takes up less than 0.0004 % of the dose. A mother who prefers may pump and discard the milk for up to 24 hours.',
    plain: 'You can keep on breastfeeding. If you prefer, you may pump and throw away the milk for one day.',
    source: safetySources.acrLactation,
  })]
}
