import type { LetterKind } from './kinds'
import type { LetterAssessment, LetterSlot } from './parts'
import type { Letter, LetterSection } from './types'
import type { Need } from '../assessment/needs'
import type { AssessedPatient } from '../assessment/types'
import type { DecidableOutcome } from '../contrast/outcome'
import type { Policy } from '../policy/types'
import type { DiffersCause } from '../request/differs'
import { differsWords } from '../request/differs'
import { usesContrast } from '../contrast/outcome'
import { ageBounds } from '../safety/age'
import { pregnancyAsked } from '../safety/pregnancy'
import {
  aboutContrastSections, afterSection, appointmentSection, beforeSection, bringSection, callSection, caution, isPregnant, tellUsSection, warningSection, whyParagraphs,
} from './parts'
import { plainScanName } from './scan-name'

/** The agent by name, and whether it is a macrocyclic one. */
export interface LetterAgent { name: string, macrocyclic: boolean }

/** What was really given at the scan. */
export interface LetterGiven {
  contrast: DecidableOutcome
  agent: LetterAgent | null
  /** Why it differed from the plan; null where it did not. */
  differsCause: DiffersCause | null
  reaction: boolean
  extravasation: boolean
}

interface Common {
  language: 'en'
  /** ISO instant the letter is written. */
  now: string
  patient: Pick<AssessedPatient, 'birthDate' | 'sex'> & { fullName: string }
  /** `name` is the exam's clinical name, null where none is stored. */
  exam: { region: string, name: string | null }
  assessment: LetterAssessment
  /** Needs for the decision, as `assessDecision` gives them. */
  needs: readonly Need[]
  decision: { contrast: DecidableOutcome, agent: LetterAgent | null }
  policy: Policy
}

/**
 * `before` on booking, `after` once done, `changed` when a plan the patient knew of has another time (`moved`),
 * another contrast (`replanned`) or does not take place (`called-off`).
 */
export type LetterInput = Common & (
  | { kind: 'before', slot: LetterSlot }
  | { kind: 'after', given: LetterGiven }
  | { kind: 'changed', change: 'moved' | 'replanned', slot: LetterSlot }
  | { kind: 'changed', change: 'called-off' }
)

/**
 * The letter in plain words, at most grade 8, as structure. Names and places are kept as written and never read as markup.
 * An exam still to be discussed gets no letter: its decision has no such outcome.
 */
export function composeLetter(input: LetterInput): Letter {
  if (input.kind === 'before') return frame(input, 'before', input.decision.contrast, planTitle(input), planOf(input, input.slot))
  if (input.kind === 'after') return afterLetter(input, input.given)
  if (input.change === 'called-off') return calledOff(input)
  const scan = plainScanName(input.exam)
  const title = input.change === 'moved' ? `Your ${scan} has a new time` : `The plan for your ${scan} has changed`
  const plan = planOf(input, input.slot)
  return frame(input, 'changed', input.decision.contrast, title, {
    opening: [input.change === 'moved' ? 'Your scan was moved. The new time is below.' : 'Your doctors looked at your scan again. Here is the new plan.', ...plan.opening],
    sections: plan.sections,
  })
}

function frame(
  input: Common, kind: LetterKind, mark: DecidableOutcome | null, title: string, body: Pick<Letter, 'opening' | 'sections'>,
): Letter {
  const { department } = input.policy
  // A parent or guardian reads of a child's arm, kidneys and reactions.
  const opening = isChild(input) && mark !== null ? [...body.opening, 'In this letter, “you” means your child.'] : body.opening
  return {
    kind, language: input.language, from: department.name, to: addressee(input), mark, title, opening, sections: body.sections, caution,
    neutralSubject: neutralSubject(input.policy),
    detailedSubject: `${title} (${department.name})`,
  }
}

function isChild({ patient, policy, now }: Common): boolean {
  const age = ageBounds(patient.birthDate, now, policy.department.timeZone)
  return age !== null && age.oldest < 18
}

/** A child's letter goes to a parent or guardian. */
function addressee(input: Common): string {
  return isChild(input) ? `the parent or guardian of ${input.patient.fullName}` : input.patient.fullName
}

function planTitle({ exam, decision, assessment }: Common): string {
  const scan = plainScanName(exam)
  switch (decision.contrast) {
    // Where guidance asks for contrast and something holds it back, the scan would need it.
    case 'none': return assessment.guidance?.status === 'answered' && assessment.guidance.contrast === 'none'
      ? `Your ${scan} does not need contrast, and here is why`
      : `Your ${scan} will be done without contrast, and here is why`
    case 'intra-articular': return `Your ${scan} will use contrast in the joint, and here is why`
    case 'iv-hepatobiliary': return `Your ${scan} will use a liver contrast, and here is why`
    default: return `Your ${scan} will use contrast, and here is why`
  }
}

function planOf(input: Common, slot: LetterSlot): Pick<Letter, 'opening' | 'sections'> {
  const { contrast, agent } = input.decision
  return {
    opening: whyParagraphs(input.assessment, contrast),
    sections: [
      appointmentSection(slot, input.policy),
      beforeSection(contrast, input.assessment, input.needs, input.policy),
      bringSection(input.needs),
      ...aboutContrastSections(contrast, agent?.macrocyclic ?? false, input.assessment, input.policy),
      tellUsSection(contrast, pregnancyAsked(input.patient, input.policy, input.now) && !isPregnant(input.assessment)),
      callSection(input.policy),
    ],
  }
}

function afterLetter(input: Common, given: LetterGiven): Letter {
  const scan = plainScanName(input.exam)
  const used = usesContrast(given.contrast)
  const breastfeeding = input.assessment.findings.filter(found => found.topic === 'breastfeeding').map(found => found.plain)
  return frame(input, 'after', given.contrast, used ? `Contrast was used in your ${scan}, and here is why` : `No contrast was used in your ${scan}`, {
    opening: given.differsCause === null
      ? whyParagraphs(input.assessment, given.contrast)
      : ['The scan was done in another way than planned.'],
    sections: [
      usedSection(given, used),
      afterSection(given.contrast, breastfeeding, input.assessment, input.policy),
      ...warningSection(given.contrast, input.policy),
      callSection(input.policy),
    ],
  })
}

function usedSection(given: LetterGiven, used: boolean): LetterSection {
  const paragraphs = [used
    ? `The contrast was given into ${given.contrast === 'intra-articular' ? 'the joint' : 'a vein'}.`
    : 'The scan was done without contrast. Nothing was injected.']
  if (used && given.agent !== null) paragraphs.push(`Its name is ${given.agent.name}. Keep this name with your papers.`)
  if (given.differsCause !== null) paragraphs.push(differsWords[given.differsCause].plain, 'Call us if you want to know more.')
  if (given.reaction) paragraphs.push('You had a reaction. Please tell any scan team about it before you get contrast again.')
  if (given.extravasation) paragraphs.push('Some of the fluid went under the skin. Keep the arm raised today. Call us if it hurts more, swells or feels numb.')
  return { id: 'used', heading: 'What was used', paragraphs, items: [] }
}

function calledOff(input: Common): Letter {
  return frame(input, 'changed', null, `Your ${plainScanName(input.exam)} will not take place as planned`, {
    opening: ['Please do not come at the time we gave you.'],
    sections: [
      {
        id: 'changed', heading: 'What happens next', items: [],
        paragraphs: ['The doctor who asked for the scan knows about this. They will talk with you about what comes next.'],
      },
      callSection(input.policy),
    ],
  })
}

function neutralSubject(policy: Policy): string {
  return `A message from ${policy.department.name}`
}

/** The mail for a patient who did not agree to details by e-mail: no exam, no reason, no name. */
export interface NeutralMessage { subject: string, paragraphs: string[], caution: string }

/** Says only that there is a message, and how to open it. The link is added by whoever sends it. */
export function composeNeutral(policy: Policy): NeutralMessage {
  const { name, phone } = policy.department
  return {
    subject: neutralSubject(policy),
    paragraphs: [
      `${name} has a message for you.`,
      'Open it with the link below. We will ask for your date of birth.',
      `If you did not expect this, call us at ${phone}.`,
      'Call us too if the link does not work.',
    ],
    caution,
  }
}
