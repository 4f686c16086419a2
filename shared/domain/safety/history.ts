import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import { groupOneAgents, mayUseContrast } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** A patient who can't give a history, and a hospital record that could not be read to its end. */
export function findHistory(context: SafetyContext): SafetyFinding[] {
  if (!mayUseContrast(context)) return []
  const findings: SafetyFinding[] = []
  const { screening } = context
  const reactionOpen = screening.earlierReaction === null || screening.earlierReaction === 'unknown'
  if (screening.specialNeeds.includes('cannot-consent') && reactionOpen) {
    findings.push(finding({
      id: 'history-not-obtainable', topic: 'history', severity: 'hold',
      text: 'The patient cannot give a history and no earlier reaction is on record: unknown, not none. A group II macrocyclic agent, MR safety cleared by records or '
        + 'relatives, two people check; life-saving imaging goes ahead on the radiologist\'s word.',
      plain: 'You could not tell us your history. The doctors decide with what is on record.',
      addsNeeds: ['radiologist-word', 'implant-clearance'], barsAgents: groupOneAgents(context), asksRadiologist: true,
      source: safetySources.practice,
    }))
  }
  if (context.recordState === 'incomplete' || context.recordState === 'unreachable') {
    findings.push(finding({
      id: context.recordState === 'unreachable' ? 'history-record-unreachable' : 'history-record-incomplete', topic: 'history', severity: 'info',
      text: context.recordState === 'unreachable'
        ? 'The hospital record could not be read: results, doses and reactions in it are not known, which is not the same as none.'
        : 'The hospital record was not read to its end: more results, doses or reactions may exist.',
      plain: 'We could not see your whole record. Please tell us about earlier reactions or kidney illness.',
      source: safetySources.practice,
    }))
  }
  return findings
}
