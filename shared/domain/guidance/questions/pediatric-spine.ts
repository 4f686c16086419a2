import type { ClinicalQuestion } from '../types'

/** Starter questions: pediatric spine; most common first. */
export const pediatricSpineQuestions: ClinicalQuestion[] = [
  {
    id: 'child-tethered-cord-scoliosis',
    region: 'pediatric spine',
    exam: 'MRI whole spine',
    question: 'Child with sacral dimple, tethered cord or scoliosis with risk features?',
    plainQuestion: 'Is my child’s spinal cord stuck or misshapen?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'infectionTumor',
        kind: 'yesno',
        ask: 'Is infection, a dermal sinus or tumor suspected?',
      },
    ],
    branches: [
      {
        when: { infectionTumor: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'an infected sinus tract or tumor shows by enhancement',
        because: 'Infected sinus tract and tumor need enhancement.',
        plain: 'Contrast helps find infection or a growth.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'cord level, fatty filum and syrinx show on non-contrast images',
        because: 'Conus level, fatty filum, syrinx and Chiari malformation are non-contrast findings.',
        plain: 'MRI pictures without contrast show the cord and where it ends.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Scoliosis, Child',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering "with and without" for a simple dimple or curve.',
    alternatives: 'If contrast cannot be given: T2, STIR and diffusion.',
    searchWords: [
      'tethered cord', 'sacral dimple', 'scoliosis', 'spina bifida', 'spinal dysraphism', 'lipomyelomeningocele',
      'fatty filum', 'dermal sinus', 'skoliosis', 'curved spine', 'bedwetting',
    ],
  },
]
