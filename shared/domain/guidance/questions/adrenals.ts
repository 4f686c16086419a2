import type { ClinicalQuestion } from '../types'

/** Starter questions: adrenals; most common first. */
export const adrenalsQuestions: ClinicalQuestion[] = [
  {
    id: 'adrenal-incidentaloma',
    region: 'adrenals',
    exam: 'MRI adrenals, chemical shift',
    question: 'Adrenal nodule found by chance: adenoma?',
    plainQuestion: 'Is the spot on my adrenal gland harmless?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'notAdenoma',
        kind: 'yesno',
        ask: 'Has chemical shift already been negative, or are pheochromocytoma, large size or known cancer the concern?',
      },
    ],
    branches: [
      {
        when: { notAdenoma: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a nodule that may not be an adenoma is weighed by enhancement',
        because: 'With no lipid to prove adenoma, enhancement and T2 help weigh metastasis, carcinoma and pheochromocytoma; biopsy or CT washout may still decide.',
        plain: 'Contrast gives more clues when the first pictures are not clear.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'signal loss on chemical shift images proves a benign adenoma',
        because: 'Signal loss on opposed-phase images proves intracellular lipid and a benign adenoma.',
        plain: 'Pictures that detect fat can prove the spot is harmless. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Incidentally Discovered Adrenal Mass',
        body: 'American College of Radiology',
        year: 2012,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Adrenal Mass Evaluation, 2021 Update',
        body: 'American College of Radiology',
        year: 2021,
        status: 'from memory',
      },
    ],
    commonError: 'Adding contrast to a chemical shift study before it is read.',
    alternatives: 'Non-contrast CT: 10 HU or less is benign.',
    searchWords: [
      'adrenal nodule', 'adrenal mass', 'adrenal adenoma', 'incidentaloma', 'pheochromocytoma', 'pheo',
      'chemical shift', 'in and out of phase', 'lipid poor adenoma', 'adrenal',
    ],
  },
]
