import { linkOf, renderMail } from '../../emails/render'
import { createMailer } from '../integrations/mailer'
import { workOnMails, type MailDesk } from '../services/mail/work'

let desk: MailDesk | undefined

function useMailDesk(): MailDesk {
  const { smtp, mail, mode, origin, shopTimeZone } = useSettings()
  desk ??= { mailer: createMailer({ ...smtp, requiresTls: mode === 'production' }, mail), render: renderMail, linkOf, origin, timeZone: shopTimeZone }
  return desk
}

/** Sends what stands in the outbox. */
export const outboxWorker = createWorker({ name: 'outbox', everyMs: 1_000, takeWork: isStopping => workOnMails(useDatabase(), useMailDesk(), isStopping) })
