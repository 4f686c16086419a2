import { sql } from 'drizzle-orm'
import nodemailer from 'nodemailer'
import type { ConnectionsView } from '#shared/types/views'
import type { Database } from '#server/database/client'
import { checkConnection } from '#server/ehr/check-connection'
import type { ServiceContext } from '../context'

export interface MailServer {
  host: string
  port: number
  user: string
  password: string
  tls: 'required' | 'off'
}

/** A mail server that needs longer than this to say hello delays every letter. */
const mailWaitMs = 4_000

/** Asks each part that Wherefore depends on how it is, all at once, each within a short wait. Nothing in it is secret. */
export async function readConnections({ ctx, input }: {
  ctx: ServiceContext
  input: { mail: MailServer }
}): Promise<ConnectionsView> {
  const [ehr, mail, queue, database] = await Promise.all([
    checkConnection(ctx.ehr, { now: ctx.now.toISOString() }),
    checkMail(input.mail),
    readQueue(ctx.db),
    readDatabase(ctx.db),
  ])
  return { checkedAt: ctx.now.toISOString(), ehr: { ...ehr, address: ctx.ehr ? new URL(ctx.ehr.settings.baseUrl).host : '' }, mail, queue, database }
}

async function checkMail({ host, port, user, password, tls }: MailServer): Promise<ConnectionsView['mail']> {
  const address = `${host}:${port}`
  const transport = nodemailer.createTransport({
    host,
    port,
    secure: tls === 'required' && port === 465,
    requireTLS: tls === 'required',
    ignoreTLS: tls === 'off',
    ...(user ? { auth: { user, pass: password } } : {}),
    connectionTimeout: mailWaitMs,
    greetingTimeout: mailWaitMs,
    socketTimeout: mailWaitMs,
  })
  try {
    await transport.verify()
    return { state: 'ok', address, message: 'Connected' }
  }
  catch (error) {
    return { state: 'unreachable', address, message: mailTrouble(error) }
  }
  finally {
    transport.close()
  }
}

/** In words of ours: a mail server's own answer may hold anything. */
function mailTrouble(error: unknown): string {
  const code = error instanceof Error && 'code' in error ? String(error.code) : ''
  if (code === 'EAUTH') return 'The mail server did not accept the name and password.'
  if (code === 'ETLS' || code === 'ESOCKET') return 'No secure connection to the mail server could be made, or nothing listens there.'
  if (code === 'EDNS' || code === 'ENOTFOUND') return 'The mail server\'s name is not known to the network.'
  return 'The mail server cannot be reached.'
}

async function readQueue(db: Database): Promise<ConnectionsView['queue']> {
  const { rows } = await db.execute<{ waiting: string, failing: string, dead: string, oldest: Date | string | null }>(
    sql`select waiting, failing, dead, oldest from wherefore_queue.health()`)
  const [row] = rows
  return {
    waiting: Number(row?.waiting ?? 0),
    failing: Number(row?.failing ?? 0),
    dead: Number(row?.dead ?? 0),
    oldest: row?.oldest ? new Date(row.oldest).toISOString() : null,
  }
}

async function readDatabase(db: Database): Promise<ConnectionsView['database']> {
  const { rows } = await db.execute<{ applied: number }>(sql`select count(*)::integer as applied from drizzle.__drizzle_migrations`)
  return { state: 'ok', migrations: rows[0]?.applied ?? 0 }
}
