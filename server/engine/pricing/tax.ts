import { rateText } from './rates'
import type { PriceBook, PricedCustomer, TaxKind } from './types'

/** Members of the European Union's VAT area, ISO 3166 codes; Greece also by its VAT prefix EL. */
const EU_COUNTRIES: ReadonlySet<string> = new Set(
  'AT BE BG CY CZ DE DK EE EL ES FI FR GR HR HU IE IT LT LU LV MT NL PL PT RO SE SI SK'.split(' '),
)

/**
 * Tax that applies: the domestic rate at home and to private persons in the EU (the shop is taken to be under the threshold for
 * distance selling), none by reverse charge to an EU business elsewhere, none for exports. Rates come from the book as decimal text.
 */
export function resolveTax(
  { book, customer, homeCountry }: { book: PriceBook, customer: PricedCustomer, homeCountry: string },
): { kind: TaxKind, percent: string } {
  const country = customer.country.toUpperCase()
  const kind = taxKindOf(country, homeCountry.toUpperCase(), customer.vatNumberGiven)
  return { kind, percent: rateText(book, `tax.${kind}-percent`) }
}

function taxKindOf(country: string, home: string, vatNumberGiven: boolean): TaxKind {
  if (country === home) return 'domestic'
  if (!EU_COUNTRIES.has(country)) return 'export'
  return vatNumberGiven && EU_COUNTRIES.has(home) ? 'eu-business' : 'domestic'
}
