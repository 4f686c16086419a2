import { DateTime } from 'luxon'
import type { LetterSection } from './types'
import type { Need } from '../assessment/needs'
import type { Assessment } from '../assessment/types'
import type { DecidableOutcome } from '../contrast/outcome'
import type { Policy } from '../policy/types'
import { plainNeed } from '../assessment/plain-needs'
import { isIntravenous } from '../contrast/outcome'
import { kidneyHeld } from '../safety/kidney'

/** On every letter, page and printout. */
export const caution = 'This page explains a decision made by your imaging doctors. It does not replace their advice.'

/** When and where the scan takes place; `startsAt` is an ISO instant. */
export interface LetterSlot { startsAt: string, place: string }

/** What a letter takes from the assessment. */
export type LetterAssessment = Pick<Assessment, 'plain' | 'suggestion' | 'guidance' | 'kidney' | 'findings'>

function section(id: LetterSection['id'], heading: string, paragraphs: string[], items: string[] = []): LetterSection {
  return { id, heading, paragraphs, items }
}

/** A day as patients read it, in the department's zone: "Wednesday, December 2". */
export function dayWords(at: string, policy: Policy): string {
  return DateTime.fromISO(at, { zone: policy.department.timeZone }).setLocale('en-US').toFormat('cccc, LLLL d')
}

function timeWords(at: string, policy: Policy): string {
  return DateTime.fromISO(at, { zone: policy.department.timeZone }).setLocale('en-US').toFormat('h:mm a').toLowerCase()
}

/**
 * Why this contrast, for the patient. Where the radiologist chose otherwise than suggested, the suggestion's
 * reason would explain the wrong scan, so that the doctor's choice is named instead.
 */
export function whyParagraphs(assessment: LetterAssessment, contrast: DecidableOutcome): string[] {
  if (assessment.suggestion === contrast && assessment.plain.why !== '') return [assessment.plain.why]
  if (contrast === 'none') return ['A doctor looked at your case. They chose to do the scan without contrast.']
  const chosen = 'A doctor looked at your case. They chose to do the scan with contrast.'
  return isPregnant(assessment) ? [chosen, 'You are pregnant. Your doctors agreed that contrast is needed.'] : [chosen]
}

/** Whether the patient is known to be pregnant and contrast was judged all the same. */
export function isPregnant({ findings }: Pick<LetterAssessment, 'findings'>): boolean {
  return findings.some(found => found.id === 'pregnancy-yes')
}

/** Whether the kidneys are weak, or have to be taken as weak while it is not known if the patient has dialysis. */
function kidneysWeak({ kidney, findings }: LetterAssessment, policy: Policy): boolean {
  return kidneyHeld(kidney, policy) || findings.some(found => found.id === 'dialysis-unknown')
}

/** What to do before: what the needs ask, the blood test at hand, and food. */
export function beforeSection(contrast: DecidableOutcome, assessment: LetterAssessment, needs: readonly Need[], policy: Policy): LetterSection {
  const items = [...new Set(needs.flatMap(need => plainNeed(need.kind, { findings: assessment.findings, suggestion: contrast }) ?? []))]
  const paragraphs: string[] = []
  if (contrast === 'none') paragraphs.push('You get no injection. You do not need a blood test for this scan.')
  if (contrast === 'intra-articular') paragraphs.push('You do not need a blood test for this scan.')
  if (isIntravenous(contrast)) paragraphs.push(...bloodTest(assessment, needs, policy))
  if (!needs.some(need => need.kind === 'sedation')) {
    paragraphs.push(contrast === 'none'
      ? 'You can take your medicines as usual. If you must not eat before the scan, we will tell you.'
      : 'You can eat, drink and take your medicines as usual before contrast. If you must not eat for another reason, we will tell you.')
  }
  return section('before', 'Before your scan', paragraphs, items)
}

function bloodTest(assessment: LetterAssessment, needs: readonly Need[], policy: Policy): string[] {
  const { kidney, findings } = assessment
  if (needs.some(need => need.kind === 'creatinine') || kidney.status === 'dialysis') return []
  if (kidney.currency === 'current' && kidney.creatinine !== null && kidney.gateEgfr !== null) {
    const day = DateTime.fromISO(kidney.creatinine.collectedAt, { zone: policy.department.timeZone }).setLocale('en-US').toFormat('LLLL d')
    const asked = kidneysWeak(assessment, policy) || findings.some(found => found.topic === 'kidney' && found.asksRadiologist)
    return [asked
      ? `A doctor looked at your blood test from ${day}. They agreed that you can have contrast.`
      : `Your blood test from ${day} gives no reason to leave contrast out.`]
  }
  // Whether a baby needs a blood test is for the radiologist and the pediatric team.
  const infant = findings.some(found => found.id === 'child-under-one')
  return kidney.currency === 'not-needed' && !infant ? ['You do not need a blood test for this scan.'] : []
}

/** When and where. */
export function appointmentSection(slot: LetterSlot, policy: Policy): LetterSection {
  return section('appointment', 'When and where', [
    `Your scan is on ${dayWords(slot.startsAt, policy)} at ${timeWords(slot.startsAt, policy)}.`,
    ...[slot.place, policy.department.address].filter(line => line.trim() !== ''),
  ])
}

/** What to bring. */
export function bringSection(needs: readonly Need[]): LetterSection {
  return section('bring', 'What to bring', [], [
    'This letter, on paper or on your phone.',
    'A list of your medicines.',
    ...(needs.some(need => need.kind === 'implant-clearance') ? ['The card or papers for your implant.'] : []),
    ...(needs.some(need => need.kind === 'premedication' || need.kind === 'sedation') ? ['Someone who can drive you home.'] : []),
  ])
}

/** What contrast is and does, by the way it is given; nothing for a scan without. */
export function aboutContrastSections(contrast: DecidableOutcome, macrocyclic: boolean, assessment: LetterAssessment, policy: Policy): LetterSection[] {
  if (contrast === 'none') return []
  const heading = 'What to know about contrast'
  if (contrast === 'intra-articular') {
    return [section('about-contrast', heading, [
      'A doctor numbs your skin first. Then they put a little contrast in the joint through a thin needle.',
      'The joint may feel full for a day or two. Rest it on the day of the scan.',
      'The amount is tiny. Most people have no problem with it.',
    ])]
  }
  const breastfeeding = assessment.findings.filter(found => found.topic === 'breastfeeding').map(found => found.plain)
  return [section('about-contrast', heading, [
    contrast === 'iv-hepatobiliary'
      ? 'Contrast is a clear fluid. The liver takes it up, so the last pictures come about 20 minutes later.'
      : 'Contrast is a clear fluid. It makes some parts of the body look bright on the scan.',
    'Most people feel nothing. A few feel warm or get an itch for a short time. Strong reactions are rare, and we are ready to treat them.',
    `${macrocyclic ? 'The type we use holds its metal, gadolinium, most tightly.' : 'Contrast holds a metal called gadolinium.'} `
    + 'A trace can stay in the body. With healthy kidneys, no harm from this has been proven.',
    ...(kidneysWeak(assessment, policy)
      ? ['With very weak kidneys, a rare skin illness has been seen, nearly always with older types of contrast. Your doctors thought about this.']
      : []),
    ...breastfeeding,
  ])]
}

/** What the patient should tell before coming. */
export function tellUsSection(contrast: DecidableOutcome, pregnancyOpen: boolean): LetterSection {
  return section('tell-us', 'Tell us before you come if', [], [
    ...(contrast === 'none' ? [] : ['You have ever had a reaction to contrast.']),
    ...(pregnancyOpen ? ['You may be pregnant.'] : []),
    ...(isIntravenous(contrast) ? ['Your kidneys have become worse, or you have been very ill.'] : []),
    ...(contrast === 'intra-articular' ? ['The skin over the joint is red or sore, or you have a fever.', 'You take a blood thinner.'] : []),
    'You have an implant or metal in your body that we do not know of.',
    'You cannot come, or you do not want the scan.',
  ])
}

/** Whom to call. */
export function callSection(policy: Policy): LetterSection {
  return section('call', 'Who to call', [`Call ${policy.department.name} at ${policy.department.phone}.`, `We are here ${policy.department.callHours}.`])
}

/** How contrast given by vein leaves the body; with weak kidneys it is not gone within a day. */
function leavesBody(contrast: DecidableOutcome, assessment: LetterAssessment, policy: Policy): string {
  if (assessment.kidney.status === 'dialysis') return 'Your dialysis helps to clear the contrast. Keep your dialysis plan. You can eat and drink as you did before.'
  const slow = kidneysWeak(assessment, policy)
  if (contrast === 'iv-hepatobiliary') return `The contrast leaves your body through the liver and the kidneys${slow ? '. When kidneys work less well, this takes a few days.' : ', most of it within a day.'}`
  return slow
    ? 'The contrast leaves your body in the urine. When kidneys work less well, this takes a few days. You can eat and drink as you did before.'
    : 'Most of the contrast leaves your body in the urine within a day. You can eat and drink as usual.'
}

/** What to expect once home, by what was really given. */
export function afterSection(
  contrast: DecidableOutcome, breastfeeding: readonly string[], assessment: LetterAssessment, policy: Policy,
): LetterSection {
  const result = 'The doctor who asked for the scan will tell you the result.'
  if (contrast === 'none') return section('after', 'What to expect now', ['You can go on with your day as usual.', result])
  if (contrast === 'intra-articular') {
    return section('after', 'What to expect now', ['The joint may feel full or sore for a day or two. Rest it today.', result])
  }
  return section('after', 'What to expect now', [
    leavesBody(contrast, assessment, policy),
    ...breastfeeding, result,
  ])
}

/** Signs to act on after contrast, acute ones first. */
export function warningSection(contrast: DecidableOutcome, policy: Policy): LetterSection[] {
  if (contrast === 'none') return []
  const phone = policy.department.phone
  return [section('warning-signs', 'Warning signs', [], [
    'It is hard to breathe, or your face or throat swells: call 911 at once.',
    `You get a rash, hives or an itch in the next days: call us at ${phone}.`,
    ...(contrast === 'intra-articular'
      ? [`The joint gets hot, red or much more sore, or you have a fever: call us at ${phone} the same day.`]
      : [
          `Your arm hurts, swells or feels numb where the needle was: call us at ${phone}.`,
          'Weeks or months later your skin gets hard or tight: tell your doctor. This is very rare.',
        ]),
  ])]
}
