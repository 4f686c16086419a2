import { assess, assessDecision } from '#shared/domain/assessment/assess'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import type { DecidableOutcome } from '#shared/domain/contrast/outcome'
import type { LetterAgent, LetterInput } from '#shared/domain/letter/compose'
import type { Letter } from '#shared/domain/letter/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { marta, rules } from '../assessment/request-inputs'

export const gadobutrol: LetterAgent = { name: 'gadobutrol', macrocyclic: true }
export const slot = { startsAt: '2026-12-02T16:20:00Z', place: 'Scanner 2, ground floor' }

type Part = Pick<LetterInput, 'language' | 'now' | 'patient' | 'exam' | 'assessment' | 'needs' | 'decision' | 'policy'>

/** The parts common to every letter, for a decision on the example request or a variant of it. */
export function common(contrast: DecidableOutcome, inputs: Partial<AssessmentInputs> = {}, region = 'brain', name: string | null = null): Part {
  const all = { ...marta, ...inputs }
  const agent = contrast === 'none' ? null : gadobutrol
  const decided = assessDecision(all, rules, { contrast, agent: agent && 'gadobutrol' })
  return {
    language: 'en', now: all.now, patient: { fullName: 'Marta Lindqvist', birthDate: all.patient.birthDate, sex: all.patient.sex },
    exam: { region, name }, assessment: { ...assess(all, rules), findings: decided.findings, kidney: decided.kidney }, needs: decided.needs,
    decision: { contrast, agent }, policy: starterPolicy,
  }
}

/** Every line of a letter that a patient reads. */
export function linesOf(letter: Letter): string[] {
  return [letter.title, ...letter.opening, ...letter.sections.flatMap(section => [section.heading, ...section.paragraphs, ...section.items]), letter.caution]
}

export const bodyOf = (letter: Letter) => linesOf(letter).join('\n')
