import { assertMinor, currencyRow } from '#shared/money'
import { assemblePrice } from './assemble'
import { PriceError } from './errors'
import type { MarginRule } from './totals'
import { COST_LINE_CODES, type PricedQuantity, type PriceLine, type PriceLineCode } from './types'

/** An estimator's own amount for a line, always with the reason. */
export interface LineOverride {
  lineCode: PriceLineCode
  amountMinor: number
  reason: string
  /** How much, in the estimator's words, in place of the computed basis. */
  basis?: string
}

/** An estimator's own margin, percent of price as decimal text from -100 to 95, with the reason. */
export interface MarginOverride {
  percent: string
  reason: string
}

export interface OverriddenLine extends PriceLine {
  /** What the price book alone gave for this line. */
  computedAmountMinor: number
  /** Null where nobody changed the line itself; overhead, risk and margin follow a changed cost without a reason of their own. */
  overrideReason: string | null
}

export interface OverriddenPrice extends Omit<PricedQuantity, 'lines'> {
  lines: OverriddenLine[]
  computedNetMinor: number
}

const PERCENT_TEXT = /^-?\d{1,3}(?:\.\d{1,4})?$/

function requireReason(reason: string, subject: string): string {
  const text = reason.trim()
  if (text === '') throw new PriceError('reason-missing', 'Say why the computed value is not right here.', subject)
  return text
}

function checkOverride({ lineCode, amountMinor, reason }: LineOverride, priced: PricedQuantity): void {
  if (!priced.lines.some((line) => line.code === lineCode)) {
    throw new PriceError('line-unknown', `This price has no line ${lineCode}.`, lineCode)
  }
  assertMinor(amountMinor)
  if (amountMinor % currencyRow(priced.currency).stepMinor !== 0 || (amountMinor < 0 && lineCode !== 'margin')) {
    throw new PriceError('override-unreadable', 'Give an amount of zero or more that can be paid in this currency.', lineCode)
  }
  requireReason(reason, lineCode)
}

function marginRuleOf(priced: PricedQuantity, lineOverride: LineOverride | undefined, override: MarginOverride | undefined): MarginRule {
  const bookPercent = lineOf(priced, 'margin').rate
  if (lineOverride) return { kind: 'amount', percent: bookPercent, amountMinor: lineOverride.amountMinor }
  if (!override) return { kind: 'percent', percent: bookPercent, minimumOrderMinor: priced.minimumOrderMinor }
  const value = Number(override.percent)
  if (!PERCENT_TEXT.test(override.percent) || value < -100 || value > 95) {
    throw new PriceError('override-unreadable', 'Give the margin as a percentage of the price from -100 to 95.', 'margin')
  }
  requireReason(override.reason, 'margin')
  // An estimator who names a margin means it, also under the smallest order.
  return { kind: 'percent', percent: override.percent, minimumOrderMinor: 0 }
}

function lineOf(priced: PricedQuantity, code: PriceLineCode): PriceLine {
  const line = priced.lines.find((candidate) => candidate.code === code)
  if (!line) throw new PriceError('line-unknown', `This price has no line ${code}.`, code)
  return line
}

/**
 * Lays an estimator's changes over a computed price. Give the price as `priceQuantity` made it, not one already changed.
 * Overhead, risk, margin and tax are worked out again on the changed cost, unless they are themselves set; every line keeps its
 * computed amount. A margin amount and a margin percentage cannot both be given. Throws PriceError and MoneyError.
 */
export function applyOverrides(priced: PricedQuantity, overrides: readonly LineOverride[], marginPercentOverride?: MarginOverride): OverriddenPrice {
  const byCode = new Map<PriceLineCode, LineOverride>()
  for (const override of overrides) {
    checkOverride(override, priced)
    if (byCode.has(override.lineCode)) throw new PriceError('override-unreadable', 'Change a line only once.', override.lineCode)
    byCode.set(override.lineCode, override)
  }
  if (marginPercentOverride && byCode.has('margin')) {
    throw new PriceError('override-unreadable', 'Give the margin as an amount or as a percentage, not both.', 'margin')
  }

  const isCost = (line: PriceLine) => COST_LINE_CODES.some((code) => code === line.code)
  const assembled = assemblePrice({
    costLines: priced.lines.filter(isCost).map((line) => ({ ...line, amountMinor: byCode.get(line.code)?.amountMinor ?? line.amountMinor })),
    quantity: priced.quantity,
    currency: priced.currency,
    overheadPercent: lineOf(priced, 'overhead').rate,
    riskPercent: lineOf(priced, 'risk').rate,
    overheadMinor: byCode.get('overhead')?.amountMinor,
    riskMinor: byCode.get('risk')?.amountMinor,
    margin: marginRuleOf(priced, byCode.get('margin'), marginPercentOverride),
    marginFloorPercent: priced.marginFloorPercent,
    taxPercent: priced.taxPercent,
  })

  const lines = assembled.lines.map((line): OverriddenLine => {
    const override = byCode.get(line.code)
    const marginReason = line.code === 'margin' ? marginPercentOverride?.reason : undefined
    return {
      ...line,
      basis: override?.basis ?? line.basis,
      computedAmountMinor: lineOf(priced, line.code).amountMinor,
      overrideReason: override?.reason.trim() ?? marginReason?.trim() ?? null,
    }
  })
  return { ...priced, ...assembled, lines, computedNetMinor: priced.netMinor }
}
