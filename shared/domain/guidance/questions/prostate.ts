import type { ClinicalQuestion } from '../types'

/** Starter questions: prostate; most common first. */
export const prostateQuestions: ClinicalQuestion[] = [
  {
    id: 'prostate-cancer-detection',
    region: 'prostate',
    exam: 'MRI prostate',
    question: 'Raised PSA or known cancer: where should we biopsy or treat?',
    plainQuestion: 'Is there anything in my prostate that needs a biopsy or treatment?',
    volume: 4,
    usualBranch: 3,
    deciders: [
      {
        id: 'setting',
        kind: 'choice',
        ask: 'What is the setting?',
        options: [
          { id: 'naive', label: 'No biopsy yet' },
          { id: 'negative', label: 'Negative biopsy, PSA still rising' },
          { id: 'surveillance', label: 'Active surveillance' },
          { id: 'treated', label: 'After radiation, surgery or focal treatment' },
        ],
      },
      {
        id: 'artifact',
        kind: 'yesno',
        ask: 'Is there a hip replacement, or was an earlier prostate MRI poor in quality?',
      },
    ],
    branches: [
      {
        when: { setting: ['treated'] },
        contrast: 'iv-with-and-without',
        inShort: 'recurrence in a treated gland shows as early enhancement',
        because: 'Recurrence in a treated gland shows as early enhancement when T2 and diffusion are distorted.',
        plain: 'After treatment, contrast helps tell scar from new growth.',
      },
      {
        when: { artifact: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'poor diffusion images need the contrast phase as a back-up',
        because: 'When diffusion is degraded, the dynamic phase becomes the back-up sequence.',
        plain: 'Metal near the prostate can blur the pictures. Contrast gives a second way to look.',
      },
      {
        when: { setting: ['negative'] },
        contrast: 'iv-with-and-without',
        inShort: 'a missed cancer after a negative biopsy may show by enhancement',
        because: 'A missed cancer is the question, and the dynamic phase can tip an equivocal peripheral lesion.',
        plain: 'A first biopsy found nothing, but the blood test keeps rising. Contrast adds one more check.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'T2 and diffusion images of good quality find the important cancers',
        because: 'A large trial found biparametric MRI no worse than multiparametric for clinically important cancer in men not yet biopsied, given high image quality; surveillance scans can follow the same technique as the baseline. PI-RADS version 2.1 still describes the contrast phase as part of the full study, so the department must state its policy.',
        plain: 'Two kinds of plain MRI pictures find important cancers as well as a scan with contrast.',
      },
    ],
    sources: [
      {
        title: 'PRIME trial: biparametric against multiparametric prostate MRI',
        body: 'PRIME investigators',
        year: 2025,
        status: 'confirmed',
      },
      {
        title: 'Gothenburg-2 screening trial: biparametric against multiparametric MRI',
        body: 'European Radiology',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'PI-RADS version 2.1',
        body: 'ACR, ESUR and AdMeTech',
        year: 2019,
        status: 'from memory',
      },
    ],
    commonError: 'Assuming the contrast phase drives the score in every man.',
    alternatives: 'If contrast cannot be given: T2 and diffusion with careful technique; PSMA PET/CT after treatment.',
    searchWords: [
      'PSA', 'elevated PSA', 'prostate', 'PI-RADS', 'PIRADS', 'mpMRI', 'bpMRI', 'prostate ca', 'prostate biopsy',
      'active surveillance', 'Gleason', 'biochemical recurrence', 'prostrate',
    ],
  },
]
