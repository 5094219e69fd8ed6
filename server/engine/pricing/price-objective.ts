import { assertQuantity } from './price-quantity'
import { calculateJobQuantities, readJobRates, type QuantifiedDesign } from './job-quantities'
import { readNumberRates } from './rates'
import type { PricedWireProduct, PriceRequest } from './types'

/** Approximate price of one spring before tax, in major units of the book's currency. */
export type PriceObjective = (design: QuantifiedDesign, wireProduct: PricedWireProduct) => number

/**
 * Makes the sizing objective for one quantity: the book is read once, then each call is plain-number arithmetic over the very
 * quantities `priceQuantity` uses. It orders designs only. What it returns is not money: the price that is shown or kept for
 * the design it picks must come from `priceQuantity`. It leaves out rounding, and the smallest order, which would make cheap designs equal.
 */
export function createPriceObjective({ book, quantity, options }: Pick<PriceRequest, 'book' | 'quantity' | 'options'>): PriceObjective {
  assertQuantity(quantity)
  const rates = readNumberRates(book)
  const jobRates = readJobRates(quantity, options, rates)
  const coilingHour = rates['hourly.coiling']
  const ovenHour = rates['hourly.stress-relief']
  const grindingHour = rates['hourly.end-grinding']
  const inspectionHour = rates['hourly.inspection']
  const packingKg = rates['packing.per-kg']
  const certificate = options.certificate === 'none' ? 0 : rates[`certificate.${options.certificate}`]
  const fixed = certificate + rates['packing.per-order']
  const onCost = 1 + (rates['policy.overhead-percent'] + rates['policy.risk-percent']) / 100
  const factor = onCost / (1 - rates['policy.margin-percent'] / 100) / quantity

  return (design, wireProduct) => {
    const job = calculateJobQuantities(design, wireProduct, jobRates)
    const cost = fixed
      + job.wireChargedKg * Number(wireProduct.pricePerKg)
      + (job.coilingSetUpHours + job.coilingRunHours) * coilingHour
      + job.stressReliefHours * ovenHour
      + (job.grindingSetUpHours + job.grindingRunHours) * grindingHour
      + (job.firstOffHours + job.measuringHours) * inspectionHour
      + job.packedKg * packingKg
    return cost * factor
  }
}
