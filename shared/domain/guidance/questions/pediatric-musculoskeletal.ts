import type { ClinicalQuestion } from '../types'

/** Starter questions: pediatric musculoskeletal; most common first. */
export const pediatricMusculoskeletalQuestions: ClinicalQuestion[] = [
  {
    id: 'child-limp-osteomyelitis',
    region: 'pediatric musculoskeletal',
    exam: 'MRI pelvis and legs',
    question: 'Limping child with fever: bone or joint infection?',
    plainQuestion: 'Is there an infection in my child’s bone or hip?',
    volume: 2,
    usualBranch: 0,
    deciders: [
      {
        id: 'stirClean',
        kind: 'yesno',
        ask: 'Was an MRI of the painful area without contrast already normal in this illness?',
      },
    ],
    branches: [
      {
        when: { stirClean: ['yes'] },
        contrast: 'none',
        inShort: 'a normal non-contrast scan already excludes bone infection',
        because: 'A normal STIR excludes osteomyelitis and contrast can be spared.',
        plain: 'The first pictures look normal, so no contrast is needed.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'abscess and starved growth cartilage show by enhancement',
        because: 'Abscess and ischemic growth cartilage are seen with contrast. Local choice: guidance also accepts a study without contrast when the pain is well localized, and many units look at the STIR first and then decide.',
        plain: 'Contrast shows pus, and whether blood reaches the growing part of the bone.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Osteomyelitis, Septic Arthritis, or Soft Tissue Infection, 2022 Update',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
      {
        title: 'ACR Appropriateness Criteria: Acutely Limping Child Up to Age 5',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering one hip alone when the painful place is not certain.',
    alternatives: 'If contrast cannot be given: STIR with diffusion; ultrasound for joint fluid and abscess.',
    searchWords: [
      'limping child', 'limp', 'hip pain child', 'septic hip', 'transient synovitis', 'pediatric osteomyelitis',
      'refusal to walk', 'bone infection child', 'not walking',
    ],
  },
  {
    id: 'child-perthes',
    region: 'pediatric musculoskeletal',
    exam: 'MRI hips',
    question: 'Child with suspected Perthes disease?',
    plainQuestion: 'Has my child’s hip bone lost its blood supply?',
    volume: 1,
    usualBranch: 0,
    deciders: [
      {
        id: 'early',
        kind: 'yesno',
        ask: 'Is the X-ray normal and early perfusion the question, or is revascularization being followed?',
      },
    ],
    branches: [
      {
        when: { early: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'lost blood supply in early disease shows by missing enhancement',
        because: 'Reduced perfusion precedes marrow change in early disease, so subtraction images after contrast may be needed.',
        plain: 'Contrast shows if blood reaches the bone.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'established shape and extent show on non-contrast images',
        because: 'Established shape and extent are read without contrast.',
        plain: 'MRI pictures without contrast show the shape of the hip.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Osteonecrosis of the Hip',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Adding contrast when X-ray has already shown established disease.',
    alternatives: 'If contrast cannot be given: diffusion with T1 and STIR; X-ray follow-up.',
    searchWords: [
      'Perthes', 'Legg-Calve-Perthes', 'LCPD', 'AVN child hip', 'childhood hip', 'hip necrosis child',
    ],
  },
  {
    id: 'child-juvenile-arthritis',
    region: 'pediatric musculoskeletal',
    exam: 'MRI of the joint',
    question: 'Juvenile idiopathic arthritis: active synovitis?',
    plainQuestion: 'Is my child’s joint inflamed?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates inflamed joint lining from fluid best',
        because: 'Contrast is the most sensitive way to separate synovitis from fluid.',
        plain: 'Contrast lights up inflamed joint lining.',
      },
    ],
    sources: [
      {
        title: 'Imaging of juvenile idiopathic arthritis: a multimodality approach',
        body: 'RadioGraphics',
        year: 2013,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering without contrast when active inflammation of the joint is the question.',
    alternatives: 'Power Doppler ultrasound; diffusion.',
    searchWords: [
      'JIA', 'JRA', 'juvenile rheumatoid', 'juvenile idiopathic arthritis', 'childhood arthritis',
      'child swollen joint', 'TMJ JIA', 'pediatric arthritis', 'synovitis child',
    ],
  },
]
