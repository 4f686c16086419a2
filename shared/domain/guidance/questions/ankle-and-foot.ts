import type { ClinicalQuestion } from '../types'

/** Starter questions: ankle and foot; most common first. */
export const ankleAndFootQuestions: ClinicalQuestion[] = [
  {
    id: 'ankle-sprain-tendon',
    region: 'ankle and foot',
    exam: 'MRI ankle',
    question: 'Ankle pain after sprain: ligament, tendon or talar dome?',
    plainQuestion: 'What did I injure in my ankle?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'surgeryUnclear',
        kind: 'yesno',
        ask: 'Is surgery for instability or cartilage considered after a routine MRI that was unclear?',
      },
    ],
    branches: [
      {
        when: { surgeryUnclear: ['yes'] },
        contrast: 'intra-articular',
        inShort: 'a filled joint settles what the first study left open',
        because: 'Contrast in the joint outlines the lateral ligaments and unstable cartilage flaps when the routine study leaves the surgeon in doubt.',
        plain: 'Contrast in the joint shows small tears that the first scan could not settle.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'ligaments, tendons and the talar dome show on non-contrast images',
        because: 'Ligament and tendon tears and osteochondral lesions are read without contrast.',
        plain: 'Torn ligaments and tendons show on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Ankle Pain',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
    ],
    commonError: 'IV contrast for a chronic sprain.',
    alternatives: 'Ultrasound for tendons.',
    searchWords: [
      'ankle sprain', 'ATFL', 'twisted ankle', 'peroneal tendon', 'posterior tibial tendon', 'PTTD', 'OCD talus',
      'talar dome', 'high ankle sprain', 'syndesmosis', 'ankle instability', 'rolled ankle',
    ],
  },
  {
    id: 'stress-fracture',
    region: 'ankle and foot',
    exam: 'MRI of the painful bone',
    question: 'Runner or osteoporotic patient: stress fracture?',
    plainQuestion: 'Do I have a small crack in my bone?',
    volume: 3,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'marrow swelling shows a stress fracture before the X-ray does',
        because: 'Marrow edema and the fracture line appear on STIR and T1 before X-ray changes.',
        plain: 'MRI shows a tiny crack before an X-ray can see it. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Stress (Fatigue/Insufficiency) Fracture',
        body: 'American College of Radiology',
        year: 2017,
        status: 'confirmed',
      },
    ],
    commonError: 'Contrast or bone scan before MRI.',
    alternatives: null,
    searchWords: [
      'stress fracture', 'stress reaction', 'shin splints', 'insufficiency fracture', 'runner pain',
      'march fracture', 'metatarsal stress', 'tibial stress', 'bone stress injury', 'hairline fracture',
    ],
  },
  {
    id: 'diabetic-foot-osteomyelitis',
    region: 'ankle and foot',
    exam: 'MRI foot',
    question: 'Diabetic foot ulcer: is the bone infected?',
    plainQuestion: 'Has the infection in my foot reached the bone?',
    volume: 3,
    usualBranch: 1,
    deciders: [
      {
        id: 'surgeryAbscess',
        kind: 'yesno',
        ask: 'Is surgery or amputation being planned, or is abscess or dead tissue suspected?',
      },
    ],
    branches: [
      {
        when: { surgeryAbscess: ['yes'] },
        contrast: 'iv-with-and-without',
        inShort: 'dead tissue and abscess show by failing to enhance',
        because: 'Devitalized tissue and abscess show as areas that do not enhance, which sets the surgical margin.',
        plain: 'Contrast shows which tissue is healthy and if there is pus, so the surgeon can plan.',
      },
      {
        when: {},
        contrast: 'none',
        inShort: 'dark marrow beside the ulcer already shows bone infection',
        because: 'Low T1 marrow signal beside the ulcer makes the diagnosis; studies with or without contrast are both accepted, and kidney disease is common in this group.',
        plain: 'Bone infection shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Suspected Osteomyelitis of the Foot in Patients with Diabetes Mellitus',
        body: 'American College of Radiology',
        year: 2019,
        status: 'confirmed',
      },
      {
        title: 'Use of gadolinium-based contrast media in patients with kidney disease: consensus statements',
        body: 'ACR and National Kidney Foundation',
        year: 2021,
        status: 'confirmed',
      },
    ],
    commonError: 'Withholding MRI for low kidney function when a non-contrast study answers the question.',
    alternatives: 'X-ray first; labeled white cell study.',
    searchWords: [
      'DFU', 'diabetic foot', 'foot ulcer', 'osteo', 'osteomyelitis foot', 'OM', 'Charcot', 'toe infection',
      'gangrene', 'r/o osteo', 'osteomylitis', 'DM foot',
    ],
  },
  {
    id: 'achilles-plantar-fascia',
    region: 'ankle and foot',
    exam: 'MRI ankle or foot',
    question: 'Achilles or heel pain?',
    plainQuestion: 'Why does my heel hurt?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'tendon and fascia changes show on fluid-sensitive images',
        because: 'Tendon thickening, tears and plantar fascia edema need no contrast.',
        plain: 'A sore tendon shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Foot Pain',
        body: 'American College of Radiology',
        year: 2020,
        status: 'from memory',
      },
    ],
    commonError: 'Ordering "with and without" for heel pain.',
    alternatives: 'Ultrasound.',
    searchWords: [
      'Achilles', 'achilies', 'plantar fasciitis', 'plantar fascitis', 'heel pain', 'heel spur', 'tendon rupture',
      'retrocalcaneal bursitis', 'Haglund',
    ],
  },
  {
    id: 'morton-neuroma',
    region: 'ankle and foot',
    exam: 'MRI forefoot',
    question: 'Forefoot pain: Morton neuroma or plantar plate?',
    plainQuestion: 'Is a thick nerve causing the pain in my foot?',
    volume: 2,
    usualBranch: 0,
    deciders: [],
    branches: [
      {
        when: {},
        contrast: 'none',
        inShort: 'the nodule and plantar plate tears show on non-contrast images',
        because: 'A small dark nodule on T1 and plantar plate tears are seen without contrast.',
        plain: 'The thick nerve shows on the MRI. No contrast is needed.',
      },
    ],
    sources: [
      {
        title: 'ACR Appropriateness Criteria: Chronic Foot Pain',
        body: 'American College of Radiology',
        year: 2020,
        status: 'confirmed',
      },
    ],
    commonError: 'Ordering "with and without" because the word neuroma sounds like a tumor.',
    alternatives: 'Ultrasound.',
    searchWords: [
      'Morton', 'Mortons neuroma', 'plantar plate', 'metatarsalgia', 'forefoot pain', 'ball of foot',
      'interdigital neuroma', 'turf toe',
    ],
  },
]
