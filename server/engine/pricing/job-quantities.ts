import { wireBandOf } from './wire-band'
import { isAqlPercent, samplingPlanFor, type AqlPercent } from './sampling'
import { PriceError } from './errors'
import type { NumberRates } from './rates'
import type { PricedDesign, PricedWireProduct, PriceOptions } from './types'

/**
 * Kilograms, pieces and hours a job takes: physical quantities, so plain numbers. Money is made of them elsewhere, in decimals.
 * Formulae and starting values: common trade practice, no published source, except the sample (ISO 2859-1).
 */
export interface JobQuantities {
  wireUsedKg: number
  wireChargedKg: number
  /** The wire is charged by its smallest purchase. */
  isSmallestPurchase: boolean
  wireCoils: number
  piecesCoiled: number
  coilingSetUpHours: number
  coilingRunHours: number
  stressReliefBatches: number
  stressReliefHours: number
  grindingSetUpHours: number
  grindingRunHours: number
  sampleSize: number
  firstOffHours: number
  measuringHours: number
  packedKg: number
  packingMinutes: number
}

/** Ceiling that forgives the last digits of floating point, so that 80 kg in batches of 80 kg is one batch. */
function wholeUp(value: number): number {
  return Math.ceil(value - 1e-9)
}

/** True where the end faces are ground. */
export function isGround(design: Pick<PricedDesign, 'ends'>): boolean {
  return design.ends === 'closed-ground' || design.ends === 'open-ground'
}

/** Acceptance quality limit of a book. Throws PriceError `rate-unreadable` where the table has no such column. */
export function aqlOf(rates: NumberRates): AqlPercent {
  const aql = rates['inspection.aql']
  if (!isAqlPercent(aql)) throw new PriceError('rate-unreadable', 'The acceptance quality limit must be 0.65, 1.0, 1.5, 2.5, 4.0 or 6.5.', 'inspection.aql')
  return aql
}

function wireQuantities(design: PricedDesign, wire: PricedWireProduct, quantity: number, rates: NumberRates) {
  const kgPerSpring = design.massG / 1000
  const kgPerMetre = design.massG / design.wireLengthMm
  const runningKg = kgPerSpring * quantity * (1 + rates['wire.running-scrap-percent'] / 100)
  const setUpKg = Math.max(rates['wire.setup-scrap-pieces'] * kgPerSpring, rates['wire.setup-scrap-metres'] * kgPerMetre)
  const coilKg = Number(wire.smallestPurchaseKg)
  const wireCoils = coilKg > 0 ? Math.max(1, wholeUp((runningKg + setUpKg) / coilKg)) : 1
  const wireUsedKg = runningKg + setUpKg + wireCoils * rates['wire.coil-end-metres'] * kgPerMetre

  // The unused rest of a purchase is charged, unless the size is one the shop keeps anyway.
  const isStocked = wire.isStockSize ?? Number(wire.stockKg) > 0
  const isSmallestPurchase = !isStocked && coilKg > wireUsedKg
  return { wireUsedKg, wireCoils, isSmallestPurchase, wireChargedKg: isSmallestPurchase ? coilKg : wireUsedKg }
}

function coilingQuantities(design: PricedDesign, quantity: number, options: PriceOptions, rates: NumberRates) {
  const band = wireBandOf(design.wireDiameterMm)
  const feedMinutes = design.wireLengthMm / 1000 / rates[`coiling.feed.${band}`]
  const formingMinutes = rates[`coiling.forming-seconds.${band}`] / 60
  const piecesPerMinute = Math.min(rates[`coiling.cap.${band}`], 1 / (feedMinutes + formingMinutes))
  const piecesCoiled = wholeUp(quantity * (1 + rates['wire.running-scrap-percent'] / 100))
  return {
    piecesCoiled,
    coilingSetUpHours: rates[`coiling.setup-hours.${band}`] * rates[`coiling.setup-factor.grade-${options.toleranceGrade}`],
    coilingRunHours: piecesCoiled / piecesPerMinute / 60 / (rates['coiling.efficiency-percent'] / 100),
  }
}

/** Everything a job of `quantity` springs takes, from the book's numbers. Give a design and wire that were checked. */
export function calculateJobQuantities(
  { design, wireProduct, quantity, options }: { design: PricedDesign, wireProduct: PricedWireProduct, quantity: number, options: PriceOptions },
  rates: NumberRates,
): JobQuantities {
  const coiling = coilingQuantities(design, quantity, options, rates)
  const packedKg = design.massG / 1000 * quantity
  const needsRelief = design.stressReliefMinutes > 0
  const batches = needsRelief ? Math.max(1, wholeUp(coiling.piecesCoiled * design.massG / 1000 / rates['furnace.batch-kg'])) : 0
  const grinds = isGround(design)
  const { sampleSize } = samplingPlanFor(quantity, aqlOf(rates))

  return {
    ...wireQuantities(design, wireProduct, quantity, rates),
    ...coiling,
    stressReliefBatches: batches,
    stressReliefHours: batches * (design.stressReliefMinutes + rates['furnace.handling-minutes']) / 60,
    grindingSetUpHours: grinds ? rates['grinding.setup-hours'] : 0,
    grindingRunHours: grinds ? coiling.piecesCoiled / rates[`grinding.pieces-per-hour.${wireBandOf(design.wireDiameterMm)}`] : 0,
    sampleSize,
    firstOffHours: rates['inspection.first-off-minutes'] / 60,
    measuringHours: sampleSize * rates['inspection.measurements-per-spring'] * rates['inspection.minutes-per-measurement'] / 60,
    packedKg,
    packingMinutes: rates['packing.minutes-per-order'] + rates['packing.minutes-per-kg'] * packedKg,
  }
}
