import type { ClinicalQuestion } from '../types'

/** Starter questions: brachial plexus; most common first. */
export const brachialPlexusQuestions: ClinicalQuestion[] = [
  {
    id: 'brachial-plexopathy',
    region: 'brachial plexus',
    exam: 'MRI brachial plexus',
    question: 'Arm weakness or pain localizing to the plexus?',
    plainQuestion: 'Are the nerves between my neck and arm damaged?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'cause',
        kind: 'choice',
        ask: 'What is suspected?',
        options: [
          { id: 'mass', label: 'Cancer, radiation injury or a mass' },
          { id: 'trauma', label: 'Injury or root avulsion' },
          { id: 'other', label: 'Inflammatory neuritis, thoracic outlet or unknown' },
        ],
      },
    ],
    branches: [
      {
        when: { cause: ['mass'] },
        contrast: 'iv-with-and-without',
        inShort: 'tumor and radiation change are compared by their enhancement',
        because: 'Recurrent tumor, radiation fibrosis and nerve sheath tumor are compared by enhancement.',
        plain: 'Contrast helps tell a growth from scar.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'nerve swelling and torn roots show on high-resolution T2 images',
        because: 'Root avulsion, nerve edema and muscle denervation are shown by high-resolution T2 neurography; guidance accepts the study with or without contrast. Local choice: with no known cause, departments differ.',
        plain: 'Special nerve pictures show swelling and tears without contrast.',
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
    commonError: 'Ordering cervical spine MRI instead of a plexus study.',
    alternatives: 'If contrast cannot be given: T2 neurography with diffusion; PET/CT for recurrent cancer.',
    searchWords: [
      'brachial plexus', 'Parsonage-Turner', 'neuralgic amyotrophy', 'thoracic outlet', 'TOS', 'root avulsion',
      'Erb palsy', 'Pancoast', 'arm weakness', 'neurography',
    ],
  },
]
