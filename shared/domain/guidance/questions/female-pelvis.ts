import type { ClinicalQuestion } from '../types'

/** Starter questions: female pelvis; most common first. */
export const femalePelvisQuestions: ClinicalQuestion[] = [
  {
    id: 'uterine-fibroids',
    region: 'female pelvis',
    exam: 'MRI pelvis',
    question: 'Fibroids: number, place and fitness for treatment?',
    plainQuestion: 'How many fibroids do I have and can they be treated?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'embolizeOrSuspicious',
        kind: 'yesno',
        ask: 'Is embolization or focused ultrasound planned, or is sarcoma suspected?',
      },
    ],
    branches: [
      {
        when: { embolizeOrSuspicious: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'blood flow guides embolization and odd enhancement points to sarcoma',
        because: 'Perfusion predicts response to embolization, and odd enhancement supports sarcoma.',
        plain: 'Contrast shows if the fibroid has live tissue to treat.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'number, layer and size of fibroids show on T2 images',
        because: 'Number, layer and size for surgical planning are shown on T2. Local choice: many departments give contrast to every fibroid study.',
        plain: 'The size and place of fibroids show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ESUR guidelines: MR imaging of leiomyomas',
        body: 'ESUR',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Fibroids',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Contrast when only a surgical map is needed.',
    alternatives: 'If contrast cannot be given: T2 with diffusion, with its limits stated.',
    searchWords: [
      'fibroid', 'leiomyoma', 'myoma', 'UAE', 'UFE', 'uterine artery embolization', 'HIFU', 'focused ultrasound',
      'heavy periods', 'myomectomy', 'fybroids', 'uterine mass', 'sarcoma',
    ],
  },
  {
    id: 'endometriosis-adenomyosis',
    region: 'female pelvis',
    exam: 'MRI pelvis, endometriosis protocol',
    question: 'Endometriosis or adenomyosis: how deep and where?',
    plainQuestion: 'Is endometriosis the cause of my pain?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'complexCyst',
        kind: 'yesno',
        ask: 'Is there a complex ovarian mass or suspected cancer?',
      },
    ],
    branches: [
      {
        when: { complexCyst: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a nodule in the cyst must be tested for enhancement',
        because: 'A nodule in an endometrioma must be tested for enhancement.',
        plain: 'Contrast checks a cyst for solid tissue.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'deep disease and blood show on T2 and fat-suppressed T1 images',
        because: 'Deep disease is dark tissue on T2, and blood shows on fat-suppressed T1; guidance does not call for contrast as a routine. Local choice: guidance accepts the study with or without contrast (from memory).',
        plain: 'The MRI shows old blood and deep tissue change. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ESUR guidelines: MR imaging of pelvic endometriosis',
        body: 'ESUR',
        year: 2017,
        status: 'from memory',
      },
    ],
    commonError: 'Contrast as a routine in endometriosis mapping.',
    alternatives: 'If contrast cannot be given: T2, fat-suppressed T1 and diffusion; expert ultrasound.',
    searchWords: [
      'endometriosis', 'endometreosis', 'endo', 'adenomyosis', 'DIE', 'deep infiltrating endometriosis',
      'endometrioma', 'chocolate cyst', 'pelvic pain', 'painful periods', 'dysmenorrhea',
    ],
  },
  {
    id: 'adnexal-mass',
    region: 'female pelvis',
    exam: 'MRI pelvis',
    question: 'Ovarian or adnexal mass unclear on ultrasound?',
    plainQuestion: 'Is the lump on my ovary harmless?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'pregnant',
        kind: 'yesno',
        ask: 'Is the patient pregnant?',
      },
    ],
    branches: [
      {
        when: { pregnant: ['yes'] },
        contrast: 'none',
        inShort: 'fat, blood and fluid show unaided and gadolinium is avoided in pregnancy',
        because: 'Fat, blood and fluid are identified without contrast, and gadolinium is avoided in pregnancy.',
        plain: 'This can be checked in pregnancy without contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'enhancing solid tissue decides how likely cancer is',
        because: 'Enhancement of solid tissue, ideally with a time curve, decides the risk group.',
        plain: 'Contrast shows if the lump has solid parts that need more tests.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Clinically Suspected Adnexal Mass, No Acute Symptoms, 2023 Update',
        body: 'American College of Radiology',
        year: 2024,
        status: 'confirmed',
      },
      {
        title: 'O-RADS MRI risk stratification system: guide for assessing adnexal lesions',
        body: 'ACR O-RADS Committee',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering without contrast for a mass with solid parts in a patient who is not pregnant.',
    alternatives: 'Expert ultrasound; T1, T2 and diffusion still settle fat-containing and blood-filled lesions.',
    searchWords: [
      'ovarian cyst', 'ovarian mass', 'ovary', 'O-RADS', 'adnexa', 'dermoid', 'teratoma', 'ovarian cancer', 'CA-125',
      'complex cyst ovary', 'lump on ovary',
    ],
  },
  {
    id: 'cervical-cancer-staging',
    region: 'female pelvis',
    exam: 'MRI pelvis',
    question: 'Cervical cancer: staging or recurrence?',
    plainQuestion: 'How far has my cervical cancer grown?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'smallOrRecurrent',
        kind: 'yesno',
        ask: 'Is fertility-sparing surgery for a small tumor planned, or is recurrence the question?',
      },
    ],
    branches: [
      {
        when: { smallOrRecurrent: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'small or recurrent tumor may be easier to see by enhancement',
        because: 'Small tumors and recurrence after radiation may be easier to see with enhancement. Local choice: the 2011 European guideline asked for it here, the 2021 update makes it optional when diffusion is of good quality.',
        plain: 'Contrast helps show small growths.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'spread beyond the cervix is judged on T2 and diffusion images',
        because: 'Parametrial invasion is judged on oblique T2 with diffusion; contrast is optional.',
        plain: 'MRI pictures without contrast show if the cancer has grown past the cervix.',
      },
    ],
    sources: [
      {
        title: 'ESUR guidelines on staging of uterine cervical cancer, 2020 update',
        body: 'ESUR',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'Staging of uterine cervical cancer with MRI: guidelines of the European Society of Urogenital Radiology',
        body: 'ESUR',
        year: 2011,
        status: 'confirmed',
      },
    ],
    commonError: 'Taking contrast to be required for routine staging.',
    alternatives: 'If contrast cannot be given: T2 with diffusion is the core study; PET/CT.',
    searchWords: [
      'cervical cancer', 'cervix', 'cervical ca', 'parametrial invasion', 'FIGO', 'trachelectomy', 'cervix cancer',
    ],
  },
  {
    id: 'endometrial-cancer-staging',
    region: 'female pelvis',
    exam: 'MRI pelvis',
    question: 'Endometrial cancer: depth of myometrial invasion?',
    plainQuestion: 'How deep has my womb cancer grown?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'depth in the womb muscle is measured best on a delayed phase',
        because: 'A delayed contrast phase with T2 and diffusion gives the best measure of depth.',
        plain: 'Contrast shows how deep the cancer goes into the womb wall.',
      },
    ],
    sources: [
      {
        title: 'Endometrial cancer MRI staging: updated ESUR guidelines',
        body: 'ESUR',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a general pelvis MRI, without the delayed phase in the plane of the uterus.',
    alternatives: 'T2 with diffusion alone reads depth well when contrast cannot be given.',
    searchWords: [
      'endometrial cancer', 'uterine cancer', 'womb cancer', 'EC staging', 'myometrial invasion',
      'postmenopausal bleeding', 'endometrium',
    ],
  },
  {
    id: 'mullerian-anomaly',
    region: 'female pelvis',
    exam: 'MRI pelvis',
    question: 'Uterine anomaly?',
    plainQuestion: 'Is the shape of my womb different?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'the shape of the uterus is read on T2 images',
        because: 'Shape and septum are read on T2 in the plane of the uterus.',
        plain: 'The shape of the womb shows on the MRI. No contrast is needed.',
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
    commonError: 'Ordering "with and without" for the shape of the uterus.',
    alternatives: null,
    searchWords: [
      'septate uterus', 'bicornuate', 'unicornuate', 'didelphys', 'mullerian', 'uterine septum',
      'congenital uterine anomaly', 'infertility', 'recurrent miscarriage', 'MRKH',
    ],
  },
  {
    id: 'pelvic-floor-prolapse',
    region: 'female pelvis',
    exam: 'Dynamic MRI pelvic floor',
    question: 'Prolapse or obstructed defecation?',
    plainQuestion: 'Have my pelvic muscles weakened?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'the movement of the pelvic floor is filmed on T2 images',
        because: 'Motion is filmed on T2; rectal gel is used, not intravenous contrast.',
        plain: 'The scan films how your muscles move. A gel is used but no injection.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Pelvic Floor Dysfunction',
        body: 'American College of Radiology',
        year: 2019,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering a pelvis MRI at rest, with contrast by vein, instead of the dynamic study.',
    alternatives: null,
    searchWords: [
      'prolapse', 'defecography', 'MR defecography', 'pelvic floor', 'rectocele', 'cystocele', 'intussusception',
      'incontinence', 'obstructed defecation', 'constipation',
    ],
  },
]
