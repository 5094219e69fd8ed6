import { meanDiameterToleranceMm } from '../tolerances/mean-diameter'
import type { Tolerance } from '../types'
import type { ExtensionModel } from './model'
import type { ExtensionState } from './state'

// DIN 2097, grade 2: free length in mm "to", plus or minus for index 4-8 and 8-20; beyond 400 mm 1.5 % of it. Published on a
// stockist's page as one list; the pairing is the only one that rises evenly.
const FREE_LENGTH_ROWS: readonly (readonly [number, number, number])[] = [
  [10, 0.4, 0.5], [16, 0.5, 0.6], [25, 0.6, 0.7], [40, 0.8, 0.9], [63, 1.1, 1.3], [100, 1.5, 1.8], [160, 2, 2.4], [250, 2.5, 3], [400, 3, 4],
]
const LONG_SHARE = 0.015

/** Free length tolerance of grade 2, plus or minus mm (DIN 2097); NaN for an index outside 4 to 20. */
export function extensionFreeLengthToleranceMm(freeLengthMm: number, springIndex: number): number {
  if (!(springIndex >= 4 - 1e-9 && springIndex <= 20 + 1e-9)) return Number.NaN
  const row = FREE_LENGTH_ROWS.find(([to]) => freeLengthMm <= to)
  return row ? row[springIndex <= 8 ? 1 : 2] : LONG_SHARE * freeLengthMm
}

/** What the grade allows: diameters, and the free length in grade 2; empty outside the tables. */
export function listExtensionTolerances(model: ExtensionModel, state: ExtensionState): Tolerance[] {
  const { grade, wireDiameterMm: d } = model
  const D = state.meanDiameterMm
  const plusMinus = meanDiameterToleranceMm(D, state.springIndex, grade)
  if (Number.isNaN(plusMinus)) return []
  const source = 'EN 15800 (DIN 2095), as DIN 2097 takes it'
  const rows: Tolerance[] = [
    { quantity: 'meanDiameterMm', nominal: D, plusMinus, grade, source },
    { quantity: 'outerDiameterMm', nominal: D + d, plusMinus, grade, source },
    { quantity: 'innerDiameterMm', nominal: D - d, plusMinus, grade, source },
  ]
  if (grade === 2) {
    rows.push({ quantity: 'insideHooksFreeLengthMm', nominal: state.freeLengthMm, plusMinus: extensionFreeLengthToleranceMm(state.freeLengthMm, state.springIndex), grade, source: 'DIN 2097' })
  }
  return rows
}
