import type { Currency } from '#shared/money'
import { Decimal, roundToMinor } from '#shared/money/decimal'
import { rateText, readNumberRates, type PriceBook } from '../pricing'

export type MaterialFamily = 'carbon-steel' | 'oil-tempered' | 'stainless' | 'copper-alloy' | 'other'
export type CautionGroup = 'clearance' | 'stress' | 'hook' | 'fit' | 'stock' | 'other'

/** Limits inside which a quote goes out at once, from a price book's gate rates. */
export interface GatePolicy {
  currency: Currency
  indexMin: number
  indexMax: number
  wireMinMm: number
  wireMaxMm: number
  slendernessMax: number
  /** Held at the greatest working load by a spring with hooks or legs. */
  energyMaxJ: number
  tightestGrade: number
  lifeMaxCycles: number
  quantityMin: number
  quantityMax: number
  valueMaxMinor: number
  temperatureMinC: number
  temperatureMaxC: number
  allowedFamilies: ReadonlySet<MaterialFamily>
  refusedSurroundings: ReadonlySet<string>
  allowedCautions: ReadonlySet<CautionGroup>
}

const FAMILIES: readonly MaterialFamily[] = ['carbon-steel', 'oil-tempered', 'stainless', 'copper-alloy', 'other']
const CAUTION_GROUPS: readonly CautionGroup[] = ['clearance', 'stress', 'hook', 'fit', 'stock', 'other']
const JUDGED_SURROUNDINGS = ['salt', 'food', 'chemical'] as const

/** Family of a material code; a code the table does not know is `other`. */
export function materialFamilyOf(material: string): MaterialFamily {
  if (/^EN10270-1-|^ASTM-A22[78]$/.test(material)) return 'carbon-steel'
  if (/^EN10270-2-|^ASTM-A(229|232|401)$/.test(material)) return 'oil-tempered'
  if (/^EN10270-3-|^ASTM-A313-/.test(material)) return 'stainless'
  if (/^ASTM-B1(59|97)$/.test(material)) return 'copper-alloy'
  return 'other'
}

/** Group a caution is judged by; a check nobody named here is `other` and waits for a person. */
export function cautionGroupOf(checkCode: string): CautionGroup {
  if (checkCode === 'clearance') return 'clearance'
  if (checkCode === 'stress-solid' || checkCode === 'stress-working') return 'stress'
  if (checkCode === 'stress-hook-bending' || checkCode === 'stress-hook-torsion') return 'hook'
  if (checkCode === 'bore' || checkCode === 'rod') return 'fit'
  return checkCode === 'wire-range' ? 'stock' : 'other'
}

/** Reads the gate's limits from a price book. Throws PriceError where a rate is missing or wrong. */
export function readGatePolicy(book: PriceBook): GatePolicy {
  const rates = readNumberRates(book)
  return {
    currency: book.currency,
    indexMin: rates['gate.index-min'],
    indexMax: rates['gate.index-max'],
    wireMinMm: rates['gate.wire-min-mm'],
    wireMaxMm: rates['gate.wire-max-mm'],
    slendernessMax: rates['gate.slenderness-max'],
    energyMaxJ: rates['gate.energy-max-j'],
    tightestGrade: rates['gate.tightest-grade'],
    lifeMaxCycles: rates['gate.life-max-cycles'],
    quantityMin: rates['gate.quantity-min'],
    quantityMax: rates['gate.quantity-max'],
    valueMaxMinor: roundToMinor(new Decimal(rateText(book, 'gate.value-max')), book.currency),
    temperatureMinC: rates['gate.temperature-min-c'],
    temperatureMaxC: rates['gate.temperature-max-c'],
    allowedFamilies: new Set(FAMILIES.filter((family) => rates[`gate.material.${family}`] === 1)),
    refusedSurroundings: new Set(JUDGED_SURROUNDINGS.filter((place) => rates[`gate.surroundings.${place}`] !== 1)),
    allowedCautions: new Set(CAUTION_GROUPS.filter((group) => rates[`gate.caution.${group}`] === 1)),
  }
}
