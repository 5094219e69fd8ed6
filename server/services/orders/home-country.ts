/** Where the shop is: tax is counted from there. ISO 3166. */
export const HOME_COUNTRY = 'IE'
