/** The number of a job as people write it: J-1207. */
export const jobRefOf = (number: number): string => `J-${number}`

/** The number behind a reference that was checked with `jobRefSchema`. */
export const jobNumberOf = (ref: string): number => Number(ref.slice('J-'.length))
