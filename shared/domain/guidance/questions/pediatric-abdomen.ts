import type { ClinicalQuestion } from '../types'

/** Starter questions: pediatric abdomen; most common first. */
export const pediatricAbdomenQuestions: ClinicalQuestion[] = [
  {
    id: 'child-appendicitis',
    region: 'pediatric abdomen',
    exam: 'MRI abdomen and pelvis',
    question: 'Child with suspected appendicitis and unclear ultrasound?',
    plainQuestion: 'Does my child have appendicitis?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'fast T2 and diffusion images show the appendix unaided',
        because: 'Fast T2 and diffusion show the appendix without contrast or sedation.',
        plain: 'Quick pictures show the appendix. No needle is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Appendicitis, Child',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'MRI for appendicitis: meta-analysis (non-contrast as accurate as contrast)',
        body: 'American Journal of Roentgenology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering contrast, and with it an IV start, for a study that does not need it.',
    alternatives: null,
    searchWords: [
      'pediatric appendicitis', 'appendix child', 'RLQ pain child', 'appy', 'belly pain child', 'kid stomach pain',
      'appendisitis',
    ],
  },
  {
    id: 'child-abdominal-mass',
    region: 'pediatric abdomen',
    exam: 'MRI abdomen',
    question: 'Child with an abdominal mass?',
    plainQuestion: 'What is the lump in my child’s belly?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'the organ of origin, vessels and live tumor need enhancement',
        because: 'Organ of origin, vessels and viable tumor for staging need contrast.',
        plain: 'Contrast shows where the lump comes from.',
      },
    ],
    sources: [
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Ordering without contrast, so that a second scan and a second sedation are needed.',
    alternatives: 'Diffusion with T2 shows extent of neuroblastoma well.',
    searchWords: [
      'Wilms', 'nephroblastoma', 'neuroblastoma', 'hepatoblastoma', 'pediatric abdominal mass', 'belly lump child',
      'peds tumor',
    ],
  },
]
