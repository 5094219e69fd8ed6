import { Decimal, roundToMinor } from '#shared/money/decimal'
import type { JobQuantities } from './job-quantities'
import { rateText } from './rates'
import { countText, figureText, rateMoneyText, shortMaterialName } from './words'
import type { RateCode } from './rate-codes'
import type { CostLineCode, FormedEnd, PriceLine, PriceRequest } from './types'

/** A quantity is fixed to these digits before money is made of it, so that anyone can work a line out again from what it shows. */
const KG_DIGITS = 3
const HOUR_DIGITS = 4

interface HourLine {
  code: CostLineCode
  label: string
  hours: number
  rateCode: RateCode
  describe: (hoursText: string) => string
}

function buildHourLine({ code, label, hours, rateCode, describe }: HourLine, { book }: PriceRequest): PriceLine {
  const rate = rateText(book, rateCode)
  const quantity = new Decimal(hours).toFixed(HOUR_DIGITS)
  return {
    code,
    label,
    basis: describe(figureText(quantity, 2, 'h')),
    rateText: `${rateMoneyText(rate, book.currency)} an hour`,
    quantity,
    quantityUnit: 'h',
    rate,
    amountMinor: roundToMinor(new Decimal(quantity).times(rate), book.currency),
  }
}

function buildWireLine(job: JobQuantities, { design, wireProduct, book }: PriceRequest): PriceLine {
  const quantity = new Decimal(job.wireChargedKg).toFixed(KG_DIGITS)
  const used = figureText(String(job.wireUsedKg), 2, 'kg')
  return {
    code: 'wire',
    label: `Wire, ${shortMaterialName(design.material)} ${design.wireDiameterMm.toFixed(2)}`,
    basis: job.isSmallestPurchase
      ? `${figureText(quantity, 2, 'kg')}, smallest purchase; ${used} used`
      : `${used} with scrap and ${countText(job.wireCoils, 'coil end', 'coil ends')}`,
    rateText: `${rateMoneyText(wireProduct.pricePerKg, book.currency)} a kg`,
    quantity,
    quantityUnit: 'kg',
    rate: wireProduct.pricePerKg,
    amountMinor: roundToMinor(new Decimal(quantity).times(wireProduct.pricePerKg), book.currency),
  }
}

function buildCertificateLine({ options, book }: PriceRequest): PriceLine | undefined {
  if (options.certificate === 'none') return undefined
  const rate = rateText(book, `certificate.${options.certificate}`)
  return {
    code: 'certificate',
    label: `Certificate ${options.certificate}`,
    basis: '1 certificate',
    rateText: rateMoneyText(rate, book.currency),
    quantity: '1',
    quantityUnit: 'order',
    rate,
    amountMinor: roundToMinor(new Decimal(rate), book.currency),
  }
}

function buildPackingLine(job: JobQuantities, { book }: PriceRequest): PriceLine {
  const perOrder = rateText(book, 'packing.per-order')
  const rate = rateText(book, 'packing.per-kg')
  const quantity = new Decimal(job.packedKg).toFixed(KG_DIGITS)
  return {
    code: 'packing',
    label: 'Packing and dispatch',
    basis: `1 order, ${figureText(quantity, 2, 'kg')}`,
    rateText: `${rateMoneyText(perOrder, book.currency)} and ${rateMoneyText(rate, book.currency)} a kg`,
    quantity,
    quantityUnit: 'kg',
    rate,
    amountMinor: roundToMinor(new Decimal(quantity).times(rate).plus(perOrder), book.currency),
  }
}

const FORMED: Readonly<Record<FormedEnd, string>> = {
  'full-loop': 'full loops', 'half-loop': 'half loops', 'crossover-loop': 'crossed loops', 'extended-hook': 'extended hooks', 'tangential': 'legs off the coil', 'straight': 'legs along the axis',
}

/** Why coiling takes as long as it does: what is formed at the ends, and an index that slows the feed. */
function coilingWords({ design, book }: PriceRequest): { setUp: string, run: string } {
  const index = design.meanDiameterMm / design.wireDiameterMm
  const isSlowed = index < Number(rateText(book, 'coiling.index-easy')) && Number(rateText(book, 'coiling.index-slowing-percent')) > 0
  const tight = isSlowed ? `, tight at index ${index.toFixed(1)}` : ''
  if (design.formed === null) return { setUp: '', run: tight }
  return { setUp: `, ${FORMED[design.formed]}`, run: ` with 2 ${FORMED[design.formed]} each${tight}` }
}

/** The cost lines of a job in their fixed order; a line that does not apply is left out. Each amount is rounded once. */
export function buildCostLines(job: JobQuantities, request: PriceRequest): PriceLine[] {
  const { design, options, quantity } = request
  const pieces = countText(job.piecesCoiled, 'piece', 'pieces')
  const coiling = coilingWords(request)
  const hourLines: HourLine[] = [
    { code: 'coiling-set-up', label: 'Coiling, set-up', hours: job.coilingSetUpHours, rateCode: 'hourly.coiling', describe: (hours) => `${hours}, tolerance grade ${options.toleranceGrade}${coiling.setUp}` },
    { code: 'coiling-run', label: 'Coiling, run', hours: job.coilingRunHours, rateCode: 'hourly.coiling', describe: (hours) => `${pieces}${coiling.run}, ${hours}` },
  ]
  if (job.stressReliefBatches > 0) {
    hourLines.push({
      code: 'stress-relief',
      label: `Stress relief, ${figureText(String(design.stressReliefTempC), 0, '°C')}`,
      hours: job.stressReliefHours,
      rateCode: 'hourly.stress-relief',
      describe: (hours) => `${countText(job.stressReliefBatches, 'batch', 'batches')}, ${hours}`,
    })
  }
  if (job.grindingRunHours > 0) {
    hourLines.push({
      code: 'end-grinding',
      label: 'End grinding',
      hours: job.grindingSetUpHours + job.grindingRunHours,
      rateCode: 'hourly.end-grinding',
      describe: (hours) => `${pieces}, ${hours} with set-up`,
    })
  }
  hourLines.push({
    code: 'inspection',
    label: job.sampleSize === quantity ? 'Inspection, every spring' : 'Inspection',
    hours: job.firstOffHours + job.measuringHours,
    rateCode: 'hourly.inspection',
    describe: (hours) => `first-off and ${countText(job.sampleSize, 'spring', 'springs')}, ${countText(job.measurementsPerSpring, 'measurement', 'measurements')} each, ${hours}`,
  })

  const certificate = buildCertificateLine(request)
  return [
    buildWireLine(job, request),
    ...hourLines.map((line) => buildHourLine(line, request)),
    ...(certificate ? [certificate] : []),
    buildPackingLine(job, request),
  ]
}

