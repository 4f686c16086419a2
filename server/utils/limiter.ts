import type { Pool } from 'pg'
import { RateLimiterPostgres } from 'rate-limiter-flexible'

/** One family of counters in the table `rate_limits`, shared by all servers. */
export function createLimiter(pool: Pool, name: string, rule: { points: number, seconds: number }): RateLimiterPostgres {
  return new RateLimiterPostgres({
    storeClient: pool,
    storeType: 'pool',
    tableName: 'rate_limits',
    tableCreated: true,
    keyPrefix: name,
    points: rule.points,
    duration: rule.seconds,
  })
}
