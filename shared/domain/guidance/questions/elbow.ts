import type { ClinicalQuestion } from '../types'

/** Starter questions: elbow; most common first. */
export const elbowQuestions: ClinicalQuestion[] = [
  {
    id: 'elbow-tendon',
    region: 'elbow',
    exam: 'MRI elbow',
    question: 'Elbow pain: tendon, biceps or nerve?',
    plainQuestion: 'Is a tendon or nerve hurt in my elbow?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'tendon tears and nerve swelling show on fluid-sensitive images',
        because: 'Tendon tears, epicondylar disease and nerve edema are shown on fluid-sensitive images.',
        plain: 'Sore tendons and nerves show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Elbow Pain',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'IV contrast for tennis elbow.',
    alternatives: 'Ultrasound.',
    searchWords: [
      'tennis elbow', 'golfer elbow', 'lateral epicondylitis', 'medial epicondylitis', 'distal biceps',
      'biceps rupture', 'ulnar nerve', 'cubital tunnel', 'elbow pain',
    ],
  },
  {
    id: 'elbow-ligament-loose-body',
    region: 'elbow',
    exam: 'MRI or MR arthrogram elbow',
    question: 'Throwing athlete ligament tear, loose body or unstable cartilage?',
    plainQuestion: 'Is a ligament torn in my elbow?',
    volume: 1,
    usualBranch: 0,
    deciders: [
      {
        id: 'question',
        kind: 'choice',
        ask: 'Which question?',
        options: [
          { id: 'partialTear', label: 'Suspected partial ligament tear (throwing athlete)' },
          { id: 'body', label: 'Loose body or loose cartilage' },
          { id: 'other', label: 'Complete tear or unsure' },
        ],
      },
    ],
    branches: [
      {
        when: { question: ['partialTear'] },
        contrast: 'intra-articular',
        inShort: 'contrast pressed into the joint shows a partial ligament tear',
        because: 'An undersurface tear of the ulnar collateral ligament is best shown when contrast is forced against it.',
        plain: 'Contrast in the joint pushes into a small tear so it can be seen.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'complete tears show unaided and joint fluid outlines loose bodies',
        because: 'Complete tears show without contrast, and joint fluid outlines bodies and cartilage. Local choice: guidance accepts an arthrogram as well, and it is the next step when there is no joint fluid and the plain study leaves doubt.',
        plain: 'The joint fluid often gives enough contrast by itself. An injection can be added later if needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Elbow Pain',
        body: 'American College of Radiology',
        year: 2011,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Chronic Elbow Pain',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast by vein when contrast in the joint is meant.',
    alternatives: 'Stress ultrasound; CT arthrography.',
    searchWords: [
      'UCL', 'UCL tear', 'Tommy John', 'MCL elbow', 'pitcher', 'OCD capitellum', 'osteochondral', 'loose body',
      'elbow arthrogram', 'throwing elbow',
    ],
  },
]
