import nodemailer from 'nodemailer'
import { mailAddress } from '#shared/schemas/common'
import { oneLine } from './escape'

export interface MailSettings {
  host: string
  port: number
  user: string
  password: string
  /** `off` only for a catcher on loopback, which has no certificate. */
  tls: 'required' | 'off'
  /** The sender, for instance `Northshore Imaging <imaging@example.org>`. */
  from: string
}

export interface MailMessage {
  to: string
  subject: string
  html: string
  text: string
  /** Says which message it is: sent twice after a crash, it carries the same id. Letters, digits and dashes. */
  id: string
}

export interface Mailer {
  /**
   * Hands one message to the mail server.
   *
   * @returns the Message-ID.
   * @throws MailFailure
   */
  send: (message: MailMessage, signal?: AbortSignal) => Promise<string>
  close: () => void
}

/** Why a message did not go out, in words that hold neither an address nor what the mail server wrote. */
export class MailFailure extends Error {
  constructor(
    message: string,
    /** The address itself was refused: trying again would not help. */
    readonly permanent: boolean,
    /** The server said that it did not take the message, so that nobody has its link. */
    readonly refused: boolean,
  ) {
    super(message)
    this.name = 'MailFailure'
  }
}

/** A whole send may take no longer, however busy its socket looks. */
const sendWithinMs = 60_000

/**
 * A transport without a pool: an idle pooled connection may hang, and letters are few. TLS is demanded unless the setting turns
 * it off altogether.
 */
export function createMailer(settings: MailSettings, limits: { sendWithinMs: number } = { sendWithinMs }): Mailer {
  const transport = nodemailer.createTransport({
    host: settings.host,
    port: settings.port,
    secure: settings.tls === 'required' && settings.port === 465,
    requireTLS: settings.tls === 'required',
    ignoreTLS: settings.tls === 'off',
    ...(settings.user ? { auth: { user: settings.user, pass: settings.password } } : {}),
    dnsTimeout: 5_000,
    connectionTimeout: 10_000,
    greetingTimeout: 10_000,
    socketTimeout: 30_000,
    disableFileAccess: true,
    disableUrlAccess: true,
  })
  const domain = senderDomain(settings.from)
  return {
    async send(message, signal) {
      const to = mailAddress.safeParse(message.to)
      if (!to.success) throw new MailFailure('The address is not one plain e-mail address.', true, true)
      const deadline = AbortSignal.timeout(limits.sendWithinMs)
      try {
        const { messageId } = await transport.sendMail({
          messageId: `<${message.id}@${domain}>`,
          from: settings.from,
          to: { name: '', address: to.data },
          subject: oneLine(message.subject),
          html: message.html,
          text: message.text,
          headers: { 'Auto-Submitted': 'auto-generated' },
          signal: signal ? AbortSignal.any([deadline, signal]) : deadline,
        })
        return messageId
      }
      catch (error) {
        throw explain(error, deadline.aborted)
      }
    },
    close: () => transport.close(),
  }
}

function senderDomain(from: string): string {
  return /@([A-Za-z0-9.-]+)>?\s*$/.exec(from)?.[1] ?? 'localhost'
}

/** Only a final "no" (RFC 5321, 5yz) to the recipient or to the message itself is about this letter; all else may pass. */
function explain(error: unknown, late: boolean): MailFailure {
  const fact = (name: string): unknown => (typeof error === 'object' && error !== null && name in error ? Reflect.get(error, name) : undefined)
  const [status, step, code] = [fact('responseCode'), fact('command'), fact('code')]
  const answer = typeof status === 'number' ? ` (${status})` : ''
  if (typeof status === 'number' && status >= 500 && (step === 'RCPT TO' || step === 'DATA')) {
    return new MailFailure(`The mail server refused ${step === 'RCPT TO' ? 'the address' : 'the message'}${answer}.`, true, true)
  }
  if (code === 'EENVELOPE' && step === 'API') return new MailFailure('The address is not one plain e-mail address.', true, true)
  if (late) return new MailFailure('The mail server took too long to answer.', false, false)
  if (code === 'EABORT') return new MailFailure('Sending was cut short because the server stops.', false, false)
  if (code === 'EAUTH' || code === 'ENOAUTH') return new MailFailure('The mail server did not accept the name and password.', false, true)
  if (code === 'ETLS' || code === 'EREQUIRETLS') return new MailFailure('No secure connection to the mail server could be made.', false, true)
  if (typeof status === 'number') return new MailFailure(`The mail server put the message off${answer}.`, false, true)
  if (code === 'ETIMEDOUT') return new MailFailure('The mail server took too long to answer.', false, false)
  return new MailFailure('The mail server could not be reached, or broke off.', false, false)
}
