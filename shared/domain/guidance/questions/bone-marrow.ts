import type { ClinicalQuestion } from '../types'

/** Starter questions: bone marrow; most common first. */
export const boneMarrowQuestions: ClinicalQuestion[] = [
  {
    id: 'myeloma-whole-body',
    region: 'bone marrow',
    exam: 'Whole-body MRI with diffusion',
    question: 'Myeloma: lesions or response?',
    plainQuestion: 'Is myeloma in my bones?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'diffusion and fat images find myeloma and contrast adds little',
        because: 'Core sequences are T1 or Dixon with diffusion and no contrast. Kidney function is often reduced, but that is not the reason: contrast adds little here.',
        plain: 'The scan can find changes in the bones without contrast. You do not need an injection.',
      },
    ],
    sources: [
      {
        title: 'Implementation of whole-body MRI (MY-RADS) within the OPTIMUM/MUKnine trial',
        body: 'Insights into Imaging',
        year: 2022,
        status: 'confirmed',
      },
      {
        title: 'MY-RADS: acquisition, interpretation and reporting of whole-body MRI in myeloma',
        body: 'Radiology',
        year: 2019,
        status: 'from memory',
      },
      {
        title: 'Whole-body MRI: technique, guidelines and key applications',
        body: 'ecancermedicalscience',
        year: 2021,
        status: 'from memory',
      },
    ],
    commonError: 'Contrast in myeloma with reduced kidney function.',
    alternatives: null,
    searchWords: [
      'myeloma', 'multiple myeloma', 'MM', 'smoldering', 'plasmacytoma', 'WB-MRI', 'MGUS', 'plasma cell', 'WBMRI',
      'MY-RADS',
    ],
  },
  {
    id: 'bone-marrow-infiltration',
    region: 'bone marrow',
    exam: 'MRI spine and pelvis, marrow protocol',
    question: 'Unexplained cytopenia or abnormal marrow signal?',
    plainQuestion: 'Is there a problem in my bone marrow?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'chemical shift and diffusion separate healthy marrow from disease',
        because: 'Chemical shift and diffusion separate red marrow from infiltration.',
        plain: 'The fat in bone marrow shows on the MRI. No contrast is needed.',
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
    commonError: 'Adding contrast, which can blur the difference between red marrow and disease.',
    alternatives: null,
    searchWords: [
      'cytopenia', 'anemia', 'pancytopenia', 'marrow', 'leukemia', 'marrow edema', 'abnormal marrow signal',
      'myelofibrosis', 'low blood counts', 'marrow replacement',
    ],
  },
]
