import { z } from 'zod'
import { eraseExpired } from '#server/services/upkeep/erase-expired'
import { defineJob } from './job'

export default defineJob('erase-expired', z.unknown(), async ({ ctx }) => {
  const { keys, visits, sessions } = await eraseExpired({ ctx })
  return `${keys} kept answers, ${visits} visits and ${sessions} sessions erased`
})
