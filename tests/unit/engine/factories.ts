import { buildDefaultRates, type PriceBook, type PricedDesign, type PricedWireProduct, type PriceRequest, type RateCode } from '#server/engine/pricing'

/** A price book of the default rates, with some replaced. */
export function aBook(rates: Partial<Record<RateCode, string>> = {}): PriceBook {
  return { number: 41, currency: 'eur', inForceFrom: '2026-11-23', rates: { ...buildDefaultRates(), ...rates } }
}

/** The spring of the mocked quote: SH 2.50, 644 mm of wire, 24.8 g, closed and ground. */
export function aDesign(changes: Partial<PricedDesign> = {}): PricedDesign {
  return {
    kind: 'compression', material: 'EN10270-1-SH', wireDiameterMm: 2.5, meanDiameterMm: 20, activeCoils: 8.25, totalCoils: 10.25, freeLengthMm: 60, ends: 'closed-ground', formed: null,
    wireLengthMm: 644, massG: 24.8, stressReliefMinutes: 30, stressReliefTempC: 230, ...changes,
  }
}

export function aWireProduct(changes: Partial<PricedWireProduct> = {}): PricedWireProduct {
  return { pricePerKg: '2.95', stockKg: '180', smallestPurchaseKg: '100', leadDays: 5, ...changes }
}

export function aRequest(changes: Partial<PriceRequest> = {}): PriceRequest {
  return {
    design: aDesign(),
    wireProduct: aWireProduct(),
    quantity: 500,
    options: { toleranceGrade: 2, certificate: 'none' },
    book: aBook(),
    customer: { country: 'AT', vatNumberGiven: false },
    homeCountry: 'AT',
    ...changes,
  }
}
