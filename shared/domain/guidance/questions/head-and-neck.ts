import type { ClinicalQuestion } from '../types'

/** Starter questions: head and neck; most common first. */
export const headAndNeckQuestions: ClinicalQuestion[] = [
  {
    id: 'neck-mass-cancer',
    region: 'head and neck',
    exam: 'MRI neck',
    question: 'Neck mass, or staging or follow-up of head and neck cancer?',
    plainQuestion: 'What is this lump in my neck, or has my cancer changed?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'tumor margins and involved nodes are judged by their enhancement',
        because: 'Tumor margin, nodal necrosis, perineural spread and recurrence are all judged with fat-suppressed post-contrast images.',
        plain: 'Contrast shows the edges of a lump and how far it goes.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Neck Mass/Adenopathy',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering non-contrast for suspected perineural spread.',
    alternatives: 'Ultrasound with needle sampling; PET/CT.',
    searchWords: [
      'lump in neck', 'neck lump', 'lymph node', 'adenopathy', 'lymphadenopathy', 'head and neck cancer', 'HNSCC',
      'oropharynx', 'tongue cancer', 'larynx', 'nasopharynx', 'throat cancer', 'perineural spread', 'SCC',
    ],
  },
  {
    id: 'tmj-dysfunction',
    region: 'head and neck',
    exam: 'MRI temporomandibular joints',
    question: 'Jaw clicking, locking or pain: is the disc displaced?',
    plainQuestion: 'Is the disc in my jaw joint out of place?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'inflammatory',
        kind: 'yesno',
        ask: 'Is inflammatory arthritis (for example juvenile idiopathic arthritis) or infection suspected?',
      },
    ],
    branches: [
      {
        when: { inflammatory: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'an inflamed joint lining shows best by enhancement',
        because: 'Synovitis in this joint is best shown by enhancement.',
        plain: 'Contrast shows if the joint lining is inflamed.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'disc position and joint surfaces show on open- and closed-mouth images',
        because: 'Disc position and joint surfaces are seen on open- and closed-mouth non-contrast images.',
        plain: 'Pictures with your mouth open and closed show the disc. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'Imaging of juvenile idiopathic arthritis: a multimodality approach',
        body: 'RadioGraphics',
        year: 2013,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Contrast for mechanical jaw symptoms.',
    alternatives: 'If contrast cannot be given: fat-suppressed T2; ultrasound.',
    searchWords: [
      'TMJ', 'TMD', 'jaw pain', 'jaw clicking', 'lockjaw', 'internal derangement jaw', 'temporomandibular',
    ],
  },
  {
    id: 'parotid-salivary-mass',
    region: 'head and neck',
    exam: 'MRI salivary glands',
    question: 'Parotid or submandibular mass: benign or malignant, and how deep?',
    plainQuestion: 'What is the lump in my salivary gland?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'spread along nerves and the kind of tumor show by enhancement',
        because: 'Deep lobe extent shows on T1, but perineural spread and a tumor’s enhancement curve need contrast.',
        plain: 'Contrast helps show what kind of lump it is and whether it follows a nerve.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Neck Mass/Adenopathy',
        body: 'American College of Radiology',
        year: 2019,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering the study without contrast when cancer or spread along a nerve is the question.',
    alternatives: 'Ultrasound with needle sampling; T1, T2 and diffusion without contrast map extent.',
    searchWords: [
      'parotid', 'parotid tumor', 'pleomorphic adenoma', 'Warthin', 'submandibular gland', 'salivary tumor',
      'cheek lump', 'lump in front of ear',
    ],
  },
  {
    id: 'neck-artery-dissection-stenosis',
    region: 'head and neck',
    exam: 'MRA neck with fat-suppressed T1',
    question: 'Suspected dissection, or how tight is a carotid narrowing?',
    plainQuestion: 'Is a blood vessel in my neck torn or narrow?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'aim',
        kind: 'choice',
        ask: 'What must be answered?',
        options: [
          { id: 'stenosis', label: 'Degree of narrowing before a procedure' },
          { id: 'dissection', label: 'Dissection, or a first look at the vessels' },
        ],
      },
    ],
    branches: [
      {
        when: { aim: ['stenosis'] },
        contrast: 'iv-with-and-without',
        inShort: 'flow images alone overstate a tight narrowing',
        because: 'Contrast MRA avoids the overestimation of tight stenosis seen with time-of-flight.',
        plain: 'Contrast measures the narrow part more exactly. That matters before a procedure.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'clot in the torn wall shows on fat-suppressed T1 images unaided',
        because: 'The wall hematoma shows on fat-suppressed T1 and flow on time-of-flight; contrast is added if the lumen stays unclear. Local choice: many departments use contrast MRA for the lumen from the start.',
        plain: 'A tear in the vessel wall shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Cerebrovascular Disease',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Cerebrovascular Diseases: Stroke and Stroke-Related Conditions',
        body: 'American College of Radiology',
        year: 2024,
        status: 'from memory',
      },
    ],
    commonError: 'Leaving out the fat-suppressed T1 sequence that shows the wall hematoma.',
    alternatives: 'Duplex ultrasound, CT angiography.',
    searchWords: [
      'carotid', 'carotid stenosis', 'vertebral dissection', 'carotid dissection', 'MRA neck', 'Horner',
      'neck trauma', 'bruit', 'ICA stenosis', 'whiplash',
    ],
  },
]
