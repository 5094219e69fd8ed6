import { Decimal, roundToMinor } from '#shared/money/decimal'
import { assemblePrice } from './assemble'
import { buildCostLines } from './cost-lines'
import { PriceError } from './errors'
import { calculateJobQuantities, readJobRates, type JobQuantities } from './job-quantities'
import { rateText, readNumberRates } from './rates'
import { resolveTax } from './tax'
import type { PlannedMinutes, PricedDesign, PricedQuantity, PricedWireProduct, PriceRequest } from './types'

/** Most springs one order line may have. */
export const LARGEST_QUANTITY = 1_000_000

const POSITIVE_FIELDS = ['wireDiameterMm', 'meanDiameterMm', 'activeCoils', 'totalCoils', 'freeLengthMm', 'wireLengthMm', 'massG'] as const
const DECIMAL_TEXT = /^\d{1,12}(?:\.\d{1,12})?$/

/** Throws PriceError `quantity-out-of-range`. */
export function assertQuantity(quantity: number): void {
  if (!Number.isSafeInteger(quantity) || quantity < 1 || quantity > LARGEST_QUANTITY) {
    throw new PriceError('quantity-out-of-range', 'Ask for a whole number of springs from 1 to 1 000 000.', 'quantity')
  }
}

/** Throws PriceError `design-unreadable` or `wire-product-unreadable`, naming the field. */
export function assertPriceable(design: PricedDesign, wireProduct: PricedWireProduct): void {
  for (const field of POSITIVE_FIELDS) {
    if (!Number.isFinite(design[field]) || design[field] <= 0) {
      throw new PriceError('design-unreadable', `A price needs ${field} above zero.`, field)
    }
  }
  if (design.kind === 'compression' ? design.formed !== null : design.ends !== null) {
    throw new PriceError('design-unreadable', 'Only compression springs have ends to grind; only the others have hooks or legs.', 'ends')
  }
  if (!Number.isFinite(design.stressReliefMinutes) || design.stressReliefMinutes < 0) {
    throw new PriceError('design-unreadable', 'A price needs the time of stress relief, zero or more.', 'stressReliefMinutes')
  }
  for (const field of ['pricePerKg', 'stockKg', 'smallestPurchaseKg'] as const) {
    if (!DECIMAL_TEXT.test(wireProduct[field])) {
      throw new PriceError('wire-product-unreadable', `A price needs ${field} of the wire as a number, zero or more.`, field)
    }
  }
}

/** Whole minutes of each operation, rounded up: what the plan keeps free. */
export function planMinutes(job: JobQuantities): PlannedMinutes {
  const minutes = (hours: number) => Math.ceil(hours * 60 - 1e-9)
  return {
    'coiling': { setUpMinutes: minutes(job.coilingSetUpHours), runMinutes: minutes(job.coilingRunHours) },
    ...(job.stressReliefBatches > 0 && { 'stress-relief': { setUpMinutes: 0, runMinutes: minutes(job.stressReliefHours) } }),
    ...(job.grindingRunHours > 0 && { 'end-grinding': { setUpMinutes: minutes(job.grindingSetUpHours), runMinutes: minutes(job.grindingRunHours) } }),
    'inspection': { setUpMinutes: minutes(job.firstOffHours), runMinutes: minutes(job.measuringHours) },
    'packing': { setUpMinutes: 0, runMinutes: Math.ceil(job.packingMinutes - 1e-9) },
  }
}

/**
 * The price of one quantity, line by line, in the price book's currency. Amounts are integers of minor units, each line rounded
 * half up once; the lines add up to `netMinor`. Throws PriceError for input that cannot be priced and MoneyError where the
 * total is more than one card payment can carry.
 */
export function priceQuantity(request: PriceRequest): PricedQuantity {
  const { book, design, wireProduct, quantity } = request
  assertQuantity(quantity)
  assertPriceable(design, wireProduct)
  const job = calculateJobQuantities(design, wireProduct, readJobRates(quantity, request.options, readNumberRates(book)))
  const tax = resolveTax(request)
  const minimumOrderMinor = roundToMinor(new Decimal(rateText(book, 'policy.minimum-order')), book.currency)

  const assembled = assemblePrice({
    costLines: buildCostLines(job, request),
    quantity,
    currency: book.currency,
    overheadPercent: rateText(book, 'policy.overhead-percent'),
    riskPercent: rateText(book, 'policy.risk-percent'),
    margin: { kind: 'percent', percent: rateText(book, 'policy.margin-percent'), minimumOrderMinor },
    marginFloorPercent: rateText(book, 'policy.margin-floor-percent'),
    taxPercent: tax.percent,
  })
  return {
    ...assembled,
    quantity,
    currency: book.currency,
    bookNumber: book.number,
    taxKind: tax.kind,
    minimumOrderMinor,
    plannedMinutes: planMinutes(job),
    wirePlannedKg: new Decimal(job.wireUsedKg).toFixed(3),
    wireChargedKg: new Decimal(job.wireChargedKg).toFixed(3),
    sampleSize: job.sampleSize,
  }
}
