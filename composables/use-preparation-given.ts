import { computed, reactive } from 'vue'
import { starterAgents } from '#shared/domain/contrast/agents'
import { decidableOutcomes, isIntravenous, usesContrast } from '#shared/domain/contrast/outcome'
import type { DecidableOutcome } from '#shared/domain/contrast/outcome'
import { agentIds } from '#shared/domain/contrast/types'
import type { AgentId } from '#shared/domain/contrast/types'
import type { DiffersCause } from '#shared/domain/request/differs'
import type { RequestView } from '#shared/types/views'
import { instantOf, localOf } from '~/composables/use-preparation-words'

type Signed = Pick<RequestView, 'decision' | 'administration' | 'slot'>

/** The fields of what was given: an earlier entry to correct, else what was signed. `now` is an ISO instant. */
export function givenFields(view: Signed, zone: string, now: string) {
  const { decision, administration, slot } = view
  const start = administration?.givenAt ?? (slot !== null && slot.startsAt < now ? slot.startsAt : now)
  return {
    contrast: (administration?.contrast ?? decision?.contrast ?? null) as DecidableOutcome | null,
    agent: (administration ? administration.agent : decision?.agent ?? null) as AgentId | null,
    volumeMl: administration ? administration.volumeMl : rounded(decision?.volumeMl ?? null),
    lot: administration?.lot ?? '',
    date: localOf(start, zone).date as string | null,
    time: localOf(start, zone).time,
    differsCause: (administration?.differsCause ?? null) as DiffersCause | null,
    differsReason: administration?.differsReason ?? '',
    reaction: administration?.reaction ?? 'none',
    reactionDetail: administration?.reactionDetail ?? '',
    extravasation: administration?.extravasation ?? false,
  }
}

function rounded(volumeMl: number | null): number | null {
  return volumeMl === null ? null : Number(volumeMl.toFixed(volumeMl < 5 ? 2 : 1))
}

/** What was really given, beside what was signed. */
export function usePreparationGiven(view: Signed, zone: string, now: string) {
  const fields = reactive(givenFields(view, zone, now))
  const used = computed(() => fields.contrast !== null && usesContrast(fields.contrast))
  const differs = computed(() => fields.contrast !== view.decision?.contrast || (used.value && fields.agent !== view.decision?.agent))
  /** mmol for a dose by vein; a joint gets a dilution, whose amount is not volume times concentration. */
  const amountMmol = computed(() => {
    const agent = starterAgents.find(candidate => candidate.id === fields.agent)
    if (!agent || fields.volumeMl === null || !(fields.volumeMl > 0) || fields.contrast === null || !isIntravenous(fields.contrast)) return null
    return agent.concentrationMmolPerMl * fields.volumeMl
  })

  function chooseContrast(value: string | null) {
    const contrast = decidableOutcomes.find(outcome => outcome === value)
    if (!contrast) return
    fields.contrast = contrast
    if (!usesContrast(contrast)) Object.assign(fields, { agent: null, volumeMl: null, lot: '' })
  }
  function chooseAgent(value: string | null) {
    fields.agent = agentIds.find(agent => agent === value) ?? null
  }

  /** The route's body, or what is wrong with the time. */
  function body() {
    const at = instantOf(fields.date, fields.time, zone)
    const { date: _date, time: _time, ...rest } = fields
    return { at, value: { ...rest, differsCause: differs.value ? fields.differsCause : null, differsReason: differs.value ? fields.differsReason : '', givenAt: at.ok ? at.instant : '' } }
  }

  return { fields, used, differs, amountMmol, chooseContrast, chooseAgent, body }
}
