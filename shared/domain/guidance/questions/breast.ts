import type { ClinicalQuestion } from '../types'

/** Starter questions: breast; most common first. */
export const breastQuestions: ClinicalQuestion[] = [
  {
    id: 'breast-high-risk-screening',
    region: 'breast',
    exam: 'MRI breasts',
    question: 'High-risk screening (gene carrier, strong family history, chest radiation, very dense breasts)?',
    plainQuestion: 'Is there anything in my breasts that a mammogram could miss?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'breast cancer is found on MRI by its early enhancement',
        because: 'Breast cancer is found on MRI by its early enhancement; there is no accepted non-contrast substitute for screening.',
        plain: 'Breast MRI finds cancer by how it takes up contrast. Without contrast the scan cannot do its job.',
      },
    ],
    sources: [
      {
        title: 'Practice Parameter for contrast-enhanced MRI of the breast',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
      {
        title: 'Breast cancer screening in women with extremely dense breasts: recommendations',
        body: 'EUSOBI',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Asking for a non-contrast breast MRI for cancer screening.',
    alternatives: 'In pregnancy or with true contraindication: mammography and ultrasound.',
    searchWords: [
      'BRCA', 'BRCA1', 'BRCA2', 'gene carrier', 'family history breast cancer', 'dense breasts', 'breast screening',
      'screening MRI', 'chest radiation', 'Hodgkin', 'lifetime risk', 'breast check',
    ],
  },
  {
    id: 'breast-cancer-extent-response',
    region: 'breast',
    exam: 'MRI breasts',
    question: 'Known breast cancer: extent, other breast, or response to chemotherapy?',
    plainQuestion: 'How large is my breast cancer, and is treatment working?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'size, further foci and response are measured on enhancing disease',
        because: 'Size, extra foci and response are measured on the enhancing disease.',
        plain: 'Contrast shows the size of the cancer and any other spots.',
      },
    ],
    sources: [
      {
        title: 'Practice Parameter for contrast-enhanced MRI of the breast',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering breast MRI without contrast, which cannot show the extent of cancer.',
    alternatives: 'Contrast mammography where gadolinium cannot be given but iodinated contrast can; otherwise ultrasound with mammography.',
    searchWords: [
      'breast cancer', 'breast ca', 'DCIS', 'ILC', 'IDC', 'neoadjuvant', 'preoperative breast',
      'breast cancer staging', 'chemo response', 'lobular', 'contralateral breast',
    ],
  },
  {
    id: 'breast-implant-rupture',
    region: 'breast',
    exam: 'MRI breasts, silicone-selective',
    question: 'Silicone implant: is it ruptured?',
    plainQuestion: 'Is my breast implant broken?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'cancerQuestion',
        kind: 'yesno',
        ask: 'Is cancer also in question (a lump, abnormal mammogram, fluid around the implant, or high-risk MRI screening due)?',
      },
    ],
    branches: [
      {
        when: { cancerQuestion: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'implant and cancer questions can be answered in one visit',
        because: 'Implant integrity needs no contrast, but cancer and capsule-related lymphoma do; one visit can answer both.',
        plain: 'Contrast is used because the team also needs to look for cancer.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'silicone images show a collapsed shell unaided',
        because: 'Silicone-selective images show the collapsed shell and free silicone; contrast does not help.',
        plain: 'Special pictures show silicone by itself. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Breast Implant Evaluation',
        body: 'American College of Radiology',
        year: 2023,
        status: 'confirmed',
      },
    ],
    commonError: 'Giving contrast for implant integrity alone.',
    alternatives: 'If contrast cannot be given: mammography and ultrasound for the cancer question.',
    searchWords: [
      'implant', 'silicone', 'rupture', 'linguini sign', 'breast augmentation', 'implant leak', 'BIA-ALCL',
      'capsular contracture', 'breast implants',
    ],
  },
  {
    id: 'nipple-discharge-problem-solving',
    region: 'breast',
    exam: 'MRI breasts',
    question: 'Bloody nipple discharge, or unclear mammogram and ultrasound?',
    plainQuestion: 'What is causing my nipple discharge?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'duct lesions and small cancers are found by their enhancement',
        because: 'Duct lesions and cancers are identified by enhancement.',
        plain: 'Contrast helps find small growths in the milk ducts.',
      },
    ],
    sources: [
      {
        title: 'Practice Parameter for contrast-enhanced MRI of the breast',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering MRI before mammography and ultrasound are complete.',
    alternatives: 'If contrast cannot be given: ultrasound, ductography, or contrast mammography where only gadolinium is the problem.',
    searchWords: [
      'bloody nipple', 'nipple discharge', 'papilloma', 'inconclusive mammogram', 'BI-RADS 0', 'BIRADS',
      'problem solving breast', 'breast lump', 'architectural distortion',
    ],
  },
]
