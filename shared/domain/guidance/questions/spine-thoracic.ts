import type { ClinicalQuestion } from '../types'

/** Starter questions: spine, thoracic; most common first. */
export const spineThoracicQuestions: ClinicalQuestion[] = [
  {
    id: 'vertebral-fracture-benign-malignant',
    region: 'spine, thoracic',
    exam: 'MRI spine',
    question: 'Vertebral compression fracture: osteoporotic or malignant, and is it new?',
    plainQuestion: 'Is the break in my spine from weak bone or from something else?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'suspicious',
        kind: 'yesno',
        ask: 'Is there known cancer, a soft-tissue mass, or an odd pattern on earlier imaging?',
      },
    ],
    branches: [
      {
        when: { suspicious: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancing tissue beside the bone supports a malignant cause',
        because: 'Paraspinal or epidural soft tissue and abnormal enhancement support a malignant cause.',
        plain: 'Contrast helps show if something other than weak bone caused the break.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'fracture age and benign marrow show on T1, STIR and diffusion images',
        because: 'Age of the fracture and a benign marrow pattern are read from T1, STIR and diffusion.',
        plain: 'MRI pictures without contrast show if the break is new and whether the bone looks healthy.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Management of Vertebral Compression Fractures',
        body: 'American College of Radiology',
        year: 2022,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast for a routine osteoporotic fracture before cement treatment.',
    alternatives: 'If contrast cannot be given: T1, STIR, diffusion and chemical shift separate most cases; CT.',
    searchWords: [
      'compression fracture', 'VCF', 'osteoporotic fracture', 'insufficiency fracture', 'pathologic fracture',
      'vertebral body fracture', 'kyphoplasty', 'vertebroplasty', 'collapsed vertebra', 'broken back',
    ],
  },
  {
    id: 'thoracic-back-pain',
    region: 'spine, thoracic',
    exam: 'MRI thoracic spine',
    question: 'Thoracic back pain: fracture, disc or something else?',
    plainQuestion: 'Why does my upper back hurt?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'redFlag',
        kind: 'choice',
        ask: 'Which of these applies? If more than one does, choose infection or cancer before fracture.',
        options: [
          { id: 'none', label: 'None' },
          { id: 'cancer', label: 'Known or suspected cancer' },
          { id: 'infection', label: 'Fever, injection drug use, bacteremia, immune suppression or raised inflammatory markers' },
          { id: 'fracture', label: 'Fracture suspected: trauma, osteoporosis or steroid use' },
        ],
      },
    ],
    branches: [
      {
        when: { redFlag: ['cancer', 'infection'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancement shows spread of infection or cancer around the spine',
        because: 'The thoracic spine is a common site of metastasis and infection; enhancement shows epidural and paraspinal spread. Known cancer with a question of bone spread alone is better asked as spinal metastases.',
        plain: 'The team wants to rule out infection or a growth. Contrast makes these clear.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'fracture, disc and cord compression show on non-contrast images',
        because: 'Fracture, disc and cord compression are seen on T1, T2 and STIR.',
        plain: 'MRI pictures without contrast show breaks and disc problems.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Spine Infection',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Adding contrast for disc or fracture pain without fever or cancer.',
    alternatives: 'If contrast cannot be given: T1, STIR and diffusion detect most infection and tumor.',
    searchWords: [
      'mid back pain', 'upper back pain', 'T-spine', 'thoracic pain', 'thoracic disc', 'thoracic radiculopathy',
      'rib pain', 'between shoulder blades',
    ],
  },
]
