/** The number of an order as people write it: OX-2417. */
export const orderRefOf = (number: number): string => `OX-${number}`

/** The number behind a reference that was checked with `orderRefSchema`. */
export const orderNumberOf = (ref: string): number => Number(ref.slice('OX-'.length))
