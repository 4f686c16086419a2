import type { ClinicalQuestion } from '../types'

/** Starter questions: wrist; most common first. */
export const wristQuestions: ClinicalQuestion[] = [
  {
    id: 'wrist-occult-fracture',
    region: 'wrist',
    exam: 'MRI wrist',
    question: 'Wrist injury with normal X-ray: scaphoid fracture?',
    plainQuestion: 'Is a small bone in my wrist broken?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'marrow swelling and the fracture line show within hours unaided',
        because: 'Marrow edema and the fracture line are seen on T1 and STIR within hours.',
        plain: 'A hidden break shows right away on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Acute Hand and Wrist Trauma',
        body: 'American College of Radiology',
        year: 2008,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast for an acute scaphoid question.',
    alternatives: 'CT.',
    searchWords: [
      'scaphoid', 'occult scaphoid', 'snuffbox tenderness', 'FOOSH', 'broken wrist', 'wrist fracture',
      'r/o fracture wrist', 'carpal fracture', 'scafoid',
    ],
  },
  {
    id: 'wrist-ligament-tfcc',
    region: 'wrist',
    exam: 'MRI or MR arthrogram wrist',
    question: 'Ulnar-sided pain or suspected ligament tear?',
    plainQuestion: 'Is a ligament torn in my wrist?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'surgeryUnclear',
        kind: 'yesno',
        ask: 'Is surgery being considered after a routine MRI that was unclear?',
      },
    ],
    branches: [
      {
        when: { surgeryUnclear: ['yes'] },
        contrast: 'intra-articular',
        inShort: 'contrast passing between joint spaces proves a small tear',
        because: 'Contrast flow between compartments shows small perforations and ligament tears.',
        plain: 'Contrast in the joint leaks through a small hole and shows it.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a high-resolution wrist study answers most questions without an injection',
        because: 'High-resolution 3T images with a wrist coil answer most questions without an injection. Local choice: guidance accepts an arthrogram as the first study as well.',
        plain: 'Sharp MRI pictures without contrast are the first step.',
      },
    ],
    sources: [
      {
        title: 'MRI of the wrist (review: plain 3T first, arthrogram for unclear cases before surgery)',
        body: 'Applied Radiology',
        year: null,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Chronic Hand and Wrist Pain, 2023 Update',
        body: 'American College of Radiology',
        year: 2024,
        status: 'from memory',
      },
    ],
    commonError: 'Arthrogram before any routine MRI.',
    alternatives: 'If a joint injection is not possible: high-resolution 3T study; CT arthrography; arthroscopy.',
    searchWords: [
      'TFCC', 'triangular fibrocartilage', 'scapholunate', 'SL ligament', 'lunotriquetral', 'ulnar wrist pain',
      'wrist arthrogram', 'wrist instability', 'ulnar impaction',
    ],
  },
  {
    id: 'wrist-hand-ganglion',
    region: 'wrist',
    exam: 'MRI wrist or hand',
    question: 'Lump at the wrist or hand: ganglion?',
    plainQuestion: 'What is the lump on my wrist?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'solid',
        kind: 'yesno',
        ask: 'Is it solid or unusual on ultrasound, or growing?',
      },
    ],
    branches: [
      {
        when: { solid: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a solid or growing lump must be told from a cyst',
        because: 'A solid mass must be separated from a cyst, which needs enhancement.',
        plain: 'Contrast tells a solid lump from a fluid sac.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a cyst with its stalk shows on fluid-sensitive images',
        because: 'A joint-related cyst with a stalk is recognized on fluid-sensitive images.',
        plain: 'A fluid sac shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Soft-Tissue Masses',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Chronic Hand and Wrist Pain, 2023 Update',
        body: 'American College of Radiology',
        year: 2024,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast for a typical ganglion that ultrasound has already shown.',
    alternatives: 'Ultrasound first.',
    searchWords: [
      'ganglion', 'ganglion cyst', 'wrist lump', 'hand mass', 'finger mass', 'giant cell tumor tendon sheath',
      'bible cyst', 'mucous cyst',
    ],
  },
  {
    id: 'inflammatory-arthritis-hand',
    region: 'wrist',
    exam: 'MRI hand and wrist',
    question: 'Early inflammatory arthritis: is there synovitis?',
    plainQuestion: 'Is there hidden arthritis in my hands?',
    volume: 2,
    usualBranch: 0,
    deciders: [
      {
        id: 'synovitis',
        kind: 'yesno',
        ask: 'Will finding inflamed joint or tendon lining change the treatment?',
      },
    ],
    branches: [
      {
        when: { synovitis: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates inflamed lining from joint fluid',
        because: 'Contrast separates inflamed lining from fluid. Local choice: guidance accepts the study with or without contrast.',
        plain: 'Contrast lights up inflamed joint lining.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'erosions and bone swelling show unaided',
        because: 'Erosions and bone edema, which predict damage, are seen without contrast.',
        plain: 'Bone swelling and small holes show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Extremity Joint Pain, Suspected Inflammatory Arthritis',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Chronic Extremity Joint Pain, Suspected Inflammatory Arthritis, 2022 Update',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast when the treatment will not change with the result.',
    alternatives: 'Power Doppler ultrasound.',
    searchWords: [
      'rheumatoid', 'RA', 'rheumatoid arthritis', 'psoriatic', 'PsA', 'synovitis', 'tenosynovitis',
      'early arthritis', 'hand arthritis', 'swollen joints', 'erosions',
    ],
  },
  {
    id: 'scaphoid-nonunion-viability',
    region: 'wrist',
    exam: 'MRI wrist',
    question: 'Old scaphoid fracture: is the proximal pole alive?',
    plainQuestion: 'Does the broken piece of bone still get blood?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'discuss',
        inShort: 'the value of enhancement beyond T1 marrow signal is debated',
        because: 'T1 marrow signal predicts viability, and the added value of enhancement is debated; the hand surgeon and radiologist should agree.',
        plain: 'Some teams use contrast to check the blood flow to the bone. The radiologist will decide.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Hand and Wrist Pain, 2023 Update',
        body: 'American College of Radiology',
        year: 2024,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast without asking the surgeon and the radiologist whether it will change the plan.',
    alternatives: 'CT for union.',
    searchWords: [
      'scaphoid nonunion', 'AVN scaphoid', 'proximal pole', 'avascular necrosis wrist', 'bone graft',
      'old scaphoid fracture', 'Preiser',
    ],
  },
]
