import { readConnections } from '#server/services/connection/read-connections'
import { useApp } from '#server/utils/app'
import { defineAuthedHandler } from '#server/utils/define-authed-handler'

export default defineAuthedHandler('connection.read', ({ ctx }) => readConnections({ ctx, input: { mail: useApp().config.smtp } }))
