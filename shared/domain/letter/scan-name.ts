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

/** The exam in plain words, for instance "brain scan"; "MRI scan" where the department named a region of its own. */
export function plainScanName(region: string): string {
  return plainRegions[region] ?? 'MRI scan'
}
