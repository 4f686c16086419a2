import type { ClinicalQuestion } from '../types'

/** Starter questions: shoulder; most common first. */
export const shoulderQuestions: ClinicalQuestion[] = [
  {
    id: 'shoulder-rotator-cuff',
    region: 'shoulder',
    exam: 'MRI shoulder',
    question: 'Shoulder pain: rotator cuff tear or other cause?',
    plainQuestion: 'Is a tendon torn in my shoulder?',
    volume: 5,
    usualBranch: 1,
    deciders: [
      {
        id: 'infectionTumor',
        kind: 'yesno',
        ask: 'Is infection or tumor suspected?',
      },
    ],
    branches: [
      {
        when: { infectionTumor: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'infection or tumor in the shoulder is mapped by enhancement',
        because: 'Abscess, synovitis and tumor extent are defined by enhancement.',
        plain: 'Contrast helps check for infection or a growth.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'cuff tears show fully on fluid-sensitive images',
        because: 'Tears, retraction and muscle fat are seen on fluid-sensitive images without contrast.',
        plain: 'A torn tendon shows well on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Shoulder Pain, Traumatic',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Shoulder Pain, Atraumatic',
        body: 'American College of Radiology',
        year: 2018,
        status: 'from memory',
      },
    ],
    commonError: 'IV contrast or arthrography for a routine cuff question.',
    alternatives: 'Ultrasound.',
    searchWords: [
      'rotator cuff', 'RC tear', 'RCT', 'rotator cup', 'supraspinatus', 'impingement', 'frozen shoulder',
      'adhesive capsulitis', 'bursitis shoulder', 'biceps tendon', 'shoulder pain', 'shoulder injury',
    ],
  },
  {
    id: 'shoulder-instability-labrum',
    region: 'shoulder',
    exam: 'MRI or MR arthrogram shoulder',
    question: 'Dislocation, instability or suspected labral tear?',
    plainQuestion: 'Is the rim of my shoulder socket torn?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'timing',
        kind: 'choice',
        ask: 'When was the injury?',
        options: [
          { id: 'acute', label: 'Within about two weeks, with swelling' },
          { id: 'later', label: 'Later, or repeated instability' },
        ],
      },
      {
        id: 'surgery',
        kind: 'yesno',
        ask: 'Is surgery considered, or was earlier labral repair done?',
      },
    ],
    branches: [
      {
        when: { timing: ['acute'] },
        contrast: 'none',
        inShort: 'joint fluid after a fresh injury outlines the labrum by itself',
        because: 'The acute effusion fills the joint and acts as natural contrast.',
        plain: 'Fluid from the injury already fills the joint. It does the work of contrast.',
      },
      {
        when: { surgery: ['yes'] },
        contrast: 'intra-articular',
        inShort: 'a filled joint opens the labrum to view before surgery',
        because: 'Dilute contrast in the joint opens the labrum and capsule and raises the detection of labral tears and re-tears.',
        plain: 'Contrast put into the joint flows into a tear and shows it.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: '3T images are often enough when no surgery is planned',
        because: 'At 3T a non-contrast study is often enough to choose treatment when surgery is not planned.',
        plain: 'A strong scanner often shows enough. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Shoulder Pain, Traumatic',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Arthrography within days of the injury, or IV contrast in its place.',
    alternatives: 'CT arthrography when MRI is not possible.',
    searchWords: [
      'labrum', 'labral tear', 'SLAP', 'Bankart', 'dislocation', 'MR arthrogram shoulder', 'shoulder instability',
      'Hill-Sachs', 'subluxation', 'glenoid',
    ],
  },
]
