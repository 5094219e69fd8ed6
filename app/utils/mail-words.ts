import type { MailState } from '#shared/schemas/mail'

const KINDS: Readonly<Record<string, string>> = {
  'enquiry-received': 'Enquiry received', 'enquiry-waits': 'Enquiry waits for a person', 'staff-enquiry-waits': 'To estimators: an enquiry waits', 'quote-ready': 'Quote ready', 'quote-revised': 'Quote revised',
  'confirm-address': 'Confirm the address', 'sign-in-link': 'Sign-in link', 'deposit-received': 'Deposit received', 'payment-failed': 'Payment failed', 'job-planned': 'Job planned, with its date',
  'job-date-changed': 'Date changed', 'job-in-work': 'Job in work', 'job-finished': 'Job finished, balance due', 'job-dispatched': 'Dispatched', 'order-withdrawn': 'Order withdrawn',
}

/** The name of a kind of e-mail. One that is not known keeps its code. */
export const mailKindWords = (kind: string): string => KINDS[kind] ?? kind.replaceAll('-', ' ')

/** What became of an e-mail, and how the list of those is called. */
export const MAIL_STATE_WORDS: Readonly<Record<MailState, { one: string, many: string }>> = {
  waiting: { one: 'waits', many: 'Waiting' }, sent: { one: 'sent', many: 'Sent' }, skipped: { one: 'not wanted any more', many: 'Not wanted' }, dead: { one: 'given up', many: 'Given up' },
}
