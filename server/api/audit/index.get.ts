import { auditQuery } from '#shared/schemas/people'
import { listAudit } from '#server/services/audit/list-audit'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'
import { parseQuery } from '#server/utils/parse-input'

export default defineAuthedHandler('audit.read', ({ event, ctx }) => listAudit({ ctx, input: parseQuery(event, auditQuery) }))
