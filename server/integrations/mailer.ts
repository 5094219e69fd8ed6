import nodemailer from 'nodemailer'

export type SmtpSettings = { host: string, port: number, secure: boolean, user: string, password: string, /** Refuse to send over a line that is not encrypted. */ requiresTls: boolean }
export type OutgoingMail = { /** Of the outbox row: the same for each try, so that a receiver can drop a copy. */ id: string, recipient: string, subject: string, html: string, text: string }

/** Why a mail was not handed over. `refused` will be refused again; `delayed` may pass later; `unreachable` concerns every mail. */
export class MailFailure extends Error {
  constructor(readonly kind: 'refused' | 'delayed' | 'unreachable', message: string) {
    super(message)
    this.name = 'MailFailure'
  }
}

export type Mailer = { send: (mail: OutgoingMail) => Promise<void>, close: () => void }

/** The message as nodemailer takes it. The recipient is an object: in a joined string, a comma would make two of one. */
export function buildMessage(mail: OutgoingMail, { from, replyTo }: { from: string, replyTo: string }) {
  const sender = /<([^<>@\s]+@([^<>@\s]+))>$/.exec(from) ?? /^([^<>@\s]+@([^<>@\s]+))$/.exec(from)
  if (!sender) throw new Error('NUXT_MAIL_FROM is no address.')
  return {
    from, to: { name: '', address: mail.recipient }, replyTo: replyTo || sender[1]!, subject: mail.subject, text: mail.text, html: mail.html,
    messageId: `<${mail.id}@${sender[2]!}>`, date: new Date(), headers: { 'Auto-Submitted': 'auto-generated' },
    disableFileAccess: true, disableUrlAccess: true,
  }
}

/** Hands mails to the mail server. */
export function createMailer(smtp: SmtpSettings, addresses: { from: string, replyTo: string }): Mailer {
  const transport = nodemailer.createTransport({
    host: smtp.host, port: smtp.port, secure: smtp.secure, requireTLS: smtp.requiresTls && !smtp.secure, ignoreTLS: !smtp.requiresTls && !smtp.secure,
    ...(smtp.user ? { auth: { user: smtp.user, pass: smtp.password } } : {}),
    connectionTimeout: 5_000, greetingTimeout: 5_000, socketTimeout: 15_000, disableFileAccess: true, disableUrlAccess: true,
  })
  return {
    async send(mail) {
      try {
        await transport.sendMail(buildMessage(mail, addresses))
      }
      catch (error) {
        throw toFailure(error)
      }
    },
    close: () => transport.close(),
  }
}

/** Reads nodemailer's error: only an answer about this recipient or message is for good when it is a 5xx (RFC 5321 section 4.2.1). */
export function toFailure(error: unknown): MailFailure {
  const { code, responseCode, message } = Object(error) as { code?: unknown, responseCode?: unknown, message?: unknown }
  const answer = typeof responseCode === 'number' ? responseCode : undefined
  const words = `${String(code ?? 'no code')} ${answer ?? ''} ${code === 'EENVELOPE' || code === 'EMESSAGE' ? '' : String(message ?? '').slice(0, 120)}`.replace(/\s+/g, ' ').trim()
  const isAboutThisMail = code === 'EENVELOPE' || code === 'EMESSAGE'
  if (isAboutThisMail) return new MailFailure(answer !== undefined && answer >= 500 && answer < 600 ? 'refused' : 'delayed', words)
  return new MailFailure('unreachable', words)
}
