import type { ClinicalQuestion } from '../types'

/** Starter questions: orbits; most common first. */
export const orbitsQuestions: ClinicalQuestion[] = [
  {
    id: 'optic-neuritis',
    region: 'orbits',
    exam: 'MRI orbits and brain',
    question: 'Painful loss of vision: optic neuritis or another optic nerve disease?',
    plainQuestion: 'Why did my vision suddenly get worse?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'an inflamed optic nerve is confirmed by its enhancement',
        because: 'Optic nerve and perineural enhancement confirm inflammation, show its length and separate MS from other antibody diseases.',
        plain: 'Contrast shows if the nerve to your eye is inflamed and how far it goes.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Orbits, Vision and Visual Loss',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a brain MRI alone, without fat-suppressed images of the orbits.',
    alternatives: 'Fat-suppressed T2 of the orbits shows nerve edema without contrast.',
    searchWords: [
      'ON', 'optic neuritis', 'painful vision loss', 'NMO', 'NMOSD', 'MOG', 'blurry vision', 'blurred vision',
      'RAPD', 'optic neuropathy', 'eye pain', 'vision loss',
    ],
  },
  {
    id: 'proptosis-orbital-mass',
    region: 'orbits',
    exam: 'MRI orbits',
    question: 'Bulging eye or suspected orbital mass?',
    plainQuestion: 'Why is my eye pushed forward?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'thyroidOnly',
        kind: 'yesno',
        ask: 'Is thyroid eye disease already established and the only question muscle size, edema or nerve crowding?',
      },
    ],
    branches: [
      {
        when: { thyroidOnly: ['yes'] },
        contrast: 'none',
        inShort: 'muscle size and swelling in thyroid eye disease show on T2 images',
        because: 'Muscle size and edema are measured on fat-suppressed T2 or STIR.',
        plain: 'The scan measures the eye muscles. That needs no contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancement tells orbital mass, inflammation and infection apart',
        because: 'Mass, inflammation and infection are told apart by enhancement.',
        plain: 'Contrast helps tell a growth from swelling or infection.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Orbits, Vision and Visual Loss',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a brain MRI, which lacks fat-suppressed thin images of the orbits.',
    alternatives: 'CT of the orbits.',
    searchWords: [
      'exophthalmos', 'bulging eye', 'Graves', 'TED', 'thyroid eye disease', 'thyroid orbitopathy', 'orbital tumor',
      'orbital pseudotumor', 'IgG4', 'orbital cellulitis', 'proptosis',
    ],
  },
]
