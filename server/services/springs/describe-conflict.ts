import { MoneyError } from '#shared/money'
import type { Requirement } from '#shared/schemas/enquiry'
import type { ConflictView } from '#shared/schemas/quote'
import { describeConflict } from '#shared/spring/sizing'
import type { SizingChange, SizingResult, SpringSizeRequest } from '#shared/spring/sizing/types'
import type { CatalogueWire } from '../catalogue/list-wires'
import { priceQuantity, type PriceBook, type PricedCustomer } from '../../engine/pricing'
import { HOME_COUNTRY } from '../orders/home-country'
import { formFieldOf } from './form-fields'
import { mainQuantityOf, priceOptionsOf } from './price-search'
import { sizeRequestOf } from './requirement'
import { pricedCandidateOf } from './stored-design'

const MOST_CHANGES = 4

type PricingBasis = { requirement: Requirement, request: SpringSizeRequest, customer: PricedCustomer, book: PriceBook }

/** What stands in the way of a requirement, and single changes of it that would give a spring, each with the price of that spring. */
export function describeConflictFor(requirement: Requirement, result: SizingResult<CatalogueWire>, basis: Pick<PricingBasis, 'customer' | 'book'>): ConflictView {
  if (!result.conflict) return { words: 'No spring of the wire we can buy does all of this.', changes: [] }
  const request = sizeRequestOf(requirement, 1)
  const [words = ''] = describeConflict(result.conflict, request)
  return {
    words,
    changes: result.conflict.changes.flatMap((change) => {
      const field = formFieldOf(requirement, change.path)
      const to = field?.path === 'strokes' ? Math.floor(change.to) : change.to
      if (!field || (field.path === 'strokes' && to < 1)) return []
      return [{ path: field.path, label: field.label, to, toText: `${figure(to)} ${field.unit}`, unitPrice: unitPriceOf(change, { ...basis, requirement, request }) }]
    }).slice(0, MOST_CHANGES),
  }
}

function unitPriceOf({ design }: SizingChange<CatalogueWire>, { requirement, request, customer, book }: PricingBasis): string | null {
  try {
    const { wireLengthMm, massG, outerDiameterMm } = design.evaluation
    return priceQuantity({
      design: pricedCandidateOf({ ...design, wireLengthMm, massG, outerDiameterMm }, request),
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
