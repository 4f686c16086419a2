import type { SafetyContext } from './context'
import type { SafetyFinding } from './types'
import type { KidneyFunction } from '../kidney/types'
import type { Policy } from '../policy/types'
import { countsAsBelow } from '../kidney/evaluate'
import { isAcute } from '../kidney/injury'
import { cannotWait, groupOneAgents, mayBeIntravenous } from './context'
import { finding } from './finding'
import { safetySources } from './sources'

/** Below this eGFR, mL/min/1.73 m², ACR group I agents are contraindicated whatever the department's own hold. */
const groupOneLimit = 30

/** The published position a department follows, inside a sentence. */
const positionWords = {
  label: 'the US labels', acr: 'the ACR with a hold of its own', esur: 'the ESUR with a hold of its own', local: 'its own rule',
} as const satisfies Record<Policy['kidneyPosition']['value'], string>

/** Whether kidney function alone holds contrast by vein for a radiologist: below the department's hold, on dialysis, or unsteady. */
export function kidneyHeld(kidney: KidneyFunction, policy: Policy): boolean {
  return countsAsBelow(kidney, policy.holdBelowEgfr.value)
}

/**
 * Kidney function for an agent given by vein: the department's hold, injury, and what to do while it is not known.
 * A joint needs none of it: the gadolinium there is a hundredth of a dose by vein.
 */
export function findKidney(context: SafetyContext): SafetyFinding[] {
  if (context.outcome === 'intra-articular') {
    return [finding({
      id: 'kidney-joint-not-needed', topic: 'kidney', severity: 'info',
      text: 'Kidney function does not decide an injection into a joint: the amount of gadolinium is about a hundredth of a dose by vein.',
      plain: 'The amount in the joint is tiny. You do not need a kidney test for it.',
      source: safetySources.joints,
    })]
  }
  if (!mayBeIntravenous(context) || context.kidney.status === 'dialysis') return []
  return [...findInjury(context), ...findLevel(context), ...findMissing(context)]
}

function findInjury(context: SafetyContext): SafetyFinding[] {
  if (isAcute(context.kidney.injury)) {
    return [finding({
      id: 'kidney-unsteady', topic: 'kidney', severity: 'hold',
      text: 'Creatinine is not steady or shows acute injury, so eGFR misleads: treated like an eGFR below 30 until a radiologist says otherwise.',
      plain: 'Your kidney tests have changed recently. A doctor decides about contrast first.',
      addsNeeds: ['radiologist-word'], barsAgents: groupOneAgents(context), asksRadiologist: true,
      source: safetySources.kdigoInjury,
    })]
  }
  const ill = context.setting !== 'outpatient' || context.screening.acuteIllness === 'yes' || context.screening.acuteIllness === 'unknown'
  if (ill && context.kidney.creatinine !== null && context.kidney.injury.status === 'insufficient') {
    return [finding({
      id: 'kidney-injury-not-judged', topic: 'kidney', severity: 'caution',
      text: 'The patient is in hospital or may be acutely ill, and the results do not suffice to judge acute kidney injury: a person judges it before contrast.',
      plain: 'You may be ill just now. A doctor checks your kidney tests before contrast.',
      addsNeeds: ['radiologist-word'], asksRadiologist: true,
      source: safetySources.kdigoInjury,
    })]
  }
  return []
}

function findLevel(context: SafetyContext): SafetyFinding[] {
  const gate = context.kidney.gateEgfr
  if (gate === null || isAcute(context.kidney.injury)) return []
  const hold = context.policy.holdBelowEgfr.value
  if (gate < hold) {
    // Of a range, a bound or two estimates the lowest counts; the words must not claim that it is the true one.
    const open = (context.kidney.egfr?.value ?? context.kidney.range?.high.value ?? gate) >= hold
    const level = open ? `eGFR may be below ${hold} and counts as such` : context.kidney.currency === 'too-old' ? `The last eGFR was below ${hold}` : `eGFR is below ${hold}`
    return [finding({
      id: 'kidney-below-hold', topic: 'kidney', severity: 'hold',
      text: `${level}: the department, following ${positionWords[context.policy.kidneyPosition.value]}, holds contrast for a radiologist's word. `
        + 'Group I agents are barred; one standard dose at most. US labels advise against contrast here unless it is essential; the ACR and the National Kidney Foundation report no NSF in '
        + '4,931 group II doses below 30, and that holding back may harm more.',
      plain: `Your kidneys ${open ? 'may work' : 'work'} less well. A doctor decides about contrast first.`,
      addsNeeds: ['radiologist-word'], barsAgents: groupOneAgents(context), asksRadiologist: true,
      source: safetySources.acrNkf,
    })]
  }
  if (gate < groupOneLimit) {
    return [finding({
      id: 'kidney-group-one-barred', topic: 'kidney', severity: 'caution',
      text: `eGFR is below ${groupOneLimit}: group I agents are barred; at most one full dose in this exam.`,
      plain: 'Your kidneys work less well. We use a type of contrast that suits this.',
      barsAgents: groupOneAgents(context),
      source: safetySources.acrNkf,
    })]
  }
  if (gate < 60) {
    return [finding({
      id: 'kidney-30-to-59', topic: 'kidney', severity: 'info',
      text: 'eGFR between 30 and 59: no reason found to hold a group II agent at a standard dose. The creatinine has to be recent.',
      plain: 'Your kidneys work a little less well. That is no reason to leave contrast out.',
      source: safetySources.acrNkf,
    })]
  }
  return []
}

function findMissing(context: SafetyContext): SafetyFinding[] {
  const { kidney } = context
  const open = kidney.currency === 'missing' || kidney.currency === 'too-old'
  const findings: SafetyFinding[] = []
  if (open || kidney.gateEgfr === null) {
    findings.push(finding({
      id: 'kidney-group-one-without-value', topic: 'kidney', severity: 'info',
      text: 'Without a current eGFR, group I agents are barred.',
      plain: 'We use a type of contrast that is kept for all kidney levels.',
      barsAgents: groupOneAgents(context),
      source: safetySources.acrManual,
    }))
  }
  if (kidney.status === 'needs-height') {
    findings.push(finding({
      id: 'kidney-needs-height', topic: 'kidney', severity: 'caution',
      text: 'A child\'s eGFR needs a height: none was found, so no number is shown.',
      plain: 'We need to measure how tall your child is.',
      addsNeeds: ['height'],
      source: { title: 'CKiD U25 creatinine equation, Kidney Int 99:948', body: 'CKiD study', year: 2021, status: 'confirmed' },
    }))
  }
  if (!open) return findings
  if (cannotWait(context)) {
    findings.push(finding({
      id: 'kidney-unknown-urgent', topic: 'kidney', severity: 'caution',
      text: `${kidney.headline}. The exam may not be able to wait: a radiologist's word can stand in for a new result. Draw blood on arrival all the same.`,
      plain: 'Your scan is urgent. A doctor decides if it can start before the blood test.',
      addsNeeds: ['creatinine', 'radiologist-word'], asksRadiologist: true,
      source: context.policy.creatinineWindowDays.source,
    }))
  }
  else {
    findings.push(finding({
      id: kidney.currency === 'too-old' ? 'kidney-creatinine-too-old' : 'kidney-creatinine-missing', topic: 'kidney', severity: 'caution',
      text: `${kidney.headline}. A new result is needed first: missing is not normal.`,
      plain: 'You need a blood test to check your kidneys before the scan.',
      addsNeeds: ['creatinine'],
      source: context.policy.creatinineWindowDays.source,
    }))
  }
  return findings
}
