import { z } from 'zod'
import { pageQuerySchema } from './shared-fields'

export const MAIL_STATES = ['waiting', 'sent', 'skipped', 'dead'] as const
export type MailState = (typeof MAIL_STATES)[number]

export const outboxQuerySchema = pageQuerySchema.extend({ state: z.enum([...MAIL_STATES, 'all']).default('all') })

/** An e-mail as an administrator sees it; the recipient is masked. Moments as ISO text. */
export type OutboxRowView = {
  id: string, kind: string, recipientMasked: string, orderRef: string | null, state: MailState, attempts: number,
  createdAt: string, nextTryAt: string | null, sentAt: string | null, deadAt: string | null, lastError: string | null,
}
export type OutboxView = { rows: OutboxRowView[], nextCursor: string | null, waiting: number, oldestWaitingAt: string | null, dead: number, previews: string[] }

/** A kind of e-mail with its invented example. */
export type MailPreview = { kind: string, subject: string, html: string, text: string }

/** Stripe's events that did not come to an end: dead after many tries, or held back because they do not fit. */
export type StuckEventRow = { id: string, type: string, state: 'waiting' | 'quarantined' | 'dead', attempts: number, receivedAt: string, outcome: string | null }
export type StuckEventsView = { rows: StuckEventRow[] }
