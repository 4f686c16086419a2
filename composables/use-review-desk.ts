import type { Ref } from 'vue'
import { computed, reactive, ref, watch } from 'vue'
import { usesContrast } from '#shared/domain/contrast/outcome'
import { approvalSchema, declineSchema, messageSchema, querySchema, reasonSchema } from '#shared/schemas/requests'
import type { WriteResult } from '#shared/types/views'
import { useLiveAnnouncer } from '~/composables/use-live-announcer'
import type { ApiResult } from '~/composables/use-api'
import { useFormErrors } from '~/composables/use-form-errors'
import { approvalBody, useReviewDecision } from '~/composables/use-review-decision'
import { useReviewRequest } from '~/composables/use-review-request'
import { useRulesInForce } from '~/composables/use-rules-in-force'

/** Words for the steps beside the decision, kept by request while moving about, so that nothing typed is lost. */
export interface ReviewTexts { query: string, declineReason: string, helpInstead: string, message: string, reopenReason: string }

export type ReviewDesk = ReturnType<typeof useReviewDesk>
export type ReviewDialog = 'approve' | 'query' | 'decline' | 'reopen' | 'keys'

/** One radiologist at the open request: the draft, the dialogs, and each step to the server. `done` runs after a write. */
export function useReviewDesk(done: () => Promise<unknown>) {
  const announcer = useLiveAnnouncer()
  const { rules } = useRulesInForce()
  const reading = useReviewRequest()
  const { request } = reading
  const decision = useReviewDecision(request, rules)
  const errors = useFormErrors()
  const dialog: Ref<ReviewDialog | null> = ref(null)
  const written = reactive(new Map<string, ReviewTexts>())
  const texts = computed(() => request.value ? written.get(request.value.id) ?? null : null)

  watch(() => request.value?.id, (id) => {
    dialog.value = null
    errors.clear()
    if (id !== undefined && !written.has(id)) written.set(id, { query: '', declineReason: '', helpInstead: '', message: '', reopenReason: '' })
    // At once: while the server draws the page, no later moment comes, and the browser must begin from the same page.
  }, { immediate: true, flush: 'sync' })

  function may(action: 'request.approve' | 'request.query' | 'request.decline' | 'request.undo' | 'request.reopen' | 'message.post') {
    return request.value?.may.includes(action) ?? false
  }

  function show(next: ReviewDialog | null) {
    errors.clear()
    dialog.value = next
  }

  async function approve() {
    const fields = decision.fields.value
    if (!fields || !may('request.approve')) return
    const body = errors.check(approvalSchema, approvalBody(fields, decision.weight.value))
    if (body === null) return
    const missing = missingFrom()
    if (missing.length > 0) return errors.refuse(missing)
    if (decision.weight.value?.confirmNeeded && dialog.value !== 'approve') return show('approve')
    await finish('approval', body, 'Approved and signed. You can take it back for 60 seconds.', true)
  }

  /** What the body's schema cannot see: an agent where one is given, a reason and the word where they are asked. */
  function missingFrom() {
    const fields = decision.fields.value
    const weight = decision.weight.value
    const missing: { path: string, message: string }[] = []
    if (!fields || fields.contrast === null || weight === null) return missing
    if (usesContrast(fields.contrast) && fields.agent === null) missing.push({ path: 'agent', message: 'Choose the agent.' })
    if (weight.reasonNeeded && fields.differsReason.trim() === '') missing.push({ path: 'differsReason', message: 'Give a reason for this choice.' })
    if (weight.wordNeeded && !fields.wordGiven) missing.push({ path: 'wordGiven', message: 'Give your word, or choose without contrast.' })
    return missing
  }

  async function query() {
    const body = errors.check(querySchema, { body: texts.value?.query ?? '' })
    if (body && await finish('query', body, 'The query is with the ordering side.', false)) clearText('query')
  }

  async function decline() {
    const body = errors.check(declineSchema, { reason: texts.value?.declineReason ?? '', helpInstead: texts.value?.helpInstead ?? '' })
    if (body) await finish('decline', body, 'Declined. You can take it back for 60 seconds.', true)
  }

  async function undo() {
    await finish('undo', {}, 'Taken back. The request waits for a decision again.', false)
  }

  async function reopen() {
    const body = errors.check(reasonSchema, { reason: texts.value?.reopenReason ?? '' })
    if (body && await finish('reopening', body, 'Reopened. Everyone involved is told.', false)) clearText('reopenReason')
  }

  async function post(message: { kind: 'question' | 'answer' | 'note', body: string, internal: boolean }) {
    const body = errors.check(messageSchema, message)
    if (body && await finish('messages', body, message.kind === 'answer' ? 'The answer is posted.' : 'The message is posted.', false)) clearText('message')
  }

  function clearText(name: 'query' | 'reopenReason' | 'message') {
    if (texts.value) texts.value[name] = ''
  }

  async function finish(route: string, body: object, said: string, forgets: boolean): Promise<boolean> {
    const id = request.value?.id
    const result: ApiResult<WriteResult> | null = await reading.write(route, body)
    if (result === null) return false
    if (!result.ok) {
      if (errors.fromServer(result.problem)) return false
      dialog.value = null
      announcer.announce(`${result.problem.title}. ${result.problem.detail}`)
      if (reading.refused.value?.overtaken) await done()
      return false
    }
    dialog.value = null
    if (forgets && id) decision.forget(id)
    announcer.announce(said)
    await done()
    return true
  }

  return { ...reading, rules, decision, errors, dialog, texts, may, show, approve, query, decline, undo, reopen, post }
}
