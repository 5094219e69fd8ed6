import type { Currency } from '#shared/money'
import type { HookForm, LegForm, SpringKind } from '#shared/spring/codes'
import type { RateCode } from './rate-codes'

/** One version of the shop's rates. Values are decimal text: money in major units of `currency`, the rest in the rate's own unit. */
export interface PriceBook {
  number: number
  currency: Currency
  /** ISO date, first day in force. */
  inForceFrom: string
  rates: Record<RateCode, string>
}

export type EndForm = 'closed-ground' | 'closed' | 'open' | 'open-ground'
export type ToleranceGrade = 1 | 2 | 3
/** Hooks and legs, which a coiler forms one after the other. */
export type FormedEnd = HookForm | LegForm
export type CertificateKind = 'none' | '2.1' | '2.2' | '3.1'

/** What pricing must know of a spring. Lengths mm, mass g of one spring, time min, temperature °C. */
export interface PricedDesign {
  kind: SpringKind
  material: string
  wireDiameterMm: number
  meanDiameterMm: number
  activeCoils: number
  /** Coils wound: total coils of compression springs, body coils of the others. */
  totalCoils: number
  freeLengthMm: number
  /** Of compression springs; hooks and legs are never ground. */
  ends: EndForm | null
  /** Form of the two hooks or legs, alike; null where none is formed. */
  formed: FormedEnd | null
  /** Wire in one spring. */
  wireLengthMm: number
  massG: number
  /** Soak from the load reaching temperature. 0 where the design needs no stress relief. */
  stressReliefMinutes: number
  stressReliefTempC: number
}

/** Wire as the shop buys it. Decimal text, in the price book's currency. */
export interface PricedWireProduct {
  pricePerKg: string
  stockKg: string
  smallestPurchaseKg: string
  leadDays: number
  /** A size the shop always keeps. Where absent, wire counts as stocked while any is there. */
  isStockSize?: boolean
}

export interface PriceOptions {
  toleranceGrade: ToleranceGrade
  certificate: CertificateKind
  /** Finish as the customer asked; carried for the gate, no line of its own yet. */
  finish?: string
}

export interface PricedCustomer {
  /** ISO 3166 two-letter code. */
  country: string
  /** A VAT number was given and may be used. */
  vatNumberGiven: boolean
}

export interface PriceRequest {
  design: PricedDesign
  wireProduct: PricedWireProduct
  /** Whole springs, 1 to 1 000 000. */
  quantity: number
  options: PriceOptions
  book: PriceBook
  customer: PricedCustomer
  /** Country of the shop, ISO 3166 two-letter code. */
  homeCountry: string
}

/** Codes of cost lines in the order they are listed. They never change: stored quotes and job costs refer to them. */
export const COST_LINE_CODES = [
  'wire', 'coiling-set-up', 'coiling-run', 'stress-relief', 'end-grinding', 'inspection', 'certificate', 'packing',
] as const
/** Codes of the lines laid on top of cost. */
export const POLICY_LINE_CODES = ['overhead', 'risk', 'margin'] as const

export type CostLineCode = (typeof COST_LINE_CODES)[number]
export type PolicyLineCode = (typeof POLICY_LINE_CODES)[number]
export type PriceLineCode = CostLineCode | PolicyLineCode

export type PriceQuantityUnit = 'kg' | 'h' | 'piece' | 'order' | '%'

/** One traceable line of a price. */
export interface PriceLine {
  code: PriceLineCode
  label: string
  /** How much, in words with numbers. */
  basis: string
  /** The rate, as it is shown. */
  rateText: string
  /** Decimal text in `quantityUnit`; where that is `%`, the amount in major units the percentage is taken of. */
  quantity: string
  quantityUnit: PriceQuantityUnit
  /** Decimal text: money for one unit of `quantityUnit`, or the percentage. */
  rate: string
  amountMinor: number
}

export type OperationKind = 'coiling' | 'stress-relief' | 'end-grinding' | 'inspection' | 'packing'

/** Planned time of each operation in whole minutes; the routing is built from it. */
export type PlannedMinutes = Partial<Record<OperationKind, { setUpMinutes: number, runMinutes: number }>>

/** Why a tax rate applies; the invoice says it in words. */
export type TaxKind = 'domestic' | 'eu-business' | 'export'

/** The price of one quantity. `netMinor` is the sum of `lines`; `grossMinor` is `netMinor + taxMinor`. */
export interface PricedQuantity {
  quantity: number
  currency: Currency
  bookNumber: number
  lines: PriceLine[]
  /** Sum of the cost lines. */
  costMinor: number
  netMinor: number
  /** Decimal text, three decimals in euro. */
  unitPrice: string
  taxKind: TaxKind
  /** Decimal text. */
  taxPercent: string
  taxMinor: number
  grossMinor: number
  /** Margin line as a percentage of net, decimal text with one decimal. */
  marginPercent: string
  /** Decimal text, from the price book. */
  marginFloorPercent: string
  isBelowMarginFloor: boolean
  /** The smallest order before tax, from the price book; the margin line is raised to reach it. */
  minimumOrderMinor: number
  plannedMinutes: PlannedMinutes
  /** Wire the job takes, with scrap and coil ends, decimal text. */
  wirePlannedKg: string
  /** Wire charged: the planned mass, or the smallest purchase where it must be bought. */
  wireChargedKg: string
  sampleSize: number
}
