import type { OrderState } from '#shared/schemas/order-states'

/** What each state is called on a page, and its tempering tint; a state that ended early has none. */
export const ORDER_STATE_WORDS: Readonly<Record<OrderState, { name: string, tint: number | null }>> = {
  'enquiry': { name: 'Enquiry', tint: 1 },
  'quoted': { name: 'Quoted', tint: 2 },
  'accepted': { name: 'Accepted', tint: 3 },
  'deposit-paid': { name: 'Deposit paid', tint: 4 },
  'planned': { name: 'Planned', tint: 5 },
  'in-work': { name: 'In work', tint: 6 },
  'finished': { name: 'Finished', tint: 7 },
  'dispatched': { name: 'Dispatched', tint: 8 },
  'settled': { name: 'Settled', tint: 9 },
  'withdrawn': { name: 'Withdrawn', tint: null },
  'expired': { name: 'Expired', tint: null },
  'cancelled': { name: 'Cancelled', tint: null },
}
