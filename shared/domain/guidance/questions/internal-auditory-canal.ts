import type { ClinicalQuestion } from '../types'

/** Starter questions: internal auditory canal; most common first. */
export const internalAuditoryCanalQuestions: ClinicalQuestion[] = [
  {
    id: 'asymmetric-hearing-loss',
    region: 'internal auditory canal',
    exam: 'MRI internal auditory canals, high-resolution T2',
    question: 'One-sided or asymmetric sensorineural hearing loss or tinnitus: is there a vestibular schwannoma?',
    plainQuestion: 'Is a growth on my hearing nerve causing my hearing loss?',
    volume: 4,
    usualBranch: 1,
    deciders: [
      {
        id: 'complex',
        kind: 'yesno',
        ask: 'Was the loss sudden, or is there facial weakness or numbness, NF2-related disease, cancer, or earlier surgery or tumor?',
      },
    ],
    branches: [
      {
        when: { complex: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'sudden or complicated hearing loss needs inner ear and nerve disease excluded',
        because: 'Labyrinthitis, facial nerve and meningeal disease, and tumor recurrence are seen only with enhancement.',
        plain: 'Your symptoms could have more than one cause. Contrast helps to see the nerve and inner ear lining.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'thin T2 images show a growth on the hearing nerve unaided',
        because: 'Thin heavily T2-weighted images show the nerves as dark lines in bright fluid, and in pooled data detect schwannoma with about 97 percent sensitivity and 98 percent specificity. Some guideline groups still list the contrast study first; local policy should state which applies.',
        plain: 'Very thin pictures show the hearing nerve clearly in the fluid around it. A growth shows up without contrast.',
      },
    ],
    sources: [
      {
        title: 'Non-contrast MRI for detection of vestibular schwannoma: systematic review and meta-analysis',
        body: 'International Tinnitus Journal',
        year: 2024,
        status: 'confirmed',
      },
      {
        title: 'Guidelines on the role of imaging in vestibular schwannoma',
        body: 'Congress of Neurological Surgeons',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Hearing Loss and/or Vertigo',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Full brain and canal study with contrast as a first screen when thin T2 is available.',
    alternatives: 'If contrast cannot be given: thin T2 with FLAIR and diffusion.',
    searchWords: [
      'acoustic', 'acoustic neuroma', 'accoustic', 'vestibular schwannoma', 'SNHL', 'IAC', 'IACs',
      'unilateral hearing loss', 'asymmetric SNHL', 'tinnitus', 'ringing in ear', 'deaf', 'SSNHL', 'CPA mass',
      'retrocochlear', 'sensorineural',
    ],
  },
  {
    id: 'vertigo-dizziness',
    region: 'internal auditory canal',
    exam: 'MRI brain',
    question: 'Dizziness or vertigo: is there a central cause?',
    plainQuestion: 'Is a brain problem making me dizzy?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'nerveSigns',
        kind: 'yesno',
        ask: 'Is there one-sided hearing loss with other cranial nerve signs, known cancer, or suspected inflammation?',
      },
    ],
    branches: [
      {
        when: { nerveSigns: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'added nerve signs, cancer or inflammation need a search for enhancing disease',
        because: 'A cerebellopontine mass, meningeal disease or demyelination may need enhancement to be seen.',
        plain: 'Contrast helps look for a growth or swelling near the balance nerve.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a central cause of dizziness shows on diffusion and T2 images',
        because: 'Posterior fossa stroke and structural lesions are seen on diffusion and T2 images; positional vertigo needs no scan. A small brainstem stroke can be invisible on the first day, so a normal early scan does not settle it. One-sided hearing loss without other signs belongs to the hearing loss question.',
        plain: 'A plain MRI scan is a good way to look for a stroke. Many kinds of vertigo need no scan at all.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Hearing Loss and/or Vertigo',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast MRI for benign positional vertigo.',
    alternatives: 'If contrast cannot be given: thin T2 of the canals with diffusion and FLAIR.',
    searchWords: [
      'dizzy', 'dizzyness', 'vertigo', 'BPPV', 'lightheaded', 'room spinning', 'imbalance', 'disequilibrium',
      'posterior fossa', 'vestibular neuritis', 'Meniere',
    ],
  },
  {
    id: 'vestibular-schwannoma-follow-up',
    region: 'internal auditory canal',
    exam: 'MRI internal auditory canals',
    question: 'Known vestibular schwannoma: has it grown?',
    plainQuestion: 'Is the growth on my hearing nerve bigger?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'treated',
        kind: 'yesno',
        ask: 'Has it had surgery or radiosurgery, or did the last report ask for contrast (for example a cystic tumor)?',
      },
    ],
    branches: [
      {
        when: { treated: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'regrowth after treatment shows as a nodule that enhances',
        because: 'After treatment, nodular enhancement is the sign of recurrence; in a cystic tumor it shows the solid part.',
        plain: 'After treatment, contrast helps tell scar from new growth.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'an untreated schwannoma is measured on thin T2 images',
        because: 'An untreated tumor being watched can be measured on thin T2 against earlier scans.',
        plain: 'The size can be measured on thin MRI pictures without contrast.',
      },
    ],
    sources: [
      {
        title: 'Guidelines on the role of imaging in vestibular schwannoma',
        body: 'Congress of Neurological Surgeons',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast at every surveillance visit.',
    alternatives: 'If contrast cannot be given: thin T2 against the earlier scan, at a shorter interval.',
    searchWords: [
      'acoustic neuroma follow up', 'acoustic', 'VS follow up', 'IAC', 'radiosurgery', 'gamma knife', 'NF2',
      'schwanoma', 'CPA tumor',
    ],
  },
  {
    id: 'cholesteatoma',
    region: 'internal auditory canal',
    exam: 'MRI temporal bones, non-echo-planar diffusion',
    question: 'Residual or recurrent cholesteatoma?',
    plainQuestion: 'Has the skin growth in my ear come back?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'diffusion images pick out the keratin of a cholesteatoma unaided',
        because: 'Keratin restricts diffusion, so non-echo-planar diffusion images answer the question; delayed contrast images are now rarely needed.',
        plain: 'A special type of picture shows this growth without contrast.',
      },
    ],
    sources: [
      {
        title: 'Non-echoplanar diffusion weighted imaging in the detection of post-operative middle ear cholesteatoma',
        body: 'Insights into Imaging',
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
    commonError: 'Ordering delayed post-contrast imaging out of habit.',
    alternatives: null,
    searchWords: [
      'cholesteatoma', 'colesteatoma', 'non-EPI DWI', 'mastoidectomy', 'middle ear', 'ear drainage', 'HASTE DWI',
      'second look',
    ],
  },
  {
    id: 'pulsatile-tinnitus',
    region: 'internal auditory canal',
    exam: 'MRI brain and temporal bones with MRA and MRV',
    question: 'Pulsing noise in the ear: is there a vascular cause?',
    plainQuestion: 'Why do I hear my heartbeat in my ear?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'vascular tumors and shunts show best by enhancement and timed angiography',
        because: 'Paraganglioma, dural fistula and sinus stenosis are the targets; enhancement and contrast angiography raise the yield.',
        plain: 'Contrast helps show blood vessels and rare growths behind the ear drum.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Tinnitus',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Tinnitus, 2023 Update',
        body: 'American College of Radiology',
        year: 2023,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering only the thin T2 study of the hearing nerves, which is meant for tinnitus without a pulse.',
    alternatives: 'CT angiography and venography; arterial spin labeling with time-of-flight MRA.',
    searchWords: [
      'whooshing', 'pulsatile tinnitus', 'PT', 'heartbeat in ear', 'glomus tumor', 'paraganglioma',
      'glomus jugulare', 'sinus stenosis', 'dural fistula',
    ],
  },
]
