/** Where the shop is: tax and promises are counted from there. ISO 3166. */
export const HOME_COUNTRY = 'IE'

/** A VAT number frees from tax only where it belongs to the country the springs go to; XI is Northern Ireland. */
export const isVatNumberOf = (vatNumber: string | undefined, countryCode: string): boolean =>
  vatNumber !== undefined && (vatNumber.startsWith(countryCode) || (countryCode === 'GB' && vatNumber.startsWith('XI')))
