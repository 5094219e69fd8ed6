import type { ToleranceGrade } from '../../codes'

// EN 15800 (DIN 2095), plus or minus mm by D "to", for index 4-8, 8-14, 14-20 in grades 1, 2, 3. Published for D to 63 mm
// and for all of grade 2; grades 1 and 3 above 63 mm from memory.
const ROWS: readonly (readonly [number, number, number, number, number, number, number, number, number, number])[] = [
  [1, 0.05, 0.07, 0.1, 0.07, 0.1, 0.15, 0.1, 0.15, 0.2],
  [1.6, 0.05, 0.07, 0.1, 0.08, 0.1, 0.15, 0.15, 0.2, 0.3],
  [2.5, 0.07, 0.1, 0.15, 0.1, 0.15, 0.2, 0.2, 0.3, 0.4],
  [4, 0.1, 0.1, 0.15, 0.15, 0.2, 0.25, 0.3, 0.4, 0.5],
  [6.3, 0.1, 0.15, 0.2, 0.2, 0.25, 0.3, 0.4, 0.5, 0.6],
  [10, 0.15, 0.15, 0.2, 0.25, 0.3, 0.35, 0.5, 0.6, 0.7],
  [16, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.6, 0.7, 0.8],
  [25, 0.2, 0.25, 0.3, 0.35, 0.45, 0.5, 0.7, 0.9, 1],
  [31.5, 0.25, 0.3, 0.35, 0.4, 0.5, 0.6, 0.8, 1, 1.2],
  [40, 0.25, 0.3, 0.35, 0.5, 0.6, 0.7, 1, 1.2, 1.5],
  [50, 0.3, 0.4, 0.5, 0.6, 0.8, 0.9, 1.2, 1.5, 1.8],
  [63, 0.4, 0.5, 0.6, 0.8, 1, 1.1, 1.5, 2, 2.3],
  [80, 0.5, 0.7, 0.8, 1, 1.2, 1.4, 1.8, 2.4, 2.8],
  [100, 0.6, 0.8, 0.9, 1.2, 1.5, 1.7, 2.3, 3, 3.5],
  [125, 0.7, 1, 1.1, 1.4, 1.9, 2.2, 2.8, 3.7, 4.4],
  [160, 0.9, 1.2, 1.4, 1.8, 2.3, 2.7, 3.5, 4.6, 5.4],
  [200, 1.2, 1.5, 1.7, 2.1, 2.9, 3.3, 4.2, 5.7, 6.6],
]

const LEAST_MEAN_DIAMETER_MM = 0.63
/** Index at which the tolerance steps up, and the ends of the table. */
export const INDEX_STEPS = [4, 8, 14, 20] as const
/** Mean diameters at which the tolerance steps up, mm; it begins at the first and ends, and so is counted as none, beyond the last. */
export const MEAN_DIAMETER_STEPS_MM: readonly number[] = [LEAST_MEAN_DIAMETER_MM, ...ROWS.map(row => row[0])]
/** Beyond this no tolerance is published. */
export const MOST_MEAN_DIAMETER_MM = 200

/**
 * Tolerance of the mean diameter (and so of the outside and inside), plus or minus mm, EN 15800; NaN outside the table
 * (D 0.63 to 200 mm, index 4 to 20).
 */
export function meanDiameterToleranceMm(meanDiameterMm: number, springIndex: number, grade: ToleranceGrade): number {
  // A hair of slack: an index of 20 computed from a stepped diameter may miss it by one rounding.
  if (meanDiameterMm < LEAST_MEAN_DIAMETER_MM || springIndex < 4 - 1e-9 || springIndex > 20 + 1e-9) return Number.NaN
  const column = (grade - 1) * 3 + (springIndex <= 8 ? 1 : springIndex <= 14 ? 2 : 3)
  for (const row of ROWS) {
    if (meanDiameterMm <= row[0]) return row[column] ?? Number.NaN
  }
  return Number.NaN
}
