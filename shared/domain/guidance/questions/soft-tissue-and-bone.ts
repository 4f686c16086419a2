import type { ClinicalQuestion } from '../types'

/** Starter questions: soft tissue and bone; most common first. */
export const softTissueAndBoneQuestions: ClinicalQuestion[] = [
  {
    id: 'soft-tissue-mass',
    region: 'soft tissue and bone',
    exam: 'MRI of the mass',
    question: 'Lump in the soft tissue: what is it?',
    plainQuestion: 'What is the lump under my skin?',
    volume: 4,
    usualBranch: 1,
    deciders: [
      {
        id: 'benignOnUltrasound',
        kind: 'yesno',
        ask: 'Has ultrasound shown a classic superficial lipoma or a simple cyst or ganglion?',
      },
    ],
    branches: [
      {
        when: { benignOnUltrasound: ['yes'] },
        contrast: 'none',
        inShort: 'fat and fluid in a benign lump show on non-contrast images',
        because: 'If MRI is needed at all, fat and fluid are proven on non-contrast images.',
        plain: 'The MRI can confirm a fatty lump or a fluid sac. No contrast is needed.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates solid from cystic and guides the biopsy',
        because: 'Enhancement separates cystic from solid, finds the viable part for biopsy and completes local staging.',
        plain: 'Contrast shows solid parts and helps plan a biopsy.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Soft-Tissue Masses',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
    ],
    commonError: 'Non-contrast MRI for a deep or growing mass.',
    alternatives: 'Ultrasound with Doppler; diffusion.',
    searchWords: [
      'lump', 'bump', 'mass', 'soft tissue tumor', 'lipoma', 'sarcoma', 'palpable mass', 'swelling', 'STS',
      'thigh mass', 'growing lump', 'liposarcoma', 'nerve sheath tumor',
    ],
  },
  {
    id: 'osteomyelitis-septic-joint',
    region: 'soft tissue and bone',
    exam: 'MRI of the area',
    question: 'Suspected bone, joint or deep soft-tissue infection (not spine or diabetic foot)?',
    plainQuestion: 'Is there an infection in my bone or joint?',
    volume: 3,
    usualBranch: 0,
    deciders: [
      {
        id: 'boneOnly',
        kind: 'yesno',
        ask: 'Is the only question bone infection in an adult limb, with no abscess, septic joint or necrotizing infection suspected?',
      },
    ],
    branches: [
      {
        when: { boneOnly: ['yes'] },
        contrast: 'none',
        inShort: 'normal marrow on T1 and STIR images excludes bone infection',
        because: 'T1 and STIR alone are highly sensitive for marrow infection and a normal study excludes it. Local choice: guidance names the contrast study as the first choice, so add it if the plain images show infection.',
        plain: 'Bone infection shows on the MRI. No contrast is needed.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'abscess, joint infection and dead tissue show by enhancement',
        because: 'Abscess, synovitis, sinus tracts and non-viable tissue are defined by enhancement.',
        plain: 'Contrast shows pus that may need to be drained.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Osteomyelitis, Septic Arthritis, or Soft Tissue Infection',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Suspected Osteomyelitis, Septic Arthritis, or Soft Tissue Infection, 2022 Update',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Delaying surgery for MRI in necrotizing infection.',
    alternatives: 'T1, STIR and diffusion; ultrasound for collections and aspiration.',
    searchWords: [
      'osteomyelitis', 'osteo', 'OM', 'r/o osteo', 'septic arthritis', 'septic joint', 'abscess', 'cellulitis',
      'necrotizing fasciitis', 'bone infection', 'joint infection', 'pressure ulcer', 'osteomylitis',
    ],
  },
  {
    id: 'sarcoma-follow-up',
    region: 'soft tissue and bone',
    exam: 'MRI of the tumor bed',
    question: 'After sarcoma treatment: recurrence?',
    plainQuestion: 'Has my tumor come back?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'an enhancing nodule in the tumor bed is the sign of recurrence',
        because: 'Nodular enhancement in the bed is recurrence until proven otherwise.',
        plain: 'Contrast helps tell scar from tumor.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Malignant or Aggressive Primary Musculoskeletal Tumor, Staging and Surveillance',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering without contrast, or leaving out where and when the tumor was removed.',
    alternatives: 'T2 with diffusion: fluid-bright nodule first, contrast only if present.',
    searchWords: [
      'sarcoma', 'soft tissue sarcoma', 'STS follow up', 'tumor bed', 'post resection', 'recurrence surveillance',
      'liposarcoma', 'osteosarcoma follow up',
    ],
  },
  {
    id: 'bone-lesion',
    region: 'soft tissue and bone',
    exam: 'MRI of the bone',
    question: 'Bone lesion on X-ray: local extent?',
    plainQuestion: 'What is the spot in my bone?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'benignXray',
        kind: 'yesno',
        ask: 'Is it clearly benign on X-ray?',
      },
    ],
    branches: [
      {
        when: { benignXray: ['yes'] },
        contrast: 'none',
        inShort: 'extent of a clearly benign lesion shows on non-contrast images',
        because: 'Extent and marrow fat are shown without contrast; often no MRI is needed.',
        plain: 'A harmless spot needs at most a scan without contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'soft-tissue growth and live tumor are staged by enhancement',
        because: 'Soft-tissue component, viable tumor and joint involvement are staged before biopsy.',
        plain: 'Contrast shows the whole extent before a biopsy.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Primary Bone Tumors',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
    ],
    commonError: 'MRI before an X-ray.',
    alternatives: 'If contrast cannot be given: T1, STIR and diffusion stage most lesions.',
    searchWords: [
      'bone tumor', 'bone mass', 'lytic lesion', 'osteosarcoma', 'Ewing', 'enchondroma', 'giant cell tumor of bone',
      'osteochondroma', 'bone cyst', 'chondrosarcoma', 'sclerotic lesion', 'bone spot',
    ],
  },
  {
    id: 'muscle-injury-myositis',
    region: 'soft tissue and bone',
    exam: 'MRI of the muscle',
    question: 'Muscle tear or myositis?',
    plainQuestion: 'Is my muscle torn or inflamed?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'swelling and tears of muscle show on STIR images',
        because: 'STIR shows edema and tears, and picks the biopsy site in myositis. Suspected abscess or a mass belongs to the infection or the soft-tissue mass question.',
        plain: 'Swelling in the muscle shows on the MRI. No contrast is needed.',
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
    commonError: 'Contrast for a hamstring tear.',
    alternatives: null,
    searchWords: [
      'muscle tear', 'hamstring', 'pulled muscle', 'strain', 'myositis', 'polymyositis', 'dermatomyositis', 'CK',
      'myopathy', 'quadriceps tear', 'calf strain', 'pec tear', 'muscle biopsy site',
    ],
  },
]
