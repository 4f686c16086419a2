/**
 * Body regions in reading order, head to foot, then the whole body, then children. `id` is stored with questions and
 * requests and stays as it is; `label` is what a screen shows.
 */
export const regions = [
  { id: 'brain', label: 'Brain' },
  { id: 'pituitary', label: 'Pituitary' },
  { id: 'internal auditory canal', label: 'Internal auditory canal' },
  { id: 'orbits', label: 'Orbits' },
  { id: 'head and neck', label: 'Head and neck' },
  { id: 'spine, cervical', label: 'Spine, cervical' },
  { id: 'spine, thoracic', label: 'Spine, thoracic' },
  { id: 'spine, lumbar', label: 'Spine, lumbar' },
  { id: 'spine, whole', label: 'Spine, whole' },
  { id: 'sacroiliac joints', label: 'Sacroiliac joints' },
  { id: 'brachial plexus', label: 'Brachial plexus' },
  { id: 'lumbosacral plexus', label: 'Lumbosacral plexus' },
  { id: 'breast', label: 'Breast' },
  { id: 'heart', label: 'Heart' },
  { id: 'chest', label: 'Chest' },
  { id: 'aorta and vessels', label: 'Aorta and vessels' },
  { id: 'liver', label: 'Liver' },
  { id: 'biliary', label: 'Bile ducts' },
  { id: 'pancreas', label: 'Pancreas' },
  { id: 'kidneys', label: 'Kidneys' },
  { id: 'adrenals', label: 'Adrenals' },
  { id: 'bowel', label: 'Bowel' },
  { id: 'prostate', label: 'Prostate' },
  { id: 'female pelvis', label: 'Female pelvis' },
  { id: 'obstetric', label: 'Pregnancy' },
  { id: 'shoulder', label: 'Shoulder' },
  { id: 'elbow', label: 'Elbow' },
  { id: 'wrist', label: 'Wrist and hand' },
  { id: 'hip', label: 'Hip' },
  { id: 'knee', label: 'Knee' },
  { id: 'ankle and foot', label: 'Ankle and foot' },
  { id: 'soft tissue and bone', label: 'Soft tissue and bone' },
  { id: 'bone marrow', label: 'Bone marrow' },
  { id: 'whole body', label: 'Whole body' },
  { id: 'pediatric brain', label: 'Pediatric brain' },
  { id: 'pediatric spine', label: 'Pediatric spine' },
  { id: 'pediatric abdomen', label: 'Pediatric abdomen' },
  { id: 'pediatric musculoskeletal', label: 'Pediatric musculoskeletal' },
] as const satisfies readonly { id: string, label: string }[]

export type RegionId = (typeof regions)[number]['id']

const places = new Map<string, number>(regions.map((region, index) => [region.id, index]))

/** Whether a stored region is one of the list. */
export function isRegionId(id: string): id is RegionId {
  return places.has(id)
}

/** Words for a stored region; a region that is not in the list is shown as stored. */
export function regionLabel(id: string): string {
  return regions.find(region => region.id === id)?.label ?? id
}

/** Sorts region ids in the order of `regions`; unknown ones go last, by name. For `Array.prototype.sort`. */
export function compareRegions(a: string, b: string): number {
  const last = regions.length
  return (places.get(a) ?? last) - (places.get(b) ?? last) || a.localeCompare(b, 'en')
}
