// Preferred range 231/exp(0.105 C) +/- 6.9 (4 - (C - 3)/6.5) MPa (Shigley, from memory).
const middleMpa = (springIndex: number) => 231 / Math.exp(0.105 * springIndex)
const spreadMpa = (springIndex: number) => 6.9 * (4 - (springIndex - 3) / 6.5)

/** Greatest initial stress, uncorrected, that winding gives in a sensible way, MPa. */
export const greatestInitialStressMpa = (springIndex: number): number => middleMpa(springIndex) + spreadMpa(springIndex)

/** Least initial stress that is wound with ease, MPa. */
export const leastInitialStressMpa = (springIndex: number): number => middleMpa(springIndex) - spreadMpa(springIndex)

/** The middle of the sensible range, MPa: what a spring is wound with where nothing asks for more or less. */
export const usualInitialStressMpa = middleMpa
