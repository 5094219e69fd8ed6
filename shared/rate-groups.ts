/** Parts of a price book, in the order in which they are shown. */
export const RATE_GROUPS = ['hourly', 'coiling', 'wire', 'furnace', 'grinding', 'inspection', 'packing', 'policy', 'tax', 'gate', 'promise'] as const
export type RateGroup = (typeof RATE_GROUPS)[number]
