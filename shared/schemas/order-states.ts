import { z } from 'zod'

/** The states of an order, in the order in which it moves; the last three end it early. */
export const ORDER_STATES = [
  'enquiry', 'quoted', 'accepted', 'deposit-paid', 'planned', 'in-work', 'finished', 'dispatched', 'settled',
  'withdrawn', 'expired', 'cancelled',
] as const
export const orderStateSchema = z.enum(ORDER_STATES)
export type OrderState = z.infer<typeof orderStateSchema>

/** What an order may become next. The database refuses every other move. */
export const ORDER_MOVES: Readonly<Record<OrderState, readonly OrderState[]>> = {
  'enquiry': ['quoted', 'withdrawn'],
  'quoted': ['accepted', 'enquiry', 'withdrawn', 'expired'],
  'accepted': ['deposit-paid', 'quoted', 'withdrawn', 'expired', 'cancelled'],
  'deposit-paid': ['planned', 'cancelled'],
  'planned': ['in-work', 'deposit-paid', 'cancelled'],
  'in-work': ['finished', 'cancelled'],
  'finished': ['dispatched'],
  'dispatched': ['settled'],
  'settled': [],
  'withdrawn': [],
  'expired': ['quoted'],
  'cancelled': [],
}

export const QUOTE_STATES = ['draft', 'sent', 'superseded'] as const
