import type { ClinicalQuestion } from '../types'

/** Starter questions: sacroiliac joints; most common first. */
export const sacroiliacJointsQuestions: ClinicalQuestion[] = [
  {
    id: 'sacroiliitis',
    region: 'sacroiliac joints',
    exam: 'MRI sacroiliac joints',
    question: 'Inflammatory back pain: active sacroiliitis?',
    plainQuestion: 'Is arthritis in the joints of my lower back causing my pain?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'infection',
        kind: 'yesno',
        ask: 'Is joint infection suspected (one side only, with fever, a recent infection or injection drug use)?',
      },
    ],
    branches: [
      {
        when: { infection: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'an abscess or spread beyond the joint shows by enhancement',
        because: 'Abscess and soft-tissue spread need enhancement. A raised CRP alone is common in spondyloarthritis and does not make infection likely.',
        plain: 'Contrast shows if there is pus around the joint.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'bone marrow swelling on STIR already defines active sacroiliitis',
        because: 'The definition of active sacroiliitis rests on bone marrow edema on STIR with T1 for erosions; contrast seldom changes the reading.',
        plain: 'The swelling in the bone shows on plain MRI pictures. Contrast is not needed.',
      },
    ],
    sources: [
      {
        title: 'Defining active sacroiliitis on MRI: update by the ASAS MRI working group',
        body: 'ASAS',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Chronic Back Pain, Suspected Sacroiliitis/Spondyloarthropathy',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering sacroiliac MRI with contrast, or a lumbar spine MRI instead.',
    alternatives: 'If contrast cannot be given: STIR and diffusion; aspiration of the joint.',
    searchWords: [
      'SI joint', 'SI joints', 'ankylosing spondylitis', 'AS', 'axial spondyloarthritis', 'axSpA', 'HLA-B27',
      'spondyloarthropathy', 'SpA', 'sacroilitis', 'buttock pain', 'inflammatory back pain',
    ],
  },
]
