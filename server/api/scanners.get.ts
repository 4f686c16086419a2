import { listScanners } from '#server/services/rules/scanners'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('scanner.list', async ({ ctx }) => await listScanners({ ctx }))
