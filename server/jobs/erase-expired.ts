import { z } from 'zod'
import { eraseExpired } from '#server/services/upkeep/erase-expired'
import { defineJob } from './job'

export default defineJob('erase-expired', z.unknown(), async ({ ctx }) => {
  const { keys, visits } = await eraseExpired({ ctx })
  return `${keys} kept answers and ${visits} visits erased`
})
