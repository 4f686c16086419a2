import { describe, expect, it } from 'vitest'
import { needKinds } from '#shared/domain/assessment/needs'
import { plainNeed } from '#shared/domain/assessment/plain-needs'
import type { AssessmentInputs } from '#shared/domain/assessment/types'
import type { DecidableOutcome } from '#shared/domain/contrast/outcome'
import { decidableOutcomes, usesContrast } from '#shared/domain/contrast/outcome'
import { starterQuestions } from '#shared/domain/guidance/questions/index'
import { composeLetter, composeNeutral } from '#shared/domain/letter/compose'
import { countText, fleschKincaidGrade, readingGradeCeiling, smogGrade } from '#shared/domain/letter/readability'
import type { Letter } from '#shared/domain/letter/types'
import { starterPolicy } from '#shared/domain/policy/defaults'
import { differsCauses } from '#shared/domain/request/differs'
import { quietScreening } from '../safety/situation'
import { bodyOf, common, gadobutrol, linesOf, slot } from './letter-inputs'

/** Longest sentence of a patient text, words. Plain-language guides ask for 15 to 20. */
const longest = 20

const situations: Record<string, Partial<AssessmentInputs>> = {
  'nothing found': {},
  'no blood test': { readings: [] },
  'dialysis': { screening: { ...quietScreening, dialysis: 'hemodialysis' } },
  'dialysis not known': { screening: { ...quietScreening, dialysis: 'unknown' } },
  'dialysis and a stat exam': { priority: 'stat', screening: { ...quietScreening, dialysis: 'hemodialysis' } },
  'pregnancy': {
    patient: { birthDate: '1992-05-20', sex: 'female', weightKg: 66, weightAt: null, heightCm: null, heightAt: null },
    screening: { ...quietScreening, pregnancy: 'yes' },
  },
  'a reaction, asthma and an implant': { screening: { ...quietScreening, earlierReaction: 'yes', reactionSeverity: 'moderate', asthma: 'yes', implants: 'yes' } },
  'breastfeeding and an open pregnancy question': {
    patient: { birthDate: '1992-05-20', sex: 'female', weightKg: null, weightAt: null, heightCm: null, heightAt: null },
    screening: { ...quietScreening, breastfeeding: 'yes', pregnancy: null, specialNeeds: ['interpreter', 'sedation'] },
  },
}

function lettersFor(contrast: DecidableOutcome, inputs: Partial<AssessmentInputs>, region: string): Letter[] {
  const part = common(contrast, inputs, region)
  const given = { contrast, agent: usesContrast(contrast) ? gadobutrol : null, differsCause: null, reaction: false, extravasation: false }
  return [
    composeLetter({ kind: 'before', slot, ...part }),
    composeLetter({ kind: 'after', given, ...part }),
    ...differsCauses.map(differsCause => composeLetter({ kind: 'after', given: { ...given, differsCause, reaction: true, extravasation: true }, ...part })),
    composeLetter({ kind: 'changed', change: 'moved', slot, ...part }),
    composeLetter({ kind: 'changed', change: 'replanned', slot, ...part }),
    composeLetter({ kind: 'changed', change: 'called-off', ...part }),
  ]
}

function tooLong(text: string): string[] {
  return text.split(/(?<=[.!?:])\s+|\n/).filter(sentence => countText(sentence).words > longest)
}

function expectPlain(text: string): void {
  expect(fleschKincaidGrade(text), text).toBeLessThanOrEqual(readingGradeCeiling)
  expect(smogGrade(text), text).toBeLessThanOrEqual(readingGradeCeiling)
}

describe('letters in plain words', () => {
  const rows = decidableOutcomes.flatMap(contrast => Object.entries(situations).map(([name, inputs]) => ({ contrast, name, inputs })))

  it.each(rows)('read at grade 8 or below: $contrast, $name', ({ contrast, inputs }) => {
    for (const letter of lettersFor(contrast, inputs, contrast === 'intra-articular' ? 'shoulder' : 'brain')) {
      expectPlain(bodyOf(letter))
      for (const line of linesOf(letter)) expect(tooLong(line)).toEqual([])
      expect(letter.caution).toMatch(/does not replace their advice/)
    }
  })

  it.each(starterQuestions.flatMap(question => question.branches.map((branch, index) => ({ id: question.id, index, question, branch }))))(
    'read at grade 8 or below with the words of $id, branch $index', ({ question, branch }) => {
      if (branch.contrast === 'discuss') return
      const part = common(branch.contrast, {}, question.region, question.exam)
      const assessment = { ...part.assessment, suggestion: branch.contrast, plain: { why: branch.plain, before: [] } }
      const letter = composeLetter({ kind: 'before', slot, ...part, assessment })
      expect(letter.opening).toEqual([branch.plain])
      expectPlain(bodyOf(letter))
      expect(tooLong(branch.plain)).toEqual([])
    },
  )

  it('never promise safety, and never blame iodine or dye', () => {
    for (const { contrast, inputs } of rows) {
      for (const letter of lettersFor(contrast, inputs, 'brain')) expect(bodyOf(letter)).not.toMatch(/\bsafe(ly)?\b|allergic to|\bdye\b/i)
    }
  })

  it('keep each need to short sentences', () => {
    for (const kind of needKinds) expect(tooLong(plainNeed(kind, { findings: [], suggestion: 'intra-articular' }) ?? '')).toEqual([])
  })

  it('keep the neutral message plain', () => {
    expectPlain(composeNeutral(starterPolicy).paragraphs.join('\n'))
  })
})
