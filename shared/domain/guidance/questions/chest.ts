import type { ClinicalQuestion } from '../types'

/** Starter questions: chest; most common first. */
export const chestQuestions: ClinicalQuestion[] = [
  {
    id: 'mediastinal-thymic-mass',
    region: 'chest',
    exam: 'MRI chest, mediastinum',
    question: 'Anterior mediastinal finding: thymus, cyst or tumor?',
    plainQuestion: 'What is the spot behind my breastbone?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'solid',
        kind: 'yesno',
        ask: 'Is it solid, invasive, or already known not to be cyst or normal thymus?',
      },
    ],
    branches: [
      {
        when: { solid: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'solid parts and invasion are judged by enhancement',
        because: 'Solid parts, invasion and cystic tumor are judged by enhancement.',
        plain: 'Contrast helps show what the spot is made of.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'chemical shift and T2 images prove normal thymus or a simple cyst',
        because: 'Chemical shift images prove normal or overgrown thymus, and T2 proves a simple cyst. Guidance accepts the study with or without contrast.',
        plain: 'MRI pictures without contrast can show a simple cyst or normal gland.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Imaging of Mediastinal Masses',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Adding contrast from the start when the question is only thymus or simple cyst.',
    alternatives: 'If contrast cannot be given: diffusion with chemical shift; PET/CT or biopsy.',
    searchWords: [
      'thymus', 'thymoma', 'thymic hyperplasia', 'thymic cyst', 'anterior mediastinal mass', 'mediastinum',
      'myasthenia', 'chest mass',
    ],
  },
]
