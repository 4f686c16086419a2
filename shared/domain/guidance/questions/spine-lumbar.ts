import type { ClinicalQuestion } from '../types'

/** Starter questions: spine, lumbar; most common first. */
export const spineLumbarQuestions: ClinicalQuestion[] = [
  {
    id: 'low-back-pain-sciatica',
    region: 'spine, lumbar',
    exam: 'MRI lumbar spine',
    question: 'Low back pain, sciatica or leg pain on walking: disc or stenosis?',
    plainQuestion: 'Is a disc or a tight spot in my spine causing my back or leg pain?',
    volume: 5,
    usualBranch: 3,
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
      {
        id: 'priorSurgery',
        kind: 'yesno',
        ask: 'Has there been earlier lumbar surgery at the level in question?',
      },
    ],
    branches: [
      {
        when: { redFlag: ['cancer', 'infection'] },
        contrast: 'iv-with-and-without',
        inShort: 'suspected infection or cancer in the spine is mapped by enhancement',
        because: 'Infection and tumor are mapped by enhancement, above all in the epidural space and discs. Local choice: guidance accepts a study without contrast as well, and known cancer with a question of bone spread alone is better asked as spinal metastases.',
        plain: 'The team wants to rule out infection or a growth. Contrast makes these clear.',
      },
      {
        when: { redFlag: ['fracture'] },
        contrast: 'none',
        inShort: 'a fracture and its age show on T1 and STIR images',
        because: 'Fracture and its age are shown on T1 and STIR, with or without earlier surgery.',
        plain: 'A fresh break shows well on the MRI. No contrast is needed.',
      },
      {
        when: { priorSurgery: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'scar enhances early and a recurrent disc does not',
        because: 'Scar enhances early and recurrent disc does not; that distinction can decide re-operation. Local choice: guidance accepts the study without contrast as well; sites differ once some years have passed.',
        plain: 'After back surgery, contrast helps tell scar from a new disc problem.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'discs, stenosis and nerve roots show fully on non-contrast images',
        because: 'Disc herniation, stenosis and acute fracture are complete on non-contrast T1, T2 and STIR. Without red flags, imaging itself is of little use before about six weeks of treatment.',
        plain: 'Discs, nerves and fresh breaks show well on plain MRI pictures. Contrast would not add anything.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Low Back Pain, 2021 Update',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'Low back pain: summary table of the ACR criteria',
        body: 'American Journal of Neuroradiology',
        year: 2009,
        status: 'confirmed',
      },
    ],
    commonError: 'MRI "with and without" for a few weeks of back pain without red flags; neither the contrast nor the early scan helps.',
    alternatives: 'If contrast cannot be given: T1, STIR and diffusion detect most infection and tumor.',
    searchWords: [
      'LBP', 'back pain', 'backache', 'sciatica', 'siatica', 'HNP', 'herniated disc', 'slipped disc', 'bulging disc',
      'DDD', 'radiculopathy', 'lumbar radiculopathy', 'spinal stenosis', 'neurogenic claudication', 'leg pain',
      'L-spine', 'lumbago', 'pinched nerve back',
    ],
  },
  {
    id: 'lumbar-after-surgery',
    region: 'spine, lumbar',
    exam: 'MRI lumbar spine',
    question: 'New pain after lumbar surgery: recurrent disc, scar or next level?',
    plainQuestion: 'Why does my back hurt again after surgery?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'question',
        kind: 'choice',
        ask: 'What is the question?',
        options: [
          { id: 'adjacent', label: 'Next-level disease after fusion, no fever' },
          { id: 'recurrent', label: 'Recurrent disc or scar at the operated level' },
          { id: 'infection', label: 'Infection or collection' },
        ],
      },
    ],
    branches: [
      {
        when: { question: ['adjacent'] },
        contrast: 'none',
        inShort: 'a disc beside the fusion reads as in an unoperated spine',
        because: 'Disc and stenosis at an untouched level read the same as in an unoperated spine.',
        plain: 'The scan looks at discs next to your fusion. MRI pictures without contrast are enough.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'scar, recurrent disc and infection separate by their enhancement',
        because: 'Scar, recurrent disc and infected collections separate by their enhancement. For infection contrast is preferred; for recurrent disc guidance also accepts a study without contrast.',
        plain: 'Contrast helps tell scar, a new disc problem and infection apart.',
      },
    ],
    sources: [
      {
        title: 'Low back pain: summary table of the ACR criteria',
        body: 'American Journal of Neuroradiology',
        year: 2009,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Suspected Spine Infection',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Non-contrast order that cannot separate scar from disc.',
    alternatives: 'If contrast cannot be given: T1, T2 and STIR answer most recurrent disc questions; diffusion helps in infection.',
    searchWords: [
      'post-op spine', 'failed back surgery', 'FBSS', 'post laminectomy', 'laminectomy', 'discectomy',
      'microdiscectomy', 'fusion', 'scar vs disc', 'recurrent herniation', 'epidural fibrosis', 'hardware',
      'back surgery',
    ],
  },
  {
    id: 'cauda-equina',
    region: 'spine, lumbar',
    exam: 'MRI lumbar spine, emergency',
    question: 'Suspected cauda equina syndrome?',
    plainQuestion: 'Are the nerves at the bottom of my spine being squeezed?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'tumorInfection',
        kind: 'yesno',
        ask: 'Is tumor, infection or abscess the suspected cause?',
      },
    ],
    branches: [
      {
        when: { tumorInfection: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'an abscess or tumor around the nerves shows its extent by enhancement',
        because: 'Epidural abscess and tumor need enhancement for extent; do not delay the non-contrast images while access is placed.',
        plain: 'Contrast shows infection or growth around the nerves.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a large disc shows at once on non-contrast images and speed matters',
        because: 'A large disc is by far the usual cause and shows on sagittal and axial T2; speed matters most. If no disc explains the signs, contrast is added in the same visit.',
        plain: 'The most common cause is a disc. It shows right away on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'Low back pain: summary table of the ACR criteria',
        body: 'American Journal of Neuroradiology',
        year: 2009,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Low Back Pain, 2021 Update',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Waiting for kidney results when the question is disc compression.',
    alternatives: 'If contrast cannot be given: T1, T2, STIR and diffusion at once; do not wait.',
    searchWords: [
      'CES', 'saddle anesthesia', 'saddle numbness', 'urinary retention', 'bowel incontinence',
      'bladder incontinence', 'cauda equina', 'bilateral leg weakness',
    ],
  },
  {
    id: 'spine-infection',
    region: 'spine, lumbar',
    exam: 'MRI spine',
    question: 'Suspected discitis, osteomyelitis or epidural abscess?',
    plainQuestion: 'Is there an infection in my spine?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates drainable pus from inflamed tissue',
        because: 'Enhancement separates phlegmon from drainable pus and shows epidural extent; pre-contrast images are needed for comparison. Non-contrast MRI remains a valid start when contrast cannot be given.',
        plain: 'Contrast shows where the infection is and if there is pus to drain.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Spine Infection',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: '"With contrast only": without the pre-contrast images enhancement cannot be judged.',
    alternatives: 'T1, STIR and diffusion without contrast detect most disc and vertebral infection.',
    searchWords: [
      'discitis', 'diskitis', 'spondylodiscitis', 'vertebral osteomyelitis', 'epidural abscess', 'SEA',
      'IVDU back pain', 'fever and back pain', 'Pott disease', 'TB spine', 'bacteremia',
    ],
  },
]
