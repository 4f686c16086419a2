import type { ClinicalQuestion } from '../types'

/** Starter questions: aorta and vessels; most common first. */
export const aortaAndVesselsQuestions: ClinicalQuestion[] = [
  {
    id: 'thoracic-aorta-follow-up',
    region: 'aorta and vessels',
    exam: 'MRA thoracic aorta',
    question: 'Thoracic aortic size: follow-up?',
    plainQuestion: 'Has my main artery become wider?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'complex',
        kind: 'yesno',
        ask: 'Is there a stent graft, dissection follow-up, surgery planning or suspected inflammation of the wall?',
      },
    ],
    branches: [
      {
        when: { complex: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'leaks, false lumens and wall inflammation need contrast',
        because: 'Endoleak, false lumen flow and wall inflammation need contrast.',
        plain: 'Contrast shows leaks and flow in the artery wall.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'gated non-contrast images measure the aorta reliably, scan after scan',
        because: 'ECG-gated non-contrast 3D images measure diameter reliably, and the same patient will be scanned many times.',
        plain: 'The width of the artery can be measured without contrast. You will need many scans, so less is better.',
      },
    ],
    sources: [
      {
        title: 'Validation of thoracic aortic dimensions on ECG-triggered SSFP as alternative to contrast-enhanced MRA',
        body: 'European Radiology',
        year: 2020,
        status: 'confirmed',
      },
      {
        title: 'Guideline for the diagnosis and management of aortic disease',
        body: 'ACC and AHA',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Contrast at every size check for decades.',
    alternatives: 'If contrast cannot be given: gated 3D balanced images with flow; CT angiography; ultrasound.',
    searchWords: [
      'TAA', 'thoracic aortic aneurysm', 'aortic aneurysm', 'ascending aorta', 'Marfan', 'bicuspid aortopathy',
      'aortic root', 'aortic dissection', 'endoleak', 'TEVAR', 'aorta size', 'dilated aorta',
    ],
  },
  {
    id: 'peripheral-artery-disease',
    region: 'aorta and vessels',
    exam: 'MRA abdomen and legs',
    question: 'Leg artery disease: map before treatment?',
    plainQuestion: 'Are the arteries to my legs blocked?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'contrast runs map narrowings down to the foot in one visit',
        because: 'Time-resolved and stepping-table contrast runs show stenosis and distal targets in one visit.',
        plain: 'Contrast shows the blocked parts and the open vessels below.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Sudden Onset of Cold, Painful Leg',
        body: 'American College of Radiology',
        year: 2012,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Lower Extremity Arterial Claudication',
        body: 'American College of Radiology',
        year: 2022,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering an MRI of the legs instead of an MRA.',
    alternatives: 'Non-contrast MRA (quiescent-interval or balanced), duplex ultrasound, CT angiography. In advanced kidney disease start with non-contrast MRA.',
    searchWords: [
      'PAD', 'PVD', 'claudication', 'runoff', 'MRA runoff', 'leg circulation', 'critical limb ischemia', 'CLI',
      'CLTI', 'femoral artery', 'poor circulation', 'ABI', 'leg arteries',
    ],
  },
  {
    id: 'vascular-malformation',
    region: 'aorta and vessels',
    exam: 'MRI and MRA of the affected part',
    question: 'Birthmark or swelling: what type of vascular malformation, and how far?',
    plainQuestion: 'What kind of blood vessel swelling is this?',
    volume: 2,
    usualBranch: 1,
    deciders: [
      {
        id: 'followUp',
        kind: 'yesno',
        ask: 'Is it a known low-flow lesion and only size or extent must be checked?',
      },
    ],
    branches: [
      {
        when: { followUp: ['yes'] },
        contrast: 'none',
        inShort: 'the extent of a known low-flow lesion shows on T2 images',
        because: 'Extent of a known venous or lymphatic lesion is mapped on fat-suppressed T2. After sclerotherapy or before a new treatment, ask the radiologist whether contrast is wanted.',
        plain: 'The size can be checked on MRI pictures without contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'fast and slow flow are told apart on a timed contrast run',
        because: 'Flow type is decided by time-resolved contrast MRA, and enhancement separates venous from lymphatic parts.',
        plain: 'Contrast shows how fast blood flows through it. That decides the treatment.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Clinically Suspected Vascular Malformation of the Extremities',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
      {
        title: 'ACR Appropriateness Criteria: Soft Tissue Vascular Anomalies',
        body: 'American College of Radiology',
        year: 2024,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering without contrast before the flow type of the lesion is known.',
    alternatives: 'Doppler ultrasound with T2.',
    searchWords: [
      'hemangioma', 'venous malformation', 'lymphatic malformation', 'VM', 'AVM extremity', 'Klippel-Trenaunay',
      'sclerotherapy', 'birthmark', 'port wine',
    ],
  },
  {
    id: 'renal-artery-stenosis',
    region: 'aorta and vessels',
    exam: 'MRA renal arteries',
    question: 'Renal artery stenosis?',
    plainQuestion: 'Is an artery to my kidney too narrow?',
    volume: 1,
    usualBranch: 1,
    deciders: [
      {
        id: 'branches',
        kind: 'yesno',
        ask: 'Are branch vessels, fibromuscular disease or stent planning in question?',
      },
    ],
    branches: [
      {
        when: { branches: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'small branches and beading need the sharper contrast run',
        because: 'Branch detail and bead-like fibromuscular change need the sharper contrast run.',
        plain: 'Contrast shows small branches more clearly.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'flow images show the main renal artery unaided',
        because: 'Inflow-sensitive balanced MRA shows ostial and trunk stenosis without contrast, in patients whose kidneys are often impaired. Local choice: with normal kidney function many departments prefer contrast MRA from the start.',
        plain: 'The main kidney artery can be seen without contrast.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Renovascular Hypertension',
        body: 'American College of Radiology',
        year: 2017,
        status: 'from memory',
      },
      {
        title: 'Use of gadolinium-based contrast media in patients with kidney disease: consensus statements',
        body: 'ACR and National Kidney Foundation',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Avoiding MRI altogether in kidney disease when non-contrast MRA exists.',
    alternatives: 'Duplex ultrasound.',
    searchWords: [
      'RAS', 'renovascular hypertension', 'high blood pressure', 'FMD', 'fibromuscular dysplasia', 'renal MRA',
      'resistant hypertension', 'kidney artery',
    ],
  },
  {
    id: 'large-vessel-vasculitis',
    region: 'aorta and vessels',
    exam: 'MRA with vessel wall imaging',
    question: 'Suspected giant cell or Takayasu arteritis?',
    plainQuestion: 'Are my large blood vessels inflamed?',
    volume: 1,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'an enhancing artery wall is the MRI sign of active inflammation',
        because: 'Mural enhancement is the MRI sign of active inflammation.',
        plain: 'Contrast lights up inflamed vessel walls.',
      },
    ],
    sources: [
      {
        title: 'EULAR recommendations for imaging in large vessel vasculitis, 2023 update',
        body: 'EULAR',
        year: 2023,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering MRA of the lumen alone, without images of the wall.',
    alternatives: 'Ultrasound of temporal and axillary arteries; FDG-PET/CT; black-blood and diffusion images.',
    searchWords: [
      'GCA', 'giant cell arteritis', 'temporal arteritis', 'Takayasu', 'aortitis', 'LVV', 'jaw claudication',
      'polymyalgia', 'PMR',
    ],
  },
  {
    id: 'pelvic-vein-thrombosis',
    region: 'aorta and vessels',
    exam: 'MR venography pelvis',
    question: 'Pelvic or iliac vein clot or compression?',
    plainQuestion: 'Is there a clot in the deep veins of my pelvis?',
    volume: 1,
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
        inShort: 'flow images answer without exposing the unborn baby to gadolinium',
        because: 'Balanced, T1 clot and time-of-flight images avoid gadolinium in pregnancy.',
        plain: 'This can be checked in pregnancy without contrast.',
      },
      {
        when: {},
        contrast: 'iv-with-and-without',
        inShort: 'contrast fills the pelvic veins evenly and shows a pinched one',
        because: 'Contrast venography fills the pelvic veins evenly and shows compression.',
        plain: 'Contrast fills the veins so a clot stands out.',
      },
    ],
    sources: [
      {
        title: 'Common practice',
        body: 'trade practice, no single published source',
        year: null,
        status: 'common practice',
      },
      {
        title: 'Association between MRI exposure during pregnancy and fetal and childhood outcomes',
        body: 'JAMA',
        year: 2016,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering contrast in pregnancy, where flow and T1 clot images come first.',
    alternatives: 'Duplex ultrasound; CT venography.',
    searchWords: [
      'DVT', 'iliac vein', 'May-Thurner', 'pelvic DVT', 'MRV pelvis', 'leg swelling', 'iliac compression',
      'pelvic congestion', 'venogram', 'IVC thrombosis',
    ],
  },
]
