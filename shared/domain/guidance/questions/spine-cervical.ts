import type { ClinicalQuestion } from '../types'

/** Starter questions: spine, cervical; most common first. */
export const spineCervicalQuestions: ClinicalQuestion[] = [
  {
    id: 'neck-pain-arm-radiculopathy',
    region: 'spine, cervical',
    exam: 'MRI cervical spine',
    question: 'Neck pain with arm pain, numbness or weakness: is a root compressed?',
    plainQuestion: 'Is a pinched nerve in my neck causing my arm pain?',
    volume: 5,
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
        inShort: 'suspected infection or cancer is mapped by its enhancement',
        because: 'Suspected infection or known cancer changes the target from discs to enhancing tissue. Known cancer with a question of bone spread alone is better asked as spinal metastases.',
        plain: 'The team wants to rule out infection or a growth. Contrast makes these clear.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'discs, bone spurs and fractures show fully on non-contrast images',
        because: 'Disc, osteophyte and fracture are seen without contrast, and enhancement does not change the choice of level.',
        plain: 'A pinched nerve shows well on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Cervical Neck Pain or Cervical Radiculopathy',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast for simple cervical radiculopathy.',
    alternatives: 'If contrast cannot be given: T1, STIR and diffusion detect most infection and tumor.',
    searchWords: [
      'cervical radiculopathy', 'pinched nerve', 'neck pain', 'arm numbness', 'arm tingling', 'C-spine',
      'HNP cervical', 'cervical stenosis', 'cervicalgia', 'stiff neck', 'radicular pain',
    ],
  },
  {
    id: 'myelopathy',
    region: 'spine, cervical',
    exam: 'MRI of the affected spine level',
    question: 'Signs of spinal cord disease: compression or disease within the cord?',
    plainQuestion: 'Is my spinal cord being squeezed or inflamed?',
    volume: 3,
    usualBranch: 0,
    deciders: [
      {
        id: 'leading',
        kind: 'choice',
        ask: 'What is most likely?',
        options: [
          { id: 'degenerative', label: 'Degenerative narrowing, slow course' },
          { id: 'trauma', label: 'Recent injury' },
          { id: 'other', label: 'Inflammation, tumor, infection, vascular disease or unknown' },
        ],
      },
    ],
    branches: [
      {
        when: { leading: ['degenerative', 'trauma'] },
        contrast: 'none',
        inShort: 'compression and bruising of the cord show on plain T2 images',
        because: 'Cord compression and contusion are shown on non-contrast T2 and STIR.',
        plain: 'MRI pictures without contrast show if the cord is being squeezed or bruised.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'disease within the cord is told apart by how it enhances',
        because: 'Transverse myelitis, tumor, abscess and dural fistula each have an enhancement pattern that narrows the list.',
        plain: 'There are several possible causes. Contrast helps tell them apart.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Myelopathy',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Myelopathy, 2021 Update',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Skipping contrast in acute non-traumatic myelopathy with no compression.',
    alternatives: 'If contrast cannot be given: T2, STIR and diffusion first; spinal fluid and antibody tests.',
    searchWords: [
      'spinal cord compression', 'cord compression', 'transverse myelitis', 'hyperreflexia', 'clumsy hands',
      'gait problems', 'DCM', 'cervical myelopathy', 'CSM', 'cord lesion', 'myelitis', 'Hoffman sign', 'spasticity',
    ],
  },
  {
    id: 'cord-ms',
    region: 'spine, cervical',
    exam: 'MRI cervical and thoracic cord',
    question: 'Cord lesions in suspected or known MS?',
    plainQuestion: 'Does my MS affect my spinal cord?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'stage',
        kind: 'choice',
        ask: 'What is the stage?',
        options: [
          { id: 'first', label: 'First work-up' },
          { id: 'attack', label: 'Known MS, new cord symptoms' },
          { id: 'known', label: 'Known MS, routine check' },
        ],
      },
    ],
    branches: [
      {
        when: { stage: ['first', 'attack'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancement dates cord lesions at diagnosis and with new cord symptoms',
        because: 'At diagnosis, enhancement dates lesions and separates MS from other antibody diseases. With new cord symptoms it confirms activity, since small cord lesions are hard to compare on T2 alone.',
        plain: 'Contrast shows which spots are new and helps find the cause.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'new cord lesions show by comparison of matched T2 images',
        because: 'New T2 cord lesions on matched images are enough for monitoring; routine cord scans are not needed in every patient.',
        plain: 'New spots can be found by comparing with your last scan.',
      },
    ],
    sources: [
      {
        title: 'MAGNIMS-CMSC-NAIMS consensus recommendations on the use of MRI in patients with multiple sclerosis',
        body: 'Lancet Neurology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Routine contrast cord MRI in stable MS.',
    alternatives: 'If contrast cannot be given: T2 and STIR in two planes; a repeat scan shows new lesions.',
    searchWords: [
      'MS spine', 'MS cord', 'multiple sclerosis spine', 'cervical cord MS', 'demyelinating cord lesion', 'myelitis',
      'Lhermitte', 'NMO',
    ],
  },
  {
    id: 'spine-trauma',
    region: 'spine, cervical',
    exam: 'MRI spine',
    question: 'Injury with neurologic signs or unclear CT: ligament, disc or cord injury?',
    plainQuestion: 'Did my accident hurt my spinal cord or ligaments?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'cord, disc and ligament injury show on T2 and STIR images',
        because: 'Cord edema and hemorrhage, disc and ligament tears are shown by T2, STIR and gradient images.',
        plain: 'Injured tissue shows clearly on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Spine Trauma',
        body: 'American College of Radiology',
        year: 2018,
        status: 'from memory',
      },
      {
        title: 'ACR Appropriateness Criteria: Myelopathy',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Adding contrast to spine trauma.',
    alternatives: null,
    searchWords: [
      'spinal cord injury', 'SCI', 'ligament injury', 'SCIWORA', 'neck injury', 'MVA', 'fall',
      'fracture dislocation', 'whiplash', 'car accident', 'c-spine clearance',
    ],
  },
  {
    id: 'syrinx',
    region: 'spine, cervical',
    exam: 'MRI spine',
    question: 'Syrinx: cause and follow-up?',
    plainQuestion: 'Why is there a fluid space in my spinal cord?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'firstLook',
        kind: 'yesno',
        ask: 'Is this the first full work-up, with no Chiari malformation or injury to explain it?',
      },
    ],
    branches: [
      {
        when: { firstLook: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'an unexplained syrinx needs a cord tumor ruled out once',
        because: 'A cord tumor must be excluded once by enhancement.',
        plain: 'The first scan with contrast checks for a growth behind the fluid.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'the length and width of a known syrinx show on T2 images',
        because: 'Length and width are measured on T2.',
        plain: 'The size of the fluid space shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Contrast at each follow-up of an explained syrinx.',
    alternatives: 'If contrast cannot be given: T2 of the whole cord with a repeat scan after some months.',
    searchWords: [
      'syringomyelia', 'hydromyelia', 'syrinx', 'cyst in spinal cord', 'central canal', 'cord cyst',
      'syringohydromyelia',
    ],
  },
]
