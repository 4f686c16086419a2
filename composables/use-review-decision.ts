import { computed, reactive, watch } from 'vue'
import type { Ref } from 'vue'
import type { z } from 'zod'
import { assessDecision } from '#shared/domain/assessment/assess'
import { inputsFrom } from '#shared/domain/assessment/inputs'
import { needKinds } from '#shared/domain/assessment/needs'
import type { NeedKind } from '#shared/domain/assessment/needs'
import type { Assessment, AssessmentRules } from '#shared/domain/assessment/types'
import { starterAgents } from '#shared/domain/contrast/agents'
import { computeDose } from '#shared/domain/contrast/dose'
import { isIntravenous, usesContrast } from '#shared/domain/contrast/outcome'
import type { DecidableOutcome } from '#shared/domain/contrast/outcome'
import type { AgentId, Dose, RankedAgent } from '#shared/domain/contrast/types'
import type { Sex } from '#shared/domain/kidney/types'
import type { DecisionWeight } from '#shared/domain/request/decision'
import { weighDecision } from '#shared/domain/request/decision'
import type { approvalSchema } from '#shared/schemas/requests'
import type { RequestView } from '#shared/types/views'

/** What the radiologist has chosen and typed; kept while moving between requests, so that nothing typed is lost. */
export interface DecisionFields {
  contrast: DecidableOutcome | null
  agent: AgentId | null
  doseMmolPerKg: number | null
  weightKg: number | null
  volumeMl: number | null
  note: string
  differsReason: string
  wordGiven: boolean
  waived: Partial<Record<NeedKind, string>>
}

type Found = Pick<Assessment, 'findings' | 'agents' | 'asksRadiologist' | 'needs'>

/** The suggestion as fields: best agent, its dose, the weight the assessment used. */
export function suggestedFields(view: Pick<RequestView, 'assessment' | 'form' | 'record'>): DecisionFields {
  const suggestion = view.assessment?.suggestion ?? null
  const contrast = suggestion === 'discuss' ? null : suggestion
  const fields: DecisionFields = {
    contrast, agent: null, doseMmolPerKg: null, weightKg: view.form.weightKg ?? view.record?.weight?.kg ?? null, volumeMl: null,
    note: '', differsReason: '', wordGiven: false, waived: {},
  }
  return contrast === null ? fields : { ...fields, ...agentFields(contrast, view.assessment?.agents ?? null) }
}

/** Agent and dose to begin with once a contrast is chosen. */
export function agentFields(contrast: DecidableOutcome, agents: Assessment['agents']): Pick<DecisionFields, 'agent' | 'doseMmolPerKg'> {
  if (!usesContrast(contrast)) return { agent: null, doseMmolPerKg: null }
  const best = agents?.ranked.find(candidate => candidate.agent === agents.best) ?? null
  return { agent: best?.agent ?? null, doseMmolPerKg: isIntravenous(contrast) ? best?.dose?.doseMmolPerKg ?? null : null }
}

/** The fields as the approval's body: nothing of contrast goes along where none is given. */
export function approvalBody(fields: DecisionFields, weight: DecisionWeight | null): z.input<typeof approvalSchema> | { contrast: null } {
  if (fields.contrast === null) return { contrast: null }
  const vein = isIntravenous(fields.contrast)
  return {
    contrast: fields.contrast,
    agent: usesContrast(fields.contrast) ? fields.agent : null,
    doseMmolPerKg: vein ? fields.doseMmolPerKg : null,
    weightKg: vein ? fields.weightKg : null,
    volumeMl: fields.contrast === 'intra-articular' ? fields.volumeMl : null,
    note: fields.note,
    differsReason: weight?.reasonNeeded ? fields.differsReason : null,
    wordGiven: weight?.wordNeeded ? fields.wordGiven : false,
    waivedNeeds: Object.entries(fields.waived).flatMap(([kind, reason]) => isNeedKind(kind) ? [{ kind, reason: reason ?? '' }] : []),
  }
}

function isNeedKind(kind: string): kind is NeedKind {
  return needKinds.some(known => known === kind)
}

/** Amount and volume for the dose and weight in the fields; null while either is missing or no number. */
export function doseOf(fields: DecisionFields, ranked: RankedAgent | null): Dose | null {
  const agent = starterAgents.find(candidate => candidate.id === fields.agent)
  if (!agent || fields.contrast === null || !isIntravenous(fields.contrast)) return null
  const { doseMmolPerKg, weightKg } = fields
  if (doseMmolPerKg === null || !(doseMmolPerKg > 0)) return null
  const result = computeDose({ agent, weightKg, ageYears: null, doseMmolPerKg })
  if (result.status !== 'ok') return null
  const belowLabel = ranked?.dose?.checks.includes('age-below-label') ?? false
  return belowLabel ? { ...result.dose, checks: ['age-below-label', ...result.dose.checks.filter(check => check !== 'ok')] } : result.dose
}

function asSex(sex: string): Sex {
  return sex === 'female' || sex === 'male' || sex === 'other' ? sex : 'unknown'
}

/** The draft of one radiologist's decision on the open request, weighed as it changes. */
export function useReviewDecision(request: Ref<RequestView | null>, rules: Ref<AssessmentRules | null>) {
  const drafts = reactive(new Map<string, DecisionFields>())
  const fields = computed(() => request.value ? drafts.get(request.value.id) ?? null : null)

  watch(request, (view) => {
    if (view && !drafts.has(view.id)) drafts.set(view.id, suggestedFields(view))
    // At once: while the server draws the page, no later moment comes, and the browser must begin from the same page.
  }, { immediate: true, flush: 'sync' })

  /** Findings, agents and needs for the contrast chosen: the stored ones while it follows the suggestion. */
  const found = computed<Found | null>(() => {
    const view = request.value
    const contrast = fields.value?.contrast ?? null
    if (!view?.assessment) return null
    if (contrast === null || contrast === view.assessment.suggestion || rules.value === null) return view.assessment
    const sex = view.record?.patient?.sex ?? asSex(view.patient.sex)
    return assessDecision(
      inputsFrom({
        form: view.form, record: view.record, ledger: view.ledger, patient: { birthDate: view.patient.birthDate, sex },
        plannedAt: view.slot?.startsAt ?? null, now: new Date().toISOString(),
      }),
      rules.value,
      { contrast, agent: fields.value?.agent ?? null },
    )
  })

  const ranked = computed<RankedAgent | null>(() => found.value?.agents?.ranked.find(candidate => candidate.agent === fields.value?.agent) ?? null)

  const dose = computed(() => fields.value ? doseOf(fields.value, ranked.value) : null)

  const weight = computed<DecisionWeight | null>(() => {
    const draft = fields.value
    if (!draft || draft.contrast === null || !found.value) return null
    return weighDecision(request.value?.assessment?.suggestion ?? null, found.value, {
      contrast: draft.contrast, agent: draft.agent, doseMmolPerKg: draft.doseMmolPerKg,
    })
  })

  /** True while pressing A signs exactly what was suggested. */
  const asSuggested = computed(() => {
    const draft = fields.value
    if (!draft || !request.value || draft.contrast === null) return false
    const suggested = suggestedFields(request.value)
    return draft.contrast === suggested.contrast && draft.agent === suggested.agent && draft.doseMmolPerKg === suggested.doseMmolPerKg
      && draft.weightKg === suggested.weightKg && Object.keys(draft.waived).length === 0
  })

  function chooseContrast(contrast: DecidableOutcome) {
    const draft = fields.value
    if (!draft || draft.contrast === contrast) return
    draft.contrast = contrast
    Object.assign(draft, agentFields(contrast, found.value?.agents ?? null))
  }

  function chooseAgent(agent: AgentId) {
    const draft = fields.value
    if (!draft || draft.contrast === null) return
    draft.agent = agent
    if (isIntravenous(draft.contrast)) draft.doseMmolPerKg = ranked.value?.dose?.doseMmolPerKg ?? draft.doseMmolPerKg
  }

  function change(part: Partial<DecisionFields>) {
    if (fields.value) Object.assign(fields.value, part)
  }

  function waive(kind: NeedKind, reason: string | null) {
    const draft = fields.value
    if (!draft) return
    const { [kind]: _dropped, ...rest } = draft.waived
    draft.waived = reason === null ? rest : { ...draft.waived, [kind]: reason }
  }

  /** After signing: the next look at this request begins from its suggestion again. */
  function forget(id: string) {
    drafts.delete(id)
  }

  return { fields, found, ranked, dose, weight, asSuggested, chooseContrast, chooseAgent, change, waive, forget }
}
