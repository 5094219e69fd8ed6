import { minorToText, sumMinor, type Currency } from '#shared/money'
import { addTax, buildShareLine, isBelowFloor, marginPercentOf, priceBeforeTax, type MarginRule } from './totals'
import { percentText } from './words'
import type { PriceLine } from './types'

export interface AssembleInput {
  costLines: PriceLine[]
  quantity: number
  currency: Currency
  overheadPercent: string
  riskPercent: string
  /** Amounts an estimator set for these two lines. */
  overheadMinor?: number
  riskMinor?: number
  margin: MarginRule
  marginFloorPercent: string
  taxPercent: string
}

/** Lays overhead, risk and margin on the cost lines and sums up. The lines add up to `netMinor` exactly. */
export function assemblePrice(input: AssembleInput) {
  const { costLines, quantity, currency, margin } = input
  const costMinor = sumMinor(costLines.map((line) => line.amountMinor))
  const overhead = buildShareLine('overhead', 'Overhead', costMinor, input.overheadPercent, currency)
  const risk = buildShareLine('risk', 'Risk', costMinor, input.riskPercent, currency)
  if (input.overheadMinor !== undefined) overhead.amountMinor = input.overheadMinor
  if (input.riskMinor !== undefined) risk.amountMinor = input.riskMinor

  const baseMinor = sumMinor([costMinor, overhead.amountMinor, risk.amountMinor])
  const { netMinor, unitPrice, isRaisedToMinimum } = priceBeforeTax({ baseMinor, quantity, currency, rule: margin })
  const marginMinor = netMinor - baseMinor
  const marginLine: PriceLine = {
    code: 'margin',
    label: 'Margin',
    basis: isRaisedToMinimum
      ? 'of price; raised to the smallest order'
      : `of price; the floor is ${percentText(input.marginFloorPercent)}`,
    rateText: percentText(margin.percent),
    quantity: minorToText(netMinor, currency),
    quantityUnit: '%',
    rate: margin.percent,
    amountMinor: marginMinor,
  }
  return {
    lines: [...costLines, overhead, risk, marginLine],
    costMinor,
    netMinor,
    unitPrice,
    marginPercent: marginPercentOf(marginMinor, netMinor),
    marginFloorPercent: input.marginFloorPercent,
    isBelowMarginFloor: isBelowFloor({ marginMinor, netMinor, floorPercent: input.marginFloorPercent, currency }),
    taxPercent: input.taxPercent,
    ...addTax(netMinor, input.taxPercent, currency),
  }
}
