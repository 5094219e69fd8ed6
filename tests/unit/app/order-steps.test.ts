import { describe, expect, it } from 'vitest'
import { ORDER_STATES } from '#shared/schemas/order-states'
import type { OrderStatusView } from '#shared/schemas/quote'
import { orderHeadline, orderSteps } from '~/utils/order-steps'

const events: OrderStatusView['events'] = [
  { at: '2026-12-01T10:00:00Z', to: 'enquiry', why: '' }, { at: '2026-12-01T10:01:00Z', to: 'quoted', why: '' }, { at: '2026-12-02T10:00:00Z', to: 'accepted', why: '' }, { at: '2026-12-02T10:05:00Z', to: 'deposit-paid', why: '' },
]
const day = (at: string) => at.slice(0, 10)

describe('the tint scale of an order', () => {
  it('shows what is done with its day, where it is, and what is to come', () => {
    const steps = orderSteps({ state: 'deposit-paid', events, promisedOn: '2026-12-15' }, day)
    expect(steps.map(step => `${step.name} ${step.status} ${step.note}`.trim())).toEqual([
      'Quoted done 2026-12-01', 'Accepted done 2026-12-02', 'Deposit paid here since 2026-12-02', 'Planned ahead', 'In work ahead', 'Finished ahead', 'Dispatched ahead expected 15 Dec', 'Settled ahead after payment',
    ])
  })

  it('stays at the last step reached when the order ended early', () => {
    const steps = orderSteps({ state: 'withdrawn', events: [...events, { at: '2026-12-03T10:00:00Z', to: 'withdrawn', why: '' }], promisedOn: null }, day)
    expect(steps.filter(step => step.status === 'here').map(step => step.name)).toEqual(['Deposit paid'])
  })

  it('has a heading for every state, and names the operation that runs', () => {
    for (const state of ORDER_STATES) expect(orderHeadline({ state, operations: [], canPay: null })).not.toBe('')
    expect(orderHeadline({ state: 'in-work', operations: [{ name: 'Coiling', state: 'running', finishedAt: null }], canPay: null })).toBe('In work: coiling')
  })
})
