import { Decimal } from '#shared/money/decimal'
import { PriceError } from './errors'
import { priceQuantity } from './price-quantity'
import type { PricedQuantity, PriceRequest } from './types'

/** Most quantities one enquiry may ask for. */
export const LADDER_STEPS = 6

export interface LadderStep extends PricedQuantity {
  /** What the next larger quantity would take; null on the last step. */
  toNextPriceDown: {
    moreSprings: number
    /** What they would cost in all, before tax. */
    moreMinor: number
    /** What each spring more would cost, decimal text as `unitPrice`. */
    eachMoreUnitPrice: string
  } | null
}

/** Prices for up to six quantities, smallest first, each once. Throws PriceError and MoneyError as `priceQuantity`. */
export function priceLadder(quantities: readonly number[], request: Omit<PriceRequest, 'quantity'>): LadderStep[] {
  const steps = [...new Set(quantities)].sort((a, b) => a - b)
  if (steps.length === 0 || steps.length > LADDER_STEPS) {
    throw new PriceError('ladder-too-long', 'Ask for one to six quantities.', 'quantities')
  }
  const priced = steps.map((quantity) => priceQuantity({ ...request, quantity }))
  return priced.map((step, index) => ({ ...step, toNextPriceDown: compareSteps(step, priced[index + 1]) }))
}

function compareSteps(step: PricedQuantity, next: PricedQuantity | undefined): LadderStep['toNextPriceDown'] {
  if (!next) return null
  const moreSprings = next.quantity - step.quantity
  const each = new Decimal(next.unitPrice).times(next.quantity).minus(new Decimal(step.unitPrice).times(step.quantity)).div(moreSprings)
  const digits = (next.unitPrice.split('.')[1] ?? '').length
  return { moreSprings, moreMinor: next.netMinor - step.netMinor, eachMoreUnitPrice: each.toFixed(digits) }
}
