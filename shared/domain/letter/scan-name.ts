/** Body regions as patients say them, by the region of the clinical question. */
const plainRegions: Record<string, string> = {
  'brain': 'brain scan',
  'pituitary': 'brain scan',
  'internal auditory canal': 'inner ear scan',
  'orbits': 'eye scan',
  'head and neck': 'neck scan',
  'spine, lumbar': 'lower back scan',
  'spine, cervical': 'neck scan',
  'spine, thoracic': 'back scan',
  'spine, whole': 'spine scan',
  'sacroiliac joints': 'lower back scan',
  'brachial plexus': 'shoulder nerve scan',
  'lumbosacral plexus': 'hip nerve scan',
  'breast': 'breast scan',
  'heart': 'heart scan',
  'chest': 'chest scan',
  'aorta and vessels': 'blood vessel scan',
  'liver': 'liver scan',
  'biliary': 'bile duct scan',
  'pancreas': 'pancreas scan',
  'kidneys': 'kidney scan',
  'adrenals': 'belly scan',
  'bowel': 'bowel scan',
  'prostate': 'prostate scan',
  'female pelvis': 'pelvis scan',
  'obstetric': 'pregnancy scan',
  'shoulder': 'shoulder scan',
  'elbow': 'elbow scan',
  'wrist': 'wrist scan',
  'hip': 'hip scan',
  'knee': 'knee scan',
  'ankle and foot': 'ankle and foot scan',
  'whole body': 'body scan',
  'pediatric brain': 'brain scan',
  'pediatric spine': 'spine scan',
  'pediatric abdomen': 'belly scan',
}

/**
 * Exams that reach past, or lie beside, the region their question is filed under: a patient with an infection of the spine
 * comes for the whole spine, not for the "lower back". The first that fits counts.
 */
const plainExams: readonly [exam: RegExp, name: string][] = [
  [/^MRI (?:whole spine|spine|of the affected spine level|cervical and thoracic cord)(?:,|$)/, 'spine scan'],
  [/^MRI brain and (?:cervical )?spine\b/, 'brain and spine scan'],
  [/^(?:Rapid )?MRI brain\b/, 'brain scan'],
  [/^MRI abdomen\b/, 'belly scan'],
  [/^MRI pelvis(?:,|$)/, 'pelvis scan'],
  [/^MRI temporomandibular joints?\b/, 'jaw scan'],
  [/^MRI of the /, 'MRI scan'],
]

/**
 * The exam in plain words, for instance "brain scan": by its name where that disagrees with the region of the question, else
 * by the region; "MRI scan" where the department named a region of its own.
 */
export function plainScanName({ region, name }: { region: string, name: string | null }): string {
  const byExam = name === null ? undefined : plainExams.find(([exam]) => exam.test(name))?.[1]
  return byExam ?? plainRegions[region] ?? 'MRI scan'
}
