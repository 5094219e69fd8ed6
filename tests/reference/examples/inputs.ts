/** Numbers of a worked example, in mm, N, MPa. */
export type Inputs = Readonly<Record<string, number>>
export type Computed = Record<string, number>

/** An input that the example must have. */
export function num(value: number | null | undefined): number {
  if (value === undefined || value === null) throw new Error('The example lacks an input, or the code gives no value')
  return value
}

// Wires a book chooses from, mm: table of preferred sizes.
const PREFERRED_MM = [1, 1.2, 1.4, 1.6, 1.8, 2, 2.2, 2.5, 2.8, 3, 3.5, 4, 4.5, 5, 6, 7, 8, 9, 10] as const

/** The thinnest preferred wire that satisfies. */
export function thinnestWire(satisfies: (wireDiameterMm: number) => boolean): number {
  const found = PREFERRED_MM.find(satisfies)
  if (found === undefined) throw new Error('No preferred wire satisfies')
  return found
}
