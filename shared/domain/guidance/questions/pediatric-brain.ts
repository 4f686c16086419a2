import type { ClinicalQuestion } from '../types'

/** Starter questions: pediatric brain; most common first. */
export const pediatricBrainQuestions: ClinicalQuestion[] = [
  {
    id: 'child-headache',
    region: 'pediatric brain',
    exam: 'MRI brain',
    question: 'Child with headache?',
    plainQuestion: 'What is causing my child’s headaches?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'redFlag',
        kind: 'yesno',
        ask: 'Is there raised pressure, abnormal examination, fever with neck stiffness, cancer, or immune suppression?',
      },
    ],
    branches: [
      {
        when: { redFlag: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a headache with these warning signs needs tumor and meningeal disease excluded',
        because: 'Tumor and meningeal disease are the concern. The plain images come first; contrast is planned for the same visit so that a second sedation is avoided.',
        plain: 'Contrast helps find a growth or infection in one visit.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'a normal examination makes a lesion unlikely',
        because: 'A normal examination makes a lesion unlikely; imaging is often not needed.',
        plain: 'Most headaches in children need no scan. If one is done, it needs no contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Headache, Child',
        body: 'American College of Radiology',
        year: 2018,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast by default because the child is sedated.',
    alternatives: 'If contrast cannot be given: diffusion, T2 and FLAIR show most tumors; add MR venography without contrast.',
    searchWords: [
      'pediatric headache', 'kid headache', 'child migraine', 'morning vomiting', 'r/o tumor child', 'peds headache',
      'teenager headache',
    ],
  },
  {
    id: 'child-seizure-delay',
    region: 'pediatric brain',
    exam: 'MRI brain',
    question: 'Child with epilepsy or developmental delay?',
    plainQuestion: 'Why does my child have seizures or slow development?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'tumorNeurocutaneous',
        kind: 'yesno',
        ask: 'Is a tumor, infection, inflammation or Sturge-Weber disease suspected?',
      },
    ],
    branches: [
      {
        when: { tumorNeurocutaneous: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'tumor, inflammation and vessel birthmarks of the brain enhance',
        because: 'Pial angioma, tumor and inflammation enhance.',
        plain: 'Contrast helps find blood vessel changes or a growth.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'malformation, old injury and metabolic patterns show unaided',
        because: 'Malformation, injury and metabolic patterns are non-contrast diagnoses.',
        plain: 'MRI pictures without contrast show how the brain is formed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Seizures, Child',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast as part of every pediatric epilepsy scan.',
    alternatives: 'If contrast cannot be given: susceptibility images, FLAIR and arterial spin labeling.',
    searchWords: [
      'pediatric epilepsy', 'developmental delay', 'febrile seizure', 'Sturge-Weber', 'tuberous sclerosis', 'TSC',
      'autism', 'cerebral palsy', 'infantile spasms', 'GDD', 'child fits', 'peds seizure',
    ],
  },
  {
    id: 'child-shunt-rapid',
    region: 'pediatric brain',
    exam: 'Rapid MRI brain',
    question: 'Child with a shunt: malfunction?',
    plainQuestion: 'Is my child’s shunt working?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'fast T2 images show ventricles and catheter in minutes',
        because: 'Fast T2 in three planes shows ventricles and catheter in minutes, without sedation.',
        plain: 'Quick pictures show the fluid spaces. No contrast and often no sedation.',
      },
    ],
    sources: [
      {
        title: 'The use of quick-brain MRI in the evaluation of shunt-treated hydrocephalus',
        body: 'Journal of Neurosurgery',
        year: 2004,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Ordering a full brain MRI with contrast and sedation for a shunt check.',
    alternatives: null,
    searchWords: [
      'VP shunt', 'rapid brain MRI', 'quick brain', 'HASTE brain', 'shunt malfunction', 'pediatric hydrocephalus',
      'fast MRI', 'shunt series', 'child shunt',
    ],
  },
  {
    id: 'child-brain-tumor-follow-up',
    region: 'pediatric brain',
    exam: 'MRI brain and spine',
    question: 'Child with a treated brain tumor?',
    plainQuestion: 'Is my child’s tumor gone or back?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'remaining tumor and spread along the membranes show by enhancement',
        because: 'Residual and leptomeningeal disease need contrast; a macrocyclic agent is used because many scans will follow.',
        plain: 'Contrast shows if any tumor is left or has spread.',
      },
    ],
    sources: [
      {
        title: 'Basics for pediatric brain tumor imaging: techniques and protocol recommendations',
        body: 'Brain Tumor Research and Treatment',
        year: 2024,
        status: 'confirmed',
      },
      {
        title: 'RANO 2.0: update to the response assessment criteria for gliomas',
        body: 'Journal of Clinical Oncology',
        year: 2023,
        status: 'from memory',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Ordering the brain alone when the tumor can spread along the spine.',
    alternatives: 'Diffusion and thin T2 without contrast where the tumor never enhanced.',
    searchWords: [
      'medulloblastoma', 'ependymoma', 'pilocytic astrocytoma', 'pediatric glioma', 'DIPG', 'optic glioma',
      'child brain cancer', 'peds brain tumor', 'drop mets',
    ],
  },
  {
    id: 'neonatal-brain-injury',
    region: 'pediatric brain',
    exam: 'MRI brain, neonatal',
    question: 'Newborn with encephalopathy or prematurity?',
    plainQuestion: 'How is my baby’s brain?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'infection',
        kind: 'yesno',
        ask: 'Is meningitis, ventriculitis or abscess suspected?',
      },
    ],
    branches: [
      {
        when: { infection: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'infection of the ventricles and abscess show by enhancement',
        because: 'Ventriculitis and abscess are the indication for contrast in a newborn. Because the kidneys are immature, use a macrocyclic agent, dosed by weight and not above the label, on the word of the radiologist.',
        plain: 'Contrast helps find infection around the brain. The dose is set by your baby’s weight.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'diffusion, T1 and T2 images define injury in a newborn',
        because: 'Diffusion and T1 and T2 define injury.',
        plain: 'The MRI shows the brain clearly without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Seizures, Child',
        body: 'American College of Radiology',
        year: 2021,
        status: 'confirmed',
      },
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
    ],
    commonError: 'Adding contrast for birth injury without signs of infection.',
    alternatives: 'If contrast cannot be given: diffusion and T2 with head ultrasound.',
    searchWords: [
      'HIE', 'neonate', 'newborn', 'preterm', 'premature baby', 'NICU', 'cooling', 'birth asphyxia',
      'encephalopathy', 'IVH', 'PVL', 'neonatal seizures',
    ],
  },
  {
    id: 'child-growth-puberty',
    region: 'pediatric brain',
    exam: 'MRI pituitary',
    question: 'Short stature or early puberty: pituitary cause?',
    plainQuestion: 'Is my child’s growth problem from the pituitary gland?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'tumorSigns',
        kind: 'yesno',
        ask: 'Is there visual change, headache, arginine vasopressin deficiency or central precocious puberty?',
      },
    ],
    branches: [
      {
        when: { tumorSigns: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'a tumor of the stalk or hypothalamus shows by enhancement',
        because: 'Germinoma, craniopharyngioma and hypothalamic lesions need enhancement.',
        plain: 'Contrast helps find a growth near the gland.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'gland size and stalk show on T1 images unaided',
        because: 'Gland size, stalk and ectopic posterior bright spot are seen on T1 without contrast in isolated growth hormone deficiency; some centers add contrast.',
        plain: 'MRI pictures without contrast show the shape of the gland.',
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
    commonError: 'Adding contrast for isolated growth hormone deficiency out of habit.',
    alternatives: 'If contrast cannot be given: thin T1 and T2 of the gland and stalk.',
    searchWords: [
      'growth hormone deficiency', 'GHD', 'short stature', 'precocious puberty', 'early puberty', 'delayed puberty',
      'pediatric pituitary', 'craniopharyngioma', 'not growing',
    ],
  },
]
