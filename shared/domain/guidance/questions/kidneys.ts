import type { ClinicalQuestion } from '../types'

/** Starter questions: kidneys; most common first. */
export const kidneysQuestions: ClinicalQuestion[] = [
  {
    id: 'renal-mass-indeterminate',
    region: 'kidneys',
    exam: 'MRI kidneys, multiphase',
    question: 'Kidney mass or complex cyst: benign or cancer?',
    plainQuestion: 'Is the spot on my kidney harmless?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'any true enhancement turns a cyst into a tumor question',
        because: 'Any true enhancement moves a lesion from cyst to tumor, and subtraction images detect it even in bright cysts.',
        plain: 'A harmless cyst does not take up contrast. A growth does.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Indeterminate Renal Mass',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
    ],
    commonError: 'Non-contrast study that leaves the lesion unsettled.',
    alternatives: 'Contrast ultrasound; T1, T2, chemical shift and diffusion without contrast.',
    searchWords: [
      'renal mass', 'kidney mass', 'renal lesion', 'Bosniak', 'complex cyst', 'RCC', 'renal cell carcinoma',
      'kidney tumor', 'kidney cancer', 'AML', 'angiomyolipoma', 'indeterminate renal lesion', 'kidney spot',
    ],
  },
  {
    id: 'polycystic-kidney-volume',
    region: 'kidneys',
    exam: 'MRI kidneys, volume',
    question: 'Polycystic kidney disease: total kidney volume?',
    plainQuestion: 'How large are my kidneys?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'kidney volume is measured without any enhancement',
        because: 'Volume is measured on non-contrast images. Contrast is left out because it adds nothing, not because it would harm the kidneys.',
        plain: 'The size is measured without contrast, so you do not need an injection.',
      },
    ],
    sources: [
      {
        title: 'KDIGO guideline on autosomal dominant polycystic kidney disease',
        body: 'KDIGO',
        year: 2025,
        status: 'from memory',
      },
    ],
    commonError: 'Contrast for a volume measurement.',
    alternatives: null,
    searchWords: [
      'ADPKD', 'PKD', 'TKV', 'total kidney volume', 'polycystic', 'tolvaptan', 'Mayo class', 'kidney size',
    ],
  },
  {
    id: 'hydronephrosis-mr-urography',
    region: 'kidneys',
    exam: 'MR urography',
    question: 'Blocked kidney or ureter: where and why?',
    plainQuestion: 'What is blocking my kidney?',
    volume: 1,
    usualBranch: 0,
    deciders: [
      {
        id: 'who',
        kind: 'choice',
        ask: 'Which applies?',
        options: [
          { id: 'pregnant', label: 'Pregnant' },
          { id: 'levelOnly', label: 'Only the level of obstruction is needed' },
          { id: 'full', label: 'Function, tumor or duplex anatomy is needed' },
        ],
      },
    ],
    branches: [
      {
        when: { who: ['pregnant', 'levelOnly'] },
        contrast: 'none',
        inShort: 'fluid-sensitive images show the blocked level unaided',
        because: 'Static fluid-sensitive urography shows the dilated system and its end point.',
        plain: 'Urine is bright on these pictures, so no contrast is needed.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'kidney function and tumor of the ureter show as contrast drains',
        because: 'Excretory phases show function, ectopic ureters and urothelial tumor.',
        plain: 'Contrast passes through the kidneys and shows how they drain.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Hydronephrosis on Prior Imaging, Unknown Cause',
        body: 'American College of Radiology',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering contrast when only the level of the blockage is needed.',
    alternatives: 'CT for stones; ultrasound.',
    searchWords: [
      'MRU', 'MR urogram', 'urography', 'ureteral obstruction', 'UPJ', 'hydroureter', 'blocked kidney',
      'kidney swelling', 'duplex kidney', 'ectopic ureter', 'hydronephrosis',
    ],
  },
]
