import type { CentreKind } from '../../../shared/schemas/shop'
import type { MaterialCode } from '../../../shared/spring/codes'

type DemoCentre = { code: string, name: string, kind: CentreKind, wireFromMm: number | null, wireToMm: number | null, shiftStartMinute: number, shiftEndMinute: number }

const EARLY = { shiftStartMinute: 6 * 60, shiftEndMinute: 14 * 60 }
const TWO_SHIFTS = { shiftStartMinute: 6 * 60, shiftEndMinute: 22 * 60 }

/** Invented machines of the demo shop. Minutes of the day in the shop's own zone. */
export const DEMO_CENTRES: readonly DemoCentre[] = [
  { code: 'C1', name: 'Coiler', kind: 'coiling', wireFromMm: 0.2, wireToMm: 1.2, ...EARLY },
  { code: 'C2', name: 'Coiler', kind: 'coiling', wireFromMm: 1, wireToMm: 3.5, ...TWO_SHIFTS },
  { code: 'C4', name: 'Coiler', kind: 'coiling', wireFromMm: 3, wireToMm: 8, ...EARLY },
  { code: 'C5', name: 'Heavy coiler', kind: 'coiling', wireFromMm: 7, wireToMm: 16, ...EARLY },
  { code: 'F1', name: 'Oven', kind: 'stress-relief', wireFromMm: null, wireToMm: null, ...TWO_SHIFTS },
  { code: 'G1', name: 'Grinder', kind: 'end-grinding', wireFromMm: null, wireToMm: null, ...EARLY },
  { code: 'I1', name: 'Measuring', kind: 'inspection', wireFromMm: null, wireToMm: null, ...EARLY },
  { code: 'P1', name: 'Packing', kind: 'packing', wireFromMm: null, wireToMm: null, ...EARLY },
]

/** Days on which the demo shop is closed. */
export const DEMO_HOLIDAYS = [
  { day: '2026-12-25', name: 'Christmas Day' }, { day: '2026-12-26', name: 'St Stephen’s Day' }, { day: '2027-01-01', name: 'New Year’s Day' },
  { day: '2027-03-17', name: 'St Patrick’s Day' }, { day: '2027-03-29', name: 'Easter Monday' }, { day: '2027-05-03', name: 'May Day' },
] as const

/** Invented price of a kilogram by material at 2 mm; thinner wire costs more to draw, so the price rises as the diameter falls. */
export const DEMO_WIRE_PRICES: Readonly<Partial<Record<MaterialCode, { perKgAt2Mm: number, leadDays: number }>>> = {
  'EN10270-1-SL': { perKgAt2Mm: 2.1, leadDays: 5 },
  'EN10270-1-SM': { perKgAt2Mm: 2.45, leadDays: 4 },
  'EN10270-1-SH': { perKgAt2Mm: 2.95, leadDays: 4 },
  'EN10270-2-FDSiCr': { perKgAt2Mm: 4.6, leadDays: 8 },
  'EN10270-3-1.4310': { perKgAt2Mm: 8.9, leadDays: 7 },
  'ASTM-B159': { perKgAt2Mm: 19.5, leadDays: 12 },
  'ASTM-B197': { perKgAt2Mm: 62, leadDays: 18 },
}

/** Price of a kilogram in currency units with four decimals, for an invented wire of this thickness. */
export function demoPricePerKg(perKgAt2Mm: number, wireDiameterMm: number): string {
  const fineness = wireDiameterMm < 2 ? (2 / wireDiameterMm) ** 0.55 : (2 / wireDiameterMm) ** 0.08
  return (perKgAt2Mm * fineness).toFixed(4)
}

/** Smallest purchase in kg: a spool of fine wire, a coil of thick wire (common practice, no source). */
export const demoSmallestPurchaseKg = (wireDiameterMm: number): number => wireDiameterMm <= 0.5 ? 5 : wireDiameterMm <= 1.2 ? 15 : wireDiameterMm <= 3.5 ? 50 : wireDiameterMm <= 6.5 ? 100 : 200

/** Invented stock: the sizes most often asked for lie in the rack, the others are bought when needed. */
export function demoStockKg(material: MaterialCode, wireDiameterMm: number): number {
  const common = [0.5, 0.63, 0.8, 1, 1.25, 1.4, 1.5, 1.6, 1.8, 2, 2.2, 2.5, 2.8, 3, 3.2, 3.5, 4, 4.5, 5, 6, 7, 8].includes(wireDiameterMm)
  if (!common) return 0
  const share = material === 'EN10270-1-SH' ? 1 : material === 'EN10270-1-SM' ? 0.8 : material === 'EN10270-3-1.4310' ? 0.5 : 0.3
  return Math.round(demoSmallestPurchaseKg(wireDiameterMm) * 4 * share)
}
