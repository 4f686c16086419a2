import type { ClinicalQuestion } from '../types'

/** Starter questions: heart; most common first. */
export const heartQuestions: ClinicalQuestion[] = [
  {
    id: 'cardiomyopathy-myocarditis',
    region: 'heart',
    exam: 'Cardiac MRI',
    question: 'Cardiomyopathy, suspected myocarditis, sarcoid or amyloid: what type and how much scar?',
    plainQuestion: 'Why is my heart muscle weak or inflamed?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'the pattern of late enhancement names the disease and shows scar',
        because: 'The pattern of late enhancement names the disease and grades risk; native T1 and T2 mapping add to it but do not replace it.',
        plain: 'Contrast stays longer in scarred or inflamed heart muscle. The pattern helps name the cause.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Nonischemic Myocardial Disease with Clinical Manifestations',
        body: 'American College of Radiology',
        year: 2014,
        status: 'confirmed',
      },
      {
        title: 'Standardized cardiovascular magnetic resonance protocols, 2020 update',
        body: 'SCMR',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering without contrast for fear of a mildly reduced eGFR, which gives up the scar images.',
    alternatives: 'Native T1 and T2 mapping with cine when contrast cannot be given.',
    searchWords: [
      'CMR', 'HCM', 'DCM', 'hypertrophic', 'myocarditis', 'sarcoid', 'amyloid', 'LGE', 'late gadolinium', 'ARVC',
      'heart failure', 'low EF', 'cardiac MRI', 'non-ischemic cardiomyopathy', 'NICM', 'cardiomyopathy', 'troponin',
      'takotsubo',
    ],
  },
  {
    id: 'ischemia-viability',
    region: 'heart',
    exam: 'Cardiac MRI, stress perfusion or viability',
    question: 'Chest pain or known coronary disease: ischemia or living muscle?',
    plainQuestion: 'Is part of my heart short of blood, or scarred?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'blood flow to heart muscle and scar are read from contrast',
        because: 'Perfusion defects are read from first-pass contrast, and viability from the depth of late enhancement.',
        plain: 'Contrast shows which parts of the heart get blood and which are scarred.',
      },
    ],
    sources: [
      {
        title: 'Myocardial first-pass perfusion cardiovascular magnetic resonance: history, theory, and state of the art',
        body: 'Journal of Cardiovascular Magnetic Resonance',
        year: 2008,
        status: 'confirmed',
      },
      {
        title: 'Standardized cardiovascular magnetic resonance protocols, 2020 update',
        body: 'SCMR',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering cardiac MRI without saying whether stress, viability or both are wanted.',
    alternatives: 'Stress echocardiography; nuclear perfusion; dobutamine cine MRI.',
    searchWords: [
      'stress MRI', 'stress CMR', 'perfusion', 'viability', 'CAD', 'coronary disease', 'chest pain', 'angina',
      'myocardial infarction', 'MI', 'heart attack', 'hibernating myocardium', 'adenosine', 'regadenoson', 'MINOCA',
    ],
  },
  {
    id: 'congenital-valve-flow',
    region: 'heart',
    exam: 'Cardiac MRI with flow',
    question: 'Congenital heart disease or valve disease: chamber size, function and flow?',
    plainQuestion: 'How well is my heart pumping, and do the valves leak?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'vesselOrScar',
        kind: 'yesno',
        ask: 'Are 3D vessel anatomy after repair, a baffle or conduit, or scar also needed?',
      },
    ],
    branches: [
      {
        when: { vesselOrScar: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'repaired vessels and scar show best on contrast images',
        because: 'Contrast angiography and late enhancement answer vessel and scar questions.',
        plain: 'Contrast shows the blood vessels and any scar.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'chamber size and valve leak are measured from cine and flow',
        because: 'Volumes come from cine images and regurgitation from phase-contrast flow; 3D non-contrast angiography covers many vessel questions. Local choice: congenital protocols vary more than most.',
        plain: 'The scanner can measure pumping and blood flow without contrast.',
      },
    ],
    sources: [
      {
        title: 'Standardized cardiovascular magnetic resonance protocols, 2020 update',
        body: 'SCMR',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Assuming every cardiac MRI needs contrast.',
    alternatives: 'If contrast cannot be given: 3D balanced angiography, flow and mapping without contrast; CT.',
    searchWords: [
      'CHD', 'congenital heart', 'tetralogy', 'TOF', 'Fontan', 'valve', 'aortic regurgitation',
      'mitral regurgitation', 'shunt fraction', 'Qp Qs', 'ASD', 'VSD', '4D flow', 'bicuspid', 'leaky valve',
    ],
  },
  {
    id: 'cardiac-iron',
    region: 'heart',
    exam: 'Cardiac MRI T2* with liver',
    question: 'Thalassemia or repeated transfusion: iron in the heart and liver?',
    plainQuestion: 'Has iron built up in my heart?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'iron is measured directly and contrast would disturb the reading',
        because: 'Iron shortens T2*, which is measured directly; contrast would disturb the measurement.',
        plain: 'The scan measures iron directly. Contrast would get in the way.',
      },
    ],
    sources: [
      {
        title: 'Cardiovascular function and treatment in beta-thalassemia major: consensus statement',
        body: 'American Heart Association',
        year: 2013,
        status: 'from memory',
      },
    ],
    commonError: 'Adding contrast and spoiling the measurement.',
    alternatives: null,
    searchWords: [
      'T2 star', 'T2*', 'iron overload', 'hemochromatosis', 'thalassemia', 'transfusion', 'sickle cell',
      'hemosiderosis', 'ferritin', 'chelation',
    ],
  },
  {
    id: 'cardiac-mass-thrombus-pericardium',
    region: 'heart',
    exam: 'Cardiac MRI',
    question: 'Cardiac mass, thrombus or pericardial disease?',
    plainQuestion: 'Is there a growth or clot in my heart?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'a clot does not enhance and a tumor does',
        because: 'Thrombus does not enhance and tumor does; pericardial inflammation shows late enhancement.',
        plain: 'Contrast helps tell a clot from a growth.',
      },
    ],
    sources: [
      {
        title: 'Standardized cardiovascular magnetic resonance protocols, 2020 update',
        body: 'SCMR',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering without contrast, so that clot and tumor cannot be told apart.',
    alternatives: 'Cine, T1, T2 and real-time images without contrast narrow the list.',
    searchWords: [
      'LV thrombus', 'intracardiac mass', 'myxoma', 'pericarditis', 'constriction', 'pericardial effusion',
      'clot in heart', 'apical thrombus', 'heart tumor',
    ],
  },
]
