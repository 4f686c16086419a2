import { z } from 'zod'
import { sealDays } from '#server/services/audit/seal-days'
import { defineJob } from './job'

export default defineJob('seal-audit', z.unknown(), async ({ ctx }) => `${(await sealDays({ ctx })).length} days sealed`)
