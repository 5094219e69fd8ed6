import confirmAddress from './confirm-address/message'
import depositReceived from './deposit-received/message'
import enquiryReceived from './enquiry-received/message'
import enquiryWaits from './enquiry-waits/message'
import jobDateChanged from './job-date-changed/message'
import jobDispatched from './job-dispatched/message'
import jobFinished from './job-finished/message'
import jobInWork from './job-in-work/message'
import jobPlanned from './job-planned/message'
import orderWithdrawn from './order-withdrawn/message'
import paymentFailed from './payment-failed/message'
import quoteReady from './quote-ready/message'
import quoteRevised from './quote-revised/message'
import signInLink from './sign-in-link/message'
import staffEnquiryWaits from './staff-enquiry-waits/message'
import type { MailMessage } from './parts/message'
import type { MailKind, MailPayload } from './payloads'

/** Every kind of e-mail with its words. A kind without them does not compile. */
export const MAIL_MESSAGES: { readonly [K in MailKind]: MailMessage<MailPayload<K>> } = {
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
}
