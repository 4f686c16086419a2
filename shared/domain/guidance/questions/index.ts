import type { ClinicalQuestion } from '../types'
import { adrenalsQuestions } from './adrenals'
import { ankleAndFootQuestions } from './ankle-and-foot'
import { aortaAndVesselsQuestions } from './aorta-and-vessels'
import { biliaryQuestions } from './biliary'
import { boneMarrowQuestions } from './bone-marrow'
import { bowelQuestions } from './bowel'
import { brachialPlexusQuestions } from './brachial-plexus'
import { brainCommonQuestions } from './brain-common'
import { brainUncommonQuestions } from './brain-uncommon'
import { breastQuestions } from './breast'
import { chestQuestions } from './chest'
import { elbowQuestions } from './elbow'
import { femalePelvisQuestions } from './female-pelvis'
import { headAndNeckQuestions } from './head-and-neck'
import { heartQuestions } from './heart'
import { hipQuestions } from './hip'
import { internalAuditoryCanalQuestions } from './internal-auditory-canal'
import { kidneysQuestions } from './kidneys'
import { kneeQuestions } from './knee'
import { liverQuestions } from './liver'
import { lumbosacralPlexusQuestions } from './lumbosacral-plexus'
import { obstetricQuestions } from './obstetric'
import { orbitsQuestions } from './orbits'
import { pancreasQuestions } from './pancreas'
import { pediatricAbdomenQuestions } from './pediatric-abdomen'
import { pediatricBrainQuestions } from './pediatric-brain'
import { pediatricMusculoskeletalQuestions } from './pediatric-musculoskeletal'
import { pediatricSpineQuestions } from './pediatric-spine'
import { pituitaryQuestions } from './pituitary'
import { prostateQuestions } from './prostate'
import { sacroiliacJointsQuestions } from './sacroiliac-joints'
import { shoulderQuestions } from './shoulder'
import { softTissueAndBoneQuestions } from './soft-tissue-and-bone'
import { spineCervicalQuestions } from './spine-cervical'
import { spineLumbarQuestions } from './spine-lumbar'
import { spineThoracicQuestions } from './spine-thoracic'
import { spineWholeQuestions } from './spine-whole'
import { wholeBodyQuestions } from './whole-body'
import { wristQuestions } from './wrist'

/**
 * The starter guidance: what a new department begins with, in the order of `regions`, within a region from the most
 * to the least common. The lead radiologist of each department reviews, corrects and signs off every question before
 * clinical use; what runs afterwards is the version kept in the database.
 */
export const starterQuestions: ClinicalQuestion[] = [
  ...brainCommonQuestions,
  ...brainUncommonQuestions,
  ...pituitaryQuestions,
  ...internalAuditoryCanalQuestions,
  ...orbitsQuestions,
  ...headAndNeckQuestions,
  ...spineCervicalQuestions,
  ...spineThoracicQuestions,
  ...spineLumbarQuestions,
  ...spineWholeQuestions,
  ...sacroiliacJointsQuestions,
  ...brachialPlexusQuestions,
  ...lumbosacralPlexusQuestions,
  ...breastQuestions,
  ...heartQuestions,
  ...chestQuestions,
  ...aortaAndVesselsQuestions,
  ...liverQuestions,
  ...biliaryQuestions,
  ...pancreasQuestions,
  ...kidneysQuestions,
  ...adrenalsQuestions,
  ...bowelQuestions,
  ...prostateQuestions,
  ...femalePelvisQuestions,
  ...obstetricQuestions,
  ...shoulderQuestions,
  ...elbowQuestions,
  ...wristQuestions,
  ...hipQuestions,
  ...kneeQuestions,
  ...ankleAndFootQuestions,
  ...softTissueAndBoneQuestions,
  ...boneMarrowQuestions,
  ...wholeBodyQuestions,
  ...pediatricBrainQuestions,
  ...pediatricSpineQuestions,
  ...pediatricAbdomenQuestions,
  ...pediatricMusculoskeletalQuestions,
]
