/** The number inside a job's or an order's reference: J-1207 is 1207. Give a reference that a schema has parsed. */
export const numberOfRef = (ref: string): number => Number(ref.slice(ref.indexOf('-') + 1))
