import { sql } from 'drizzle-orm'
import { emailSchema } from '#shared/schemas/shared-fields'
import { MAIL_PAYLOADS, type MailInput, type MailKind } from '../../../emails/payloads'
import type { Queryable } from '../../database/client'
import { outbox } from '../../database/schema'

export type NewMail<K extends MailKind> = {
  kind: K
  /** The thing the mail is about: with kind, recipient and step it makes the mail unique. */
  objectId: string
  /** One address. */
  recipient: string
  /** Tells apart several mails of one kind about one thing, such as the new date of a date-changed mail. */
  step?: string
  /** The order it belongs to. Needed for confirm-address, whose link opens that order. */
  orderId?: string
  payload: MailInput<K>
}

/**
 * Writes an e-mail to the outbox in the caller's transaction: rolled back, nothing is sent; repeated, it is sent once.
 * @returns true when this call wrote it, false when it was there already
 * @throws ZodError when the payload or the recipient is not what the kind says: a defect of the caller
 */
export async function enqueueMail<K extends MailKind>(tx: Queryable, mail: NewMail<K>): Promise<boolean> {
  const payload: unknown = MAIL_PAYLOADS[mail.kind].parse(mail.payload)
  const rows = await tx.insert(outbox).values({
    kind: mail.kind, objectId: mail.objectId, recipient: emailSchema.parse(mail.recipient), step: mail.step ?? '', orderId: mail.orderId, payload,
    // Of two mails in one transaction the first written is the first sent; now() would be the same for both.
    createdAt: sql`clock_timestamp()`,
  }).onConflictDoNothing().returning({ id: outbox.id })
  return rows.length > 0
}
