import { wireBandOf, type WireBand } from './wire-band'
import { isAqlPercent, samplingPlanFor, type AqlPercent } from './sampling'
import { HOOK_FORMS, LEG_FORMS, type SpringKind } from '#shared/spring/codes'
import { PriceError } from './errors'
import type { NumberRates } from './rates'
import type { FormedEnd, PricedDesign, PricedWireProduct, PriceOptions } from './types'

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
  measurementsPerSpring: number
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

/** Units of index by which a spring is tighter than what coils at full feed; nought where it is not. */
export function tightness({ meanDiameterMm, wireDiameterMm }: Pick<PricedDesign, 'meanDiameterMm' | 'wireDiameterMm'>, { indexEasy }: Pick<JobRates, 'indexEasy'>): number {
  return Math.max(0, indexEasy - meanDiameterMm / wireDiameterMm)
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
  hoursPerMeasurement: number
  packingMinutesPerOrder: number
  packingMinutesPerKg: number
  /** Tighter springs are fed slower, by this share for each unit of index. */
  indexEasy: number
  slowingShare: number
  byBand: Readonly<Record<WireBand, BandRates>>
  byKind: Readonly<Record<SpringKind, KindRates>>
  byFormed: Readonly<Record<FormedEnd, FormedRates>>
}

interface KindRates {
  setUpFactor: number
  /** What is measured differs: a spring with hooks also by its hooks and its initial tension, one with legs by its free angle. */
  measurementsPerSpring: number
}

interface FormedRates {
  setUpFactor: number
  /** Time of one such end against the band's time of one hook or leg. */
  endFactor: number
}

interface BandRates {
  setUpHours: number
  feedMPerMinute: number
  formingMinutes: number
  /** One hook or leg. */
  endMinutes: number
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
    endMinutes: rates[`coiling.end-seconds.${band}`] / 60,
    capPerMinute: rates[`coiling.cap.${band}`],
    efficiency: rates['coiling.efficiency-percent'] / 100,
    groundPerHour: rates[`grinding.pieces-per-hour.${band}`],
  })
  const kindRates = (kind: 'extension' | 'torsion'): KindRates =>
    ({ setUpFactor: rates[`coiling.setup-factor.${kind}`], measurementsPerSpring: rates[`inspection.measurements-per-spring.${kind}`] })
  const formedRates = (form: FormedEnd): FormedRates => ({ setUpFactor: rates[`coiling.setup-factor.${form}`], endFactor: rates[`coiling.end-factor.${form}`] })
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
    hoursPerMeasurement: rates['inspection.minutes-per-measurement'] / 60,
    packingMinutesPerOrder: rates['packing.minutes-per-order'],
    packingMinutesPerKg: rates['packing.minutes-per-kg'],
    indexEasy: rates['coiling.index-easy'],
    slowingShare: rates['coiling.index-slowing-percent'] / 100,
    byBand: { fine: bandRates('fine'), light: bandRates('light'), medium: bandRates('medium'), heavy: bandRates('heavy') },
    byKind: {
      compression: { setUpFactor: 1, measurementsPerSpring: rates['inspection.measurements-per-spring'] }, extension: kindRates('extension'), torsion: kindRates('torsion'),
    },
    byFormed: Object.fromEntries([...HOOK_FORMS, ...LEG_FORMS].map(form => [form, formedRates(form)])) as Record<FormedEnd, FormedRates>,
  }
}

/** The part of a design that decides how much a job takes. */
export type QuantifiedDesign = Pick<PricedDesign, 'kind' | 'wireDiameterMm' | 'meanDiameterMm' | 'wireLengthMm' | 'massG' | 'ends' | 'formed' | 'stressReliefMinutes'>

/** Nothing is formed at the ends. */
const NOT_FORMED: FormedRates = { setUpFactor: 1, endFactor: 0 }

/**
 * Everything the order takes for one design and wire. Give a design and wire that were checked. For one kind, form of ends and
 * wire every quantity stays or grows with the length of wire in the spring, and stays or falls with the index: sizing by
 * price leaves wires out by this.
 */
export function calculateJobQuantities(design: QuantifiedDesign, wire: PricedWireProduct, job: JobRates): JobQuantities {
  const band = job.byBand[wireBandOf(design.wireDiameterMm)]
  const kind = job.byKind[design.kind]
  const formed = design.formed === null ? NOT_FORMED : job.byFormed[design.formed]
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

  const feedMinutes = design.wireLengthMm / 1000 / band.feedMPerMinute * (1 + job.slowingShare * tightness(design, job))
  const endsMinutes = 2 * formed.endFactor * band.endMinutes
  const piecesPerMinute = Math.min(band.capPerMinute, 1 / (feedMinutes + band.formingMinutes + endsMinutes))
  const batches = design.stressReliefMinutes > 0 ? Math.max(1, wholeUp(job.piecesCoiled * kgPerSpring / job.furnaceBatchKg)) : 0
  const grinds = isGround(design)
  const packedKg = kgPerSpring * job.quantity

  return {
    wireUsedKg,
    wireCoils,
    isSmallestPurchase,
    wireChargedKg: isSmallestPurchase ? coilKg : wireUsedKg,
    piecesCoiled: job.piecesCoiled,
    coilingSetUpHours: band.setUpHours * kind.setUpFactor * formed.setUpFactor,
    coilingRunHours: job.piecesCoiled / piecesPerMinute / 60 / band.efficiency,
    stressReliefBatches: batches,
    stressReliefHours: batches * (design.stressReliefMinutes + job.furnaceHandlingMinutes) / 60,
    grindingSetUpHours: grinds ? job.grindingSetUpHours : 0,
    grindingRunHours: grinds ? job.piecesCoiled / band.groundPerHour : 0,
    sampleSize: job.sampleSize,
    measurementsPerSpring: kind.measurementsPerSpring,
    firstOffHours: job.firstOffHours,
    measuringHours: job.sampleSize * kind.measurementsPerSpring * job.hoursPerMeasurement,
    packedKg,
    packingMinutes: job.packingMinutesPerOrder + job.packingMinutesPerKg * packedKg,
  }
}
