import type { ClinicalQuestion } from '../types'

/** Starter questions: lumbosacral plexus; most common first. */
export const lumbosacralPlexusQuestions: ClinicalQuestion[] = [
  {
    id: 'lumbosacral-plexopathy',
    region: 'lumbosacral plexus',
    exam: 'MRI lumbosacral plexus',
    question: 'Leg weakness or pain from the pelvic nerves?',
    plainQuestion: 'Are the nerves in my pelvis causing my leg pain?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'mass',
        kind: 'yesno',
        ask: 'Is cancer, radiation injury, abscess or a mass suspected?',
      },
    ],
    branches: [
      {
        when: { mass: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'tumor, radiation change and abscess separate by their enhancement',
        because: 'Tumor, radiation change and abscess are separated by enhancement.',
        plain: 'Contrast helps tell a growth from scar or infection.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'nerve size and signal show on non-contrast neurography',
        because: 'Neurography without contrast shows nerve size and signal.',
        plain: 'Special nerve pictures show the problem without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Plexopathy, 2021 Update',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a lumbar spine MRI alone, which leaves out most of the plexus.',
    alternatives: 'If contrast cannot be given: T2 neurography with diffusion; PET/CT for recurrent cancer.',
    searchWords: [
      'sciatic nerve', 'piriformis', 'pelvic nerves', 'lumbar plexus', 'foot drop', 'pudendal', 'MR neurography',
      'sacral plexus', 'femoral neuropathy', 'radiation plexopathy',
    ],
  },
]
