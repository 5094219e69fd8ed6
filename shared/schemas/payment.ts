import { z } from 'zod'

export const PAYMENT_KINDS = ['deposit', 'balance'] as const
export const PAYMENT_STATES = ['opening', 'open', 'processing', 'paid', 'failed', 'expired'] as const
export const paymentKindSchema = z.enum(PAYMENT_KINDS)
export const paymentStateSchema = z.enum(PAYMENT_STATES)
export type PaymentKind = z.infer<typeof paymentKindSchema>
export type PaymentState = z.infer<typeof paymentStateSchema>

export const openPaymentBodySchema = z.strictObject({ kind: paymentKindSchema })
/** Where to pay: Stripe's hosted page. */
export type OpenedPayment = { url: string }
/** The state of an order's payment as the return page shows it. */
export type PaymentStatus = { kind: PaymentKind, state: 'none' | PaymentState, amountMinor: number | null, currency: string | null }
