import { sumMinor, type Currency } from '#shared/money'
import { Decimal, roundToMinor } from '#shared/money/decimal'
import { COST_LINE_CODES, type CostLineCode, type OperationKind } from '../pricing'
import { figureText } from '../pricing/words'
import type { JobActuals, RecordedMinutes } from './types'

/** What was recorded for one line. */
export interface ActualLine {
  basis: string
  amountMinor: number
}

type MinuteParts = readonly (keyof RecordedMinutes)[]
const BOTH: MinuteParts = ['setUpMinutes', 'runMinutes']

/** Which recorded minutes belong to which line. */
const MINUTES_OF_LINE: Partial<Record<CostLineCode, { kind: OperationKind, parts: MinuteParts }>> = {
  'coiling-set-up': { kind: 'coiling', parts: ['setUpMinutes'] },
  'coiling-run': { kind: 'coiling', parts: ['runMinutes'] },
  'stress-relief': { kind: 'stress-relief', parts: BOTH },
  'end-grinding': { kind: 'end-grinding', parts: BOTH },
  'inspection': { kind: 'inspection', parts: BOTH },
  'packing': { kind: 'packing', parts: BOTH },
}

/** Words shown where a line has no record. */
export const NOT_RECORDED = 'not recorded'

function isCostLineCode(code: string): code is CostLineCode {
  return COST_LINE_CODES.some((known) => known === code)
}

/** Wire and time recorded for a line, rounded once; undefined where neither was. */
function recordedWork(code: string, actuals: JobActuals, currency: Currency): ActualLine | undefined {
  if (code === 'wire') {
    if (actuals.wireKg === null) return undefined
    return { basis: figureText(String(actuals.wireKg), 2, 'kg'), amountMinor: roundToMinor(new Decimal(actuals.wireKg).times(actuals.wirePricePerKg), currency) }
  }
  const source = isCostLineCode(code) ? MINUTES_OF_LINE[code] : undefined
  const recorded = source && actuals.minutes[source.kind]
  if (!source || !recorded) return undefined
  const known = source.parts.flatMap((part) => recorded[part] ?? [])
  if (known.length === 0) return undefined
  const hours = known.reduce((sum, minutes) => sum.plus(minutes), new Decimal(0)).div(60)
  return { basis: figureText(hours.toFixed(), 2, 'h'), amountMinor: roundToMinor(hours.times(actuals.hourlyRates[source.kind]), currency) }
}

/** All that was recorded for a line, other costs with it; undefined where nothing was. */
export function actualLineOf(code: string, actuals: JobActuals, currency: Currency): ActualLine | undefined {
  const work = recordedWork(code, actuals, currency)
  const others = (actuals.other ?? []).filter((cost) => cost.lineCode === code)
  if (others.length === 0) return work
  const otherMinor = sumMinor(others.map((cost) => cost.amountMinor))
  const otherText = others.length === 1 ? '1 invoice' : `${others.length} invoices`
  return work
    ? { basis: `${work.basis} and ${otherText}`, amountMinor: sumMinor([work.amountMinor, otherMinor]) }
    : { basis: otherText, amountMinor: otherMinor }
}
