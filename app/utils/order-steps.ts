import type { OrderStatusView } from '#shared/schemas/quote'
import type { OrderState } from '#shared/schemas/order-states'
import { formatDay } from './day-words'
import { ORDER_STATE_WORDS } from './order-state-words'

const WAY: readonly OrderState[] = ['quoted', 'accepted', 'deposit-paid', 'planned', 'in-work', 'finished', 'dispatched', 'settled']

/** The way of an order as steps of the tint scale, with the day each was reached. `shortDay` writes the day of an instant. */
export function orderSteps(order: Pick<OrderStatusView, 'state' | 'events' | 'promisedOn'>, shortDay: (at: string) => string) {
  const reached = (state: OrderState) => order.events.findLast(event => event.to === state)?.at
  // An order that ended early stays at the last step that it had reached.
  const here = WAY.includes(order.state) ? WAY.indexOf(order.state) : WAY.findLastIndex(state => reached(state) !== undefined)
  return WAY.map((state, at) => {
    const { name, tint } = ORDER_STATE_WORDS[state]
    const when = reached(state)
    const status = at < here ? 'done' as const : at === here ? 'here' as const : 'ahead' as const
    const expected = state === 'dispatched' && order.promisedOn ? `expected ${formatDay(order.promisedOn, { hasYear: false })}` : state === 'settled' ? 'after payment' : ''
    return { name, tint: tint ?? 9, status, note: status === 'ahead' ? expected : when ? `${status === 'here' ? 'since ' : ''}${shortDay(when)}` : '' }
  })
}

/** The state of an order as a heading that says what goes on. */
export function orderHeadline(order: Pick<OrderStatusView, 'state' | 'operations' | 'canPay'>): string {
  const running = order.operations.find(operation => operation.state === 'running' || operation.state === 'setting-up')
  const words: Record<OrderState, string> = {
    'enquiry': 'A person is working on your quote', 'quoted': 'Quoted: waiting for your answer', 'accepted': 'Accepted: the deposit is next', 'deposit-paid': 'Deposit paid: the job is being planned',
    'planned': 'Planned: its place in the works is set', 'in-work': running ? `In work: ${running.name.toLowerCase()}` : 'In work', 'finished': order.canPay ? 'Finished: the balance is due' : 'Finished',
    'dispatched': 'Dispatched: on its way to you', 'settled': 'Settled: everything is done', 'withdrawn': 'Withdrawn', 'expired': 'Expired: the quote is no longer open', 'cancelled': 'Cancelled',
  }
  return words[order.state]
}
