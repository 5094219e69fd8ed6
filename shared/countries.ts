/** Country codes we deliver to, with the names shown. Apart from the schemas, so that a page can list them without loading Zod. */
export const COUNTRIES = { IE: 'Ireland', BE: 'Belgium', DE: 'Germany', FR: 'France', NL: 'Netherlands', GB: 'United Kingdom', US: 'United States' } as const
export type CountryCode = keyof typeof COUNTRIES
