import type { ClinicalQuestion } from '../types'

/** Starter questions: knee; most common first. */
export const kneeQuestions: ClinicalQuestion[] = [
  {
    id: 'knee-internal-derangement',
    region: 'knee',
    exam: 'MRI knee',
    question: 'Knee injury: meniscus, ligament or cartilage?',
    plainQuestion: 'Is the cartilage or a ligament torn in my knee?',
    volume: 5,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'menisci, ligaments and bone show fully on non-contrast images',
        because: 'Meniscus, cruciate ligaments and marrow are complete on proton density and fluid-sensitive images.',
        plain: 'A tear shows clearly on plain MRI pictures. Contrast would not help.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Acute Trauma to the Knee',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
    ],
    commonError: '"With and without" for a meniscal tear.',
    alternatives: null,
    searchWords: [
      'ACL', 'PCL', 'MCL', 'LCL', 'meniscus', 'meniscal tear', 'menicus', 'torn cartilage', 'cruciate',
      'knee injury', 'twisted knee', 'knee giving way', 'knee locking', 'patella dislocation', 'bucket handle',
      'ACL tear',
    ],
  },
  {
    id: 'knee-chronic-pain',
    region: 'knee',
    exam: 'MRI knee',
    question: 'Chronic knee pain, osteoarthritis or locking?',
    plainQuestion: 'Why does my knee keep hurting?',
    volume: 4,
    usualBranch: 1,
    deciders: [
      {
        id: 'synovialOrInfection',
        kind: 'yesno',
        ask: 'Is synovial tumor, inflammatory arthritis or infection suspected?',
      },
    ],
    branches: [
      {
        when: { synovialOrInfection: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'disease of the joint lining is graded by its enhancement',
        because: 'Synovial disease is graded by enhancement.',
        plain: 'Contrast shows if the joint lining is inflamed or growing.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'cartilage, bone swelling and meniscal tears show on non-contrast images',
        because: 'Cartilage, bone edema and meniscal tears are non-contrast findings. In an older adult with osteoarthritis on X-ray, MRI often changes nothing.',
        plain: 'Worn cartilage shows on MRI pictures without contrast. Many people do not need an MRI for this.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Knee Pain',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'MRI of any kind before an X-ray in an older adult.',
    alternatives: 'If contrast cannot be given: proton density and gradient images show most synovial tumor; ultrasound; aspiration for infection.',
    searchWords: [
      'OA knee', 'osteoarthritis', 'knee arthritis', 'patellofemoral', 'chondromalacia', 'PVNS', 'TGCT',
      'anterior knee pain', 'bad knee', 'runner knee', 'knee swelling', 'Baker cyst',
    ],
  },
  {
    id: 'knee-after-meniscal-repair',
    region: 'knee',
    exam: 'MRI or MR arthrogram knee',
    question: 'New pain after meniscal repair or large resection: re-tear?',
    plainQuestion: 'Has my repaired cartilage torn again?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'repair',
        kind: 'yesno',
        ask: 'Was the meniscus sutured or more than about a quarter removed, and would a re-tear lead to surgery?',
      },
    ],
    branches: [
      {
        when: { repair: ['yes'] },
        contrast: 'intra-articular',
        inShort: 'contrast flowing into the repair proves a true re-tear',
        because: 'Fluid signal in a healed repair looks like a tear; contrast flowing into it proves a true re-tear.',
        plain: 'Contrast in the joint flows into a true new tear.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'the usual signs of a tear still work after a small resection',
        because: 'After a small resection, the usual criteria still work.',
        plain: 'After small surgery the MRI shows enough. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Knee Pain',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Ordering contrast by vein when contrast in the joint is meant.',
    alternatives: 'If a joint injection is not possible: plain MRI against the earlier scan; CT arthrography.',
    searchWords: [
      'meniscal repair', 'meniscectomy', 'post-op knee', 'postoperative meniscus', 're-tear', 'retear',
      'knee arthrogram', 'knee surgery',
    ],
  },
]
