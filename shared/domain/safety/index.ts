import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { findBreastfeeding } from './breastfeeding'
import { findChild } from './child'
import { findConditions } from './condition'
import { findDialysis } from './dialysis'
import { findExposure } from './exposure'
import { findHistory } from './history'
import { findImplants } from './implant'
import { findKidney } from './kidney'
import { findPregnancy } from './pregnancy'
import { findReactions } from './reaction'
import { findingSeverities } from './types'
import { findWeight } from './weight'

const topics = [
  findReactions, findPregnancy, findConditions, findDialysis, findKidney, findChild, findHistory,
  findExposure, findWeight, findBreastfeeding, findImplants,
]

/**
 * Every safety finding for one exam and patient, gravest first; within a severity in the order of the topics above.
 * Only pregnancy and implants speak where no contrast is in the answer.
 */
export function findSafety(context: SafetyContext): SafetyFinding[] {
  const rank = (found: SafetyFinding) => findingSeverities.indexOf(found.severity)
  return topics.flatMap(topic => topic(context)).sort((a, b) => rank(b) - rank(a))
}
