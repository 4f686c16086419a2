import type { ClinicalQuestion } from '../types'

/** Starter questions: spine, whole; most common first. */
export const spineWholeQuestions: ClinicalQuestion[] = [
  {
    id: 'spinal-metastases-cord-compression',
    region: 'spine, whole',
    exam: 'MRI whole spine',
    question: 'Cancer with back pain or weak legs: metastases or cord compression?',
    plainQuestion: 'Are my back pain or weak legs linked to my cancer?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'softTissue',
        kind: 'yesno',
        ask: 'Is spread along the nerves or meninges or within the cord suspected, or is exact soft-tissue extent needed for surgery or radiation?',
      },
    ],
    branches: [
      {
        when: { softTissue: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'spread along nerves, membranes or soft tissue is under-called without enhancement',
        because: 'Leptomeningeal, intramedullary and epidural disease are under-called without enhancement.',
        plain: 'Contrast shows spread along the nerves and cord.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'bone deposits and cord compression stand out on non-contrast images at once',
        because: 'Marrow deposits stand out on T1 and STIR because fat is replaced, and compression shows on T2; the scan should not wait for contrast. If these images do not explain the signs, contrast is added in the same visit. Local choice: several guidelines list the contrast study first for cancer with cord signs.',
        plain: 'Spots in the bones and pressure on the cord show clearly without contrast, and the scan is faster.',
      },
    ],
    sources: [
      {
        title: 'Spinal metastases and metastatic spinal cord compression (NG234)',
        body: 'NICE',
        year: 2023,
        status: 'from memory',
      },
    ],
    commonError: 'Delaying the emergency scan to arrange contrast.',
    alternatives: 'If contrast cannot be given: T1, STIR, T2 and diffusion show bone disease and compression; CT if MRI is not possible.',
    searchWords: [
      'MSCC', 'ESCC', 'spine mets', 'r/o mets spine', 'metastatic cord compression', 'cancer back pain',
      'prostate cancer spine', 'total spine', 'leptomeningeal', 'metastasis', 'drop mets',
    ],
  },
]
