import { eq } from 'drizzle-orm'
import type { WriteResult } from '#shared/types/views'
import { patients } from '#server/database/schema/requests'
import { userOf } from '../context'
import type { ServiceContext } from '../context'
import { changeRequest } from './change'

/** Keeps the patient's wish on details by e-mail, with who asked and when. */
export async function recordConsent({ ctx, input }: {
  ctx: ServiceContext
  input: { id: string, detailsByEmail: boolean, email: string | null }
}): Promise<WriteResult> {
  const actor = userOf(ctx)
  return await changeRequest(ctx, {
    id: input.id,
    version: null,
    action: 'consent.record',
    step: null,
    apply: async (tx, { patient }) => {
      await tx.update(patients).set({
        detailsByEmail: input.detailsByEmail,
        consentAskedById: actor.userId,
        consentAskedAt: ctx.now,
        ...(input.email ? { email: input.email } : {}),
      }).where(eq(patients.id, patient.id))
      return { audit: 'patient.consent', detail: { detailsByEmail: input.detailsByEmail } }
    },
  })
}
