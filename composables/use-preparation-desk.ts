import { ref } from 'vue'
import type { z } from 'zod'
import type { administrationSchema, bookingSchema, consentSchema, needMarkSchema, unbookSchema } from '#shared/schemas/requests'
import type { LetterPreview, PreparationRow, RequestView, WriteResult } from '#shared/types/views'
import { useLiveAnnouncer } from '~/composables/use-live-announcer'
import type { ApiProblem, ApiResult } from '~/composables/use-api'
import { newWriteKey, useApi } from '~/composables/use-api'
import { useFormErrors } from '~/composables/use-form-errors'

export type PreparationStep = 'need' | 'booking' | 'release' | 'refusal' | 'given' | 'letter'

/** What the booking desk does to one exam: which step is open, the exam in full where the step asks for it, and the writes. */
export function usePreparationDesk(done: () => Promise<unknown>) {
  const api = useApi()
  const announcer = useLiveAnnouncer()
  const errors = useFormErrors()
  const step = ref<PreparationStep | null>(null)
  const row = ref<PreparationRow | null>(null)
  const view = ref<RequestView | null>(null)
  const preview = ref<LetterPreview | null>(null)
  const problem = ref<ApiProblem | null>(null)
  const busy = ref<string | null>(null)
  let key = newWriteKey()

  /** Opens a step; recording and the letter read the exam in full first. */
  async function open(next: PreparationStep, target: PreparationRow) {
    errors.clear()
    problem.value = null
    view.value = null
    preview.value = null
    key = newWriteKey()
    row.value = target
    step.value = next
    if (next === 'given' || next === 'letter') await readInFull(target)
  }

  async function readInFull(target: PreparationRow) {
    const [full, letter] = await Promise.all([
      api.get<RequestView>(`/api/requests/${target.id}`),
      step.value === 'letter' && target.slot !== null ? api.get<LetterPreview>(`/api/requests/${target.id}/letter-preview`) : null,
    ])
    if (row.value?.id !== target.id) return
    if (full.ok) view.value = full.data
    else problem.value = full.problem
    if (letter?.ok) preview.value = letter.data
  }

  function close() {
    step.value = null
    errors.clear()
  }

  type Send = (path: string, version: number) => Promise<ApiResult<WriteResult>>
  async function write(name: string, target: PreparationRow, said: string, send: Send): Promise<boolean> {
    if (busy.value !== null) return false
    busy.value = `${name} ${target.id}`
    problem.value = null
    const result = await send(`/api/requests/${target.id}`, view.value?.version ?? target.version)
    busy.value = null
    if (result.ok) {
      key = newWriteKey()
      announcer.announce(said)
      await done()
      return true
    }
    if (errors.fromServer(result.problem)) return false
    problem.value = result.problem
    // A change by somebody else: show how the exam stands now; what was typed stays in the dialog.
    if (result.problem.status === 412 || result.problem.status === 409) await done()
    return false
  }

  async function closing(ok: Promise<boolean>) {
    if (await ok) close()
  }

  const mark = (target: PreparationRow, body: z.input<typeof needMarkSchema>, said: string) =>
    write('need', target, said, path => api.post<WriteResult>(`${path}/needs`, body, { key }))
  const book = (target: PreparationRow, body: z.input<typeof bookingSchema>) =>
    closing(write('booking', target, 'The exam time is set.', (path, version) => api.put<WriteResult>(`${path}/booking`, body, { version, key })))
  const release = (target: PreparationRow, body: z.input<typeof unbookSchema>) =>
    closing(write('release', target, 'The slot is given up.', (path, version) => api.post<WriteResult>(`${path}/booking-release`, body, { version, key })))
  const refuse = (target: PreparationRow, reason: string) =>
    closing(write('refusal', target, 'Recorded. The clinician is told.', (path, version) => api.post<WriteResult>(`${path}/refusal`, { reason }, { version, key })))
  const record = (target: PreparationRow, body: z.input<typeof administrationSchema>) =>
    closing(write('given', target, 'Recorded what was given.', (path, version) => api.post<WriteResult>(`${path}/administration`, body, { version, key })))
  const consent = async (target: PreparationRow, body: z.input<typeof consentSchema>) => {
    if (await write('consent', target, 'The patient\'s wish is recorded.', path => api.put<WriteResult>(`${path}/consent`, body))) await readInFull(target)
  }
  const handOver = async (target: PreparationRow) => {
    if (await write('handover', target, 'Recorded as handed over on paper.', (path, version) => api.post<WriteResult>(`${path}/letter-handover`, {}, { version, key }))) await readInFull(target)
  }

  return { errors, step, row, view, preview, problem, busy, open, close, mark, book, release, refuse, record, consent, handOver }
}

export type PreparationDesk = ReturnType<typeof usePreparationDesk>
