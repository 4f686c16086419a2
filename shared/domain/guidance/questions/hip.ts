import type { ClinicalQuestion } from '../types'

/** Starter questions: hip; most common first. */
export const hipQuestions: ClinicalQuestion[] = [
  {
    id: 'hip-occult-fracture',
    region: 'hip',
    exam: 'MRI hip and pelvis',
    question: 'Fall with normal X-ray: hidden hip fracture?',
    plainQuestion: 'Is my hip broken even though the X-ray looked normal?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'T1 and STIR images show the fracture within hours',
        because: 'T1 and STIR show the fracture within hours of injury.',
        plain: 'A hidden break shows right away without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Acute Hip Pain, Suspected Fracture',
        body: 'American College of Radiology',
        year: 2013,
        status: 'confirmed',
      },
    ],
    commonError: 'Waiting for kidney results before a hip fracture scan.',
    alternatives: 'CT.',
    searchWords: [
      'hip fracture', 'broken hip', 'occult hip fracture', 'femoral neck fracture', 'fall elderly',
      'unable to bear weight', 'NOF fracture', 'r/o fracture hip', 'pelvic fracture',
    ],
  },
  {
    id: 'hip-osteonecrosis',
    region: 'hip',
    exam: 'MRI hips',
    question: 'Suspected osteonecrosis of the femoral head?',
    plainQuestion: 'Has the bone in my hip lost its blood supply?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'dead bone is outlined by its own signal in adults',
        because: 'The double-line sign and extent are read without contrast in adults.',
        plain: 'The damaged bone has a clear outline on MRI pictures without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Osteonecrosis, 2022 Update',
        body: 'American College of Radiology',
        year: 2022,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Osteonecrosis of the Hip',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast for adult osteonecrosis; early Perthes disease in a child is the exception.',
    alternatives: null,
    searchWords: [
      'AVN', 'avascular necrosis', 'osteonecrosis', 'ON hip', 'femoral head', 'steroids hip', 'sickle cell hip',
      'bone infarct',
    ],
  },
  {
    id: 'hip-labrum-impingement',
    region: 'hip',
    exam: 'MRI or MR arthrogram hip',
    question: 'Groin pain with catching: labral tear or impingement?',
    plainQuestion: 'Is the rim of my hip socket torn?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'surgery',
        kind: 'yesno',
        ask: 'Is hip-preserving surgery considered, after a plain hip MRI that was unclear?',
      },
    ],
    branches: [
      {
        when: { surgery: ['yes'] },
        contrast: 'intra-articular',
        inShort: 'a filled joint shows a labral tear before surgery',
        because: 'Intra-articular contrast separates labrum from capsule and fills the tear, with better sensitivity than standard MRI. Local choice: sites without a 3T scanner may start with the arthrogram.',
        plain: 'Contrast in the joint flows into a tear and shows it.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a dedicated hip study shows many tears and the bone shape unaided',
        because: 'A dedicated 3T hip study shows many labral tears and all of the bone shape; many patients need no injection.',
        plain: 'A sharp plain scan is often enough to plan the next step.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Hip Pain',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'IV contrast ordered instead of intra-articular, or a pelvis MRI instead of a dedicated hip study.',
    alternatives: 'CT arthrography.',
    searchWords: [
      'FAI', 'femoroacetabular impingement', 'hip labral tear', 'hip labrum', 'cam', 'pincer', 'hip arthrogram',
      'hip clicking', 'groin pain', 'hip impingement', 'hip dysplasia',
    ],
  },
  {
    id: 'greater-trochanteric-pain',
    region: 'hip',
    exam: 'MRI hip and pelvis',
    question: 'Lateral hip pain: gluteal tendon tear or bursitis?',
    plainQuestion: 'Why does the side of my hip hurt?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'tendon tears and bursitis show on fluid-sensitive images',
        because: 'Tendon tear, bursitis and muscle atrophy are fluid-sensitive diagnoses.',
        plain: 'Torn tendons and swelling show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Hip Pain',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering an arthrogram, which is meant for the labrum.',
    alternatives: 'Ultrasound.',
    searchWords: [
      'GTPS', 'trochanteric bursitis', 'gluteus medius', 'gluteal tendinopathy', 'lateral hip pain', 'hip bursitis',
      'side of hip',
    ],
  },
  {
    id: 'hip-replacement-pain',
    region: 'hip',
    exam: 'MRI hip, metal-reduction',
    question: 'Pain after hip replacement?',
    plainQuestion: 'Why does my new hip hurt?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'infection',
        kind: 'yesno',
        ask: 'Is infection suspected?',
      },
    ],
    branches: [
      {
        when: { infection: ['yes'] },
        contrast: 'discuss',
        inShort: 'aspiration decides about infection, and contrast may show inflamed lining and collections',
        because: 'Aspiration is the decisive test; contrast may show synovitis and collections and can be added.',
        plain: 'A needle test of the joint gives the best answer. The team will decide if contrast helps.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'metal-reduction images show fluid, loosening and metal reaction',
        because: 'Metal-reduction images show fluid, loosening and metal reaction.',
        plain: 'Special pictures reduce the metal glare. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Imaging After Total Hip Arthroplasty',
        body: 'American College of Radiology',
        year: 2023,
        status: 'confirmed',
      },
    ],
    commonError: 'Assuming that metal rules out MRI.',
    alternatives: 'If contrast cannot be given: metal-reduction T1, T2 and STIR; aspiration decides.',
    searchWords: [
      'THA', 'THR', 'total hip', 'hip arthroplasty', 'hip prosthesis', 'MARS', 'metal on metal', 'ALVAL',
      'metallosis', 'pseudotumor', 'new hip', 'artificial hip',
    ],
  },
  {
    id: 'groin-pain-athlete',
    region: 'hip',
    exam: 'MRI pelvis, athletic groin protocol',
    question: 'Athlete with groin pain?',
    plainQuestion: 'Why does my groin hurt when I run?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'adductor tears and bone swelling show on fluid-sensitive images',
        because: 'Pubic plate and adductor tears and bone edema are non-contrast findings.',
        plain: 'Tears and bone swelling show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Hip Pain',
        body: 'American College of Radiology',
        year: 2016,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Ordering a hip MRI or an arthrogram when the pain comes from the pubic bone.',
    alternatives: null,
    searchWords: [
      'sports hernia', 'athletic pubalgia', 'core muscle injury', 'osteitis pubis', 'adductor strain',
      'groin strain', 'pubic symphysis', 'groin injury',
    ],
  },
]
