import { assertQuantity } from './price-quantity'
import { calculateJobQuantities } from './job-quantities'
import { readNumberRates } from './rates'
import type { PricedDesign, PriceRequest } from './types'

/** Approximate price of one spring before tax, in major units of the book's currency. */
export type PriceObjective = (design: PricedDesign, wireProduct: PriceRequest['wireProduct']) => number

/**
 * Makes the sizing objective for one quantity: the book is read once, then each call is plain-number arithmetic over the very
 * quantities `priceQuantity` uses. It orders designs only. What it returns is not money: the price that is shown or kept for
 * the design it picks must come from `priceQuantity`. It leaves out rounding, and the smallest order, which would make cheap designs equal.
 */
export function createPriceObjective({ book, quantity, options }: Pick<PriceRequest, 'book' | 'quantity' | 'options'>): PriceObjective {
  assertQuantity(quantity)
  const rates = readNumberRates(book)
  const certificate = options.certificate === 'none' ? 0 : rates[`certificate.${options.certificate}`]
  const fixed = certificate + rates['packing.per-order']
  const onCost = 1 + (rates['policy.overhead-percent'] + rates['policy.risk-percent']) / 100
  const factor = onCost / (1 - rates['policy.margin-percent'] / 100) / quantity

  return (design, wireProduct) => {
    const job = calculateJobQuantities({ design, wireProduct, quantity, options }, rates)
    const cost = fixed
      + job.wireChargedKg * Number(wireProduct.pricePerKg)
      + (job.coilingSetUpHours + job.coilingRunHours) * rates['hourly.coiling']
      + job.stressReliefHours * rates['hourly.stress-relief']
      + (job.grindingSetUpHours + job.grindingRunHours) * rates['hourly.end-grinding']
      + (job.firstOffHours + job.measuringHours) * rates['hourly.inspection']
      + job.packedKg * rates['packing.per-kg']
    return cost * factor
  }
}
