import type { z } from 'zod'
import { payloadSchema as confirmAddress } from './confirm-address/payload'
import { payloadSchema as depositReceived } from './deposit-received/payload'
import { payloadSchema as enquiryReceived } from './enquiry-received/payload'
import { payloadSchema as enquiryWaits } from './enquiry-waits/payload'
import { payloadSchema as jobDateChanged } from './job-date-changed/payload'
import { payloadSchema as jobDispatched } from './job-dispatched/payload'
import { payloadSchema as jobFinished } from './job-finished/payload'
import { payloadSchema as jobInWork } from './job-in-work/payload'
import { payloadSchema as jobPlanned } from './job-planned/payload'
import { payloadSchema as orderWithdrawn } from './order-withdrawn/payload'
import { payloadSchema as paymentFailed } from './payment-failed/payload'
import { payloadSchema as quoteReady } from './quote-ready/payload'
import { payloadSchema as quoteRevised } from './quote-revised/payload'
import { payloadSchema as signInLink } from './sign-in-link/payload'
import { payloadSchema as staffEnquiryWaits } from './staff-enquiry-waits/payload'

/** Each kind of e-mail with the shape of what it tells. Without templates, so that services and tests need no Vue. */
export const MAIL_PAYLOADS = {
  'enquiry-received': enquiryReceived,
  'enquiry-waits': enquiryWaits,
  'staff-enquiry-waits': staffEnquiryWaits,
  'quote-ready': quoteReady,
  'quote-revised': quoteRevised,
  'confirm-address': confirmAddress,
  'sign-in-link': signInLink,
  'deposit-received': depositReceived,
  'payment-failed': paymentFailed,
  'job-planned': jobPlanned,
  'job-date-changed': jobDateChanged,
  'job-in-work': jobInWork,
  'job-finished': jobFinished,
  'job-dispatched': jobDispatched,
  'order-withdrawn': orderWithdrawn,
} as const

export type MailKind = keyof typeof MAIL_PAYLOADS
export type MailInput<K extends MailKind> = z.input<(typeof MAIL_PAYLOADS)[K]>
export type MailPayload<K extends MailKind> = z.output<(typeof MAIL_PAYLOADS)[K]>

export const MAIL_KINDS = Object.keys(MAIL_PAYLOADS) as MailKind[]
/** True where the text names a kind of e-mail. */
export const isMailKind = (text: string): text is MailKind => Object.hasOwn(MAIL_PAYLOADS, text)
