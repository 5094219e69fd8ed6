import { wireBandOf, type WireBand } from './wire-band'
import { isAqlPercent, samplingPlanFor, type AqlPercent } from './sampling'
import type { SpringKind } from '#shared/spring/codes'
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

/** The rates of one order by plain name, read once: the sizing asks for the quantities of thousands of springs. */
export interface JobRates {
  quantity: number
  sampleSize: number
  piecesCoiled: number
  runningFactor: number
  setUpScrapPieces: number
  setUpScrapMetres: number
  coilEndMetres: number
  furnaceBatchKg: number
  furnaceHandlingMinutes: number
  grindingSetUpHours: number
  firstOffHours: number
  measuringHours: number
  packingMinutesPerOrder: number
  packingMinutesPerKg: number
  byBand: Readonly<Record<WireBand, BandRates>>
  /** How a kind differs from plain compression springs. */
  byKind: Readonly<Record<SpringKind, KindRates>>
}

interface KindRates {
  setUpFactor: number
  /** Share of the pace of plain springs: hooks and legs are formed one after the other. */
  paceFactor: number
}

interface BandRates {
  setUpHours: number
  feedMPerMinute: number
  formingMinutes: number
  capPerMinute: number
  /** Part of the scheduled hour that makes springs, 0 to 1. */
  efficiency: number
  groundPerHour: number
}

/** Reads what an order of `quantity` springs needs of a book. Throws PriceError where the sample cannot be found. */
export function readJobRates(quantity: number, options: PriceOptions, rates: NumberRates): JobRates {
  const { sampleSize } = samplingPlanFor(quantity, aqlOf(rates))
  const runningFactor = 1 + rates['wire.running-scrap-percent'] / 100
  const bandRates = (band: WireBand): BandRates => ({
    setUpHours: rates[`coiling.setup-hours.${band}`] * rates[`coiling.setup-factor.grade-${options.toleranceGrade}`],
    feedMPerMinute: rates[`coiling.feed.${band}`],
    formingMinutes: rates[`coiling.forming-seconds.${band}`] / 60,
    capPerMinute: rates[`coiling.cap.${band}`],
    efficiency: rates['coiling.efficiency-percent'] / 100,
    groundPerHour: rates[`grinding.pieces-per-hour.${band}`],
  })
  const kindRates = (kind: 'extension' | 'torsion'): KindRates => ({ setUpFactor: rates[`coiling.setup-factor.${kind}`], paceFactor: rates[`coiling.pace-factor.${kind}`] })
  return {
    quantity,
    sampleSize,
    runningFactor,
    piecesCoiled: wholeUp(quantity * runningFactor),
    setUpScrapPieces: rates['wire.setup-scrap-pieces'],
    setUpScrapMetres: rates['wire.setup-scrap-metres'],
    coilEndMetres: rates['wire.coil-end-metres'],
    furnaceBatchKg: rates['furnace.batch-kg'],
    furnaceHandlingMinutes: rates['furnace.handling-minutes'],
    grindingSetUpHours: rates['grinding.setup-hours'],
    firstOffHours: rates['inspection.first-off-minutes'] / 60,
    measuringHours: sampleSize * rates['inspection.measurements-per-spring'] * rates['inspection.minutes-per-measurement'] / 60,
    packingMinutesPerOrder: rates['packing.minutes-per-order'],
    packingMinutesPerKg: rates['packing.minutes-per-kg'],
    byBand: { fine: bandRates('fine'), light: bandRates('light'), medium: bandRates('medium'), heavy: bandRates('heavy') },
    byKind: { compression: { setUpFactor: 1, paceFactor: 1 }, extension: kindRates('extension'), torsion: kindRates('torsion') },
  }
}

/** The part of a design that decides how much a job takes. */
export type QuantifiedDesign = Pick<PricedDesign, 'kind' | 'wireDiameterMm' | 'wireLengthMm' | 'massG' | 'ends' | 'stressReliefMinutes'>

/**
 * Everything the order takes for one design and wire. Give a design and wire that were checked. For one kind and wire every
 * quantity stays or grows with the length of wire in the spring.
 */
export function calculateJobQuantities(design: QuantifiedDesign, wire: PricedWireProduct, job: JobRates): JobQuantities {
  const band = job.byBand[wireBandOf(design.wireDiameterMm)]
  const kind = job.byKind[design.kind]
  const kgPerSpring = design.massG / 1000
  const kgPerMetre = design.massG / design.wireLengthMm

  const runningKg = kgPerSpring * job.quantity * job.runningFactor
  const setUpKg = Math.max(job.setUpScrapPieces * kgPerSpring, job.setUpScrapMetres * kgPerMetre)
  const coilKg = Number(wire.smallestPurchaseKg)
  const wireCoils = coilKg > 0 ? Math.max(1, wholeUp((runningKg + setUpKg) / coilKg)) : 1
  const wireUsedKg = runningKg + setUpKg + wireCoils * job.coilEndMetres * kgPerMetre
  // The unused rest of a purchase is charged, unless the size is one the shop keeps anyway.
  const isStocked = wire.isStockSize ?? Number(wire.stockKg) > 0
  const isSmallestPurchase = !isStocked && coilKg > wireUsedKg

  const feedMinutes = design.wireLengthMm / 1000 / band.feedMPerMinute
  const piecesPerMinute = Math.min(band.capPerMinute, 1 / (feedMinutes + band.formingMinutes)) * kind.paceFactor
  const batches = design.stressReliefMinutes > 0 ? Math.max(1, wholeUp(job.piecesCoiled * kgPerSpring / job.furnaceBatchKg)) : 0
  const grinds = isGround(design)
  const packedKg = kgPerSpring * job.quantity

  return {
    wireUsedKg,
    wireCoils,
    isSmallestPurchase,
    wireChargedKg: isSmallestPurchase ? coilKg : wireUsedKg,
    piecesCoiled: job.piecesCoiled,
    coilingSetUpHours: band.setUpHours * kind.setUpFactor,
    coilingRunHours: job.piecesCoiled / piecesPerMinute / 60 / band.efficiency,
    stressReliefBatches: batches,
    stressReliefHours: batches * (design.stressReliefMinutes + job.furnaceHandlingMinutes) / 60,
    grindingSetUpHours: grinds ? job.grindingSetUpHours : 0,
    grindingRunHours: grinds ? job.piecesCoiled / band.groundPerHour : 0,
    sampleSize: job.sampleSize,
    firstOffHours: job.firstOffHours,
    measuringHours: job.measuringHours,
    packedKg,
    packingMinutes: job.packingMinutesPerOrder + job.packingMinutesPerKg * packedKg,
  }
}
