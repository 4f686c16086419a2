import type { ClinicalQuestion } from '../types'

/** Starter questions: pituitary; most common first. */
export const pituitaryQuestions: ClinicalQuestion[] = [
  {
    id: 'pituitary-hormone-excess',
    region: 'pituitary',
    exam: 'MRI pituitary, dynamic',
    question: 'Raised prolactin, cortisol, growth hormone or TSH: is there a pituitary microadenoma?',
    plainQuestion: 'Is a tiny growth in my pituitary gland causing my hormone problem?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'a small adenoma may show only as a slower-enhancing spot',
        because: 'A microadenoma enhances more slowly than the gland; dynamic images after contrast may be the only sign of a lesion of a few millimeters.',
        plain: 'The gland is very small. Contrast makes a tiny growth stand out from the normal gland.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Neuroendocrine Imaging',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering "MRI brain" instead of a dedicated pituitary study.',
    alternatives: 'Thin coronal T1 and T2 without contrast finds many but not all microadenomas.',
    searchWords: [
      'prolactinoma', 'prolactin', 'hyperprolactinemia', 'galactorrhea', 'Cushing', 'acromegaly', 'microadenoma',
      'pituitary adenoma', 'ACTH', 'sella', 'pituitary protocol', 'pituatary', 'pitutary',
    ],
  },
  {
    id: 'pituitary-macroadenoma-follow-up',
    region: 'pituitary',
    exam: 'MRI pituitary',
    question: 'Known pituitary macroadenoma: change in size?',
    plainQuestion: 'Has my pituitary growth changed?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'activeQuestion',
        kind: 'yesno',
        ask: 'Is it before or after surgery or radiation, growing, or with new visual or hormone change?',
      },
    ],
    branches: [
      {
        when: { activeQuestion: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'enhancement separates tumor from gland around treatment, growth or new symptoms',
        because: 'Residual tumor, cavernous sinus invasion and the normal gland are separated by enhancement.',
        plain: 'After treatment or with new symptoms, contrast helps tell growth from scar and normal gland.',
      },
      {
        when: {},
        contrast: 'discuss',
        inShort: 'thin non-contrast images may be enough to measure a stable macroadenoma',
        because: 'For a stable untreated macroadenoma with a contrast baseline, coronal T2 with T1 can measure size and chiasm contact; the radiologist should decide whether contrast is still needed.',
        plain: 'A plain MRI scan may be enough to check the size. The radiologist will decide.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Neuroendocrine Imaging (pediatric and follow-up variants)',
        body: 'American College of Radiology',
        year: 2019,
        status: 'from memory',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Automatic contrast at every check for many years.',
    alternatives: 'If contrast cannot be given: thin coronal T1 and T2 against the earlier scan.',
    searchWords: [
      'macroadenoma', 'pituitary adenoma', 'nonfunctioning adenoma', 'sellar mass', 'optic chiasm compression',
      'transsphenoidal', 'bitemporal hemianopia', 'PitNET',
    ],
  },
  {
    id: 'hypopituitarism-avp-deficiency',
    region: 'pituitary',
    exam: 'MRI pituitary',
    question: 'Low pituitary hormones, arginine vasopressin deficiency, or a thick stalk?',
    plainQuestion: 'Why is my pituitary gland not making enough hormone?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'a thick or inflamed stalk is recognized by its enhancement',
        because: 'Stalk thickening, hypophysitis, metastasis and infiltrative disease are recognized by enhancement.',
        plain: 'Contrast helps show swelling or a growth in the gland or its stalk.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Neuroendocrine Imaging',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering a brain MRI instead of a pituitary MRI, with slices too thick for the stalk.',
    alternatives: 'Non-contrast T1 shows the posterior bright spot and gland size.',
    searchWords: [
      'diabetes insipidus', 'DI', 'AVP-D', 'panhypopituitarism', 'hypophysitis', 'low hormones', 'low cortisol',
      'pituitary stalk', 'pituitary insufficiency', 'low testosterone',
    ],
  },
]
