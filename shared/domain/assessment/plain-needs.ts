import type { NeedKind } from './needs'
import type { ContrastOutcome } from '../contrast/outcome'
import type { SafetyFinding } from '../safety/types'

/**
 * A need as the patient reads it, at most grade 8, or null where it asks nothing of the patient.
 * Where a finding already says it for the patient, its words are taken.
 */
export function plainNeed(kind: NeedKind, context: { findings: SafetyFinding[], suggestion: ContrastOutcome | null }): string | null {
  switch (kind) {
    case 'creatinine': return 'Have a blood test to check your kidneys. Your clinic will set it up.'
    case 'iv-start': return 'A nurse will place a small tube in a vein in your arm when you come.'
    case 'pregnancy-answer': return 'Tell us if you may be pregnant. We may ask for a test first.'
    case 'weight': return 'We will ask how much you weigh, or weigh you when you come.'
    case 'height': return 'We will ask how tall you are.'
    case 'premedication': return 'Take the medicine your clinic gives you to lower the chance of a reaction. You may need a ride home.'
    // The finding says it once, by how urgent the scan is; it also stands for the radiologist's word.
    case 'dialysis-after': return context.findings.find(found => found.addsNeeds.includes(kind))?.plain ?? 'Keep your dialysis plan.'
    // An open pregnancy question is put to the patient by its own need.
    case 'radiologist-word': return context.findings.find(found => found.addsNeeds.includes(kind) && !found.addsNeeds.includes('pregnancy-answer'))?.plain ?? null
    case 'reaction-history': return 'Tell us what happened if you ever had a reaction to contrast, and to which kind.'
    case 'medication-guide': return 'You will get a leaflet about the contrast. Please read it and ask us anything.'
    case 'implant-clearance': return 'Tell us about any implant or metal in your body. Bring the card if you have one.'
    case 'interpreter': return 'We will have an interpreter for you.'
    case 'sedation': return 'You will get medicine to help you rest. Follow the eating rules we give you.'
    case 'radiologist-present': return context.suggestion === 'intra-articular' ? 'A doctor will place the contrast in your joint with a thin needle.' : null
    case 'observation': return 'Plan to stay for a while after the injection, so we can watch you.'
  }
}
