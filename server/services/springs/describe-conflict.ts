import { MoneyError } from '#shared/money'
import type { Requirement } from '#shared/schemas/enquiry'
import type { ConflictView } from '#shared/schemas/quote'
import { describeConflict } from '#shared/spring/sizing'
import type { SizingChange, SizingResult } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import { priceQuantity, type PriceBook, type PricedCustomer } from '../../engine/pricing'
import { HOME_COUNTRY } from '../orders/home-country'
import { mainQuantityOf, priceOptionsOf } from './find-design'
import { sizeRequestOf } from './requirement'
import { pricedDesignOf } from './stored-design'

type Field = { path: string, label: string, unit: string }

const FIELDS: Readonly<Record<string, Field>> = {
  'fit.boreMm': { path: 'boreMm', label: 'a bore of', unit: 'mm' },
  'fit.rodMm': { path: 'rodMm', label: 'a rod of', unit: 'mm' },
  'fit.maxFreeLengthMm': { path: 'maxFreeLengthMm', label: 'a free length of up to', unit: 'mm' },
  'fit.maxSolidLengthMm': { path: 'maxSolidLengthMm', label: 'room of', unit: 'mm' },
  'temperatureC': { path: 'hottestC', label: 'at most', unit: '°C' },
  'duty.cycles': { path: 'strokes', label: 'a life of', unit: 'strokes' },
}
const NEED_FIELDS: Readonly<Record<Requirement['need']['knows'], Readonly<Record<string, Field>>>> = {
  'two-loads': {
    'points.0.forceN': { path: 'need.first.forceN', label: 'a first load of', unit: 'N' },
    'points.0.lengthMm': { path: 'need.first.lengthMm', label: 'a first length of', unit: 'mm' },
    'points.1.forceN': { path: 'need.second.forceN', label: 'a second load of', unit: 'N' },
    'points.1.lengthMm': { path: 'need.second.lengthMm', label: 'a second length of', unit: 'mm' },
  },
  'load-and-rate': {
    'points.0.forceN': { path: 'need.load.forceN', label: 'a load of', unit: 'N' },
    'points.0.lengthMm': { path: 'need.load.lengthMm', label: 'a length of', unit: 'mm' },
    'rateNPerMm': { path: 'need.rateNPerMm', label: 'a rate of', unit: 'N/mm' },
  },
  // The load there follows from rate and lengths, so no single number of it can be changed alone.
  'rate-and-length': {},
}
const MOST_CHANGES = 4

type PricingBasis = { requirement: Requirement, customer: PricedCustomer, book: PriceBook }

/** What stands in the way of a requirement, and single changes of it that would give a spring, each with the price of that spring. */
export function describeConflictFor(requirement: Requirement, result: SizingResult<CatalogueWire>, basis: Omit<PricingBasis, 'requirement'>): ConflictView {
  if (!result.conflict) return { words: 'No spring of the wire we can buy does all of this.', changes: [] }
  const [words = ''] = describeConflict(result.conflict, sizeRequestOf(requirement, 1))
  return {
    words,
    changes: result.conflict.changes.flatMap((change) => {
      const field = FIELDS[change.path] ?? NEED_FIELDS[requirement.need.knows][change.path]
      const to = field?.path === 'strokes' ? Math.floor(change.to) : change.to
      if (!field || (field.path === 'strokes' && to < 1)) return []
      return [{ path: field.path, label: field.label, to, toText: `${figure(to)} ${field.unit}`, unitPrice: unitPriceOf(change, { ...basis, requirement }) }]
    }).slice(0, MOST_CHANGES),
  }
}

function unitPriceOf({ design }: SizingChange<CatalogueWire>, { requirement, customer, book }: PricingBasis): string | null {
  try {
    return priceQuantity({
      design: pricedDesignOf(design.material, { ...design, ends: requirement.ends, wireLengthMm: design.evaluation.wireLengthMm, massG: design.evaluation.massG }),
      wireProduct: design.wire, quantity: mainQuantityOf(requirement.quantities), options: priceOptionsOf(requirement), book, customer, homeCountry: HOME_COUNTRY,
    }).unitPrice
  }
  catch (error) {
    if (!(error instanceof MoneyError)) throw error
    // A spring too dear for one payment is shown without its price; the enquiry itself says why.
    return null
  }
}

/** Four figures, without idle zeros. */
const figure = (value: number) => Math.abs(value) >= 1e7 ? value.toExponential(2) : String(Number(value.toPrecision(4)))
