import { asc } from 'drizzle-orm'
import type { ScannerView } from '#shared/types/views'
import { scanners } from '#server/database/schema/rules'
import type { ServiceContext } from '../context'

/** The department's scanners in its own order. */
export async function listScanners({ ctx }: { ctx: ServiceContext }): Promise<ScannerView[]> {
  const rows = await ctx.db.select().from(scanners).orderBy(asc(scanners.position), asc(scanners.name))
  return rows.map(({ id, name, place, fieldStrengthTesla, ivHours }) => ({ id, name, place, fieldStrengthTesla, ivHours }))
}
