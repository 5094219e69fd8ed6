import { meanDiameterToleranceMm } from '../tolerances/mean-diameter'
import type { Tolerance } from '../types'
import type { TorsionModel } from './model'
import type { TorsionState } from './state'
import type { TorsionPointResult } from './types'

// Machinery's Handbook: load at a stated deflection; closer needs each spring tested and adjusted.
const MOMENT_SHARE = 0.1

/** What is allowed: diameters by grade, and each moment. */
export function listTorsionTolerances(model: TorsionModel, state: TorsionState, points: readonly TorsionPointResult[]): Tolerance[] {
  const { grade, wireDiameterMm: d } = model
  const D = state.meanDiameterMm
  const plusMinus = meanDiameterToleranceMm(D, state.springIndex, grade)
  const source = 'EN 15800 (DIN 2095), taken for torsion springs too'
  const rows: Tolerance[] = Number.isNaN(plusMinus)
    ? []
    : [
        { quantity: 'meanDiameterMm', nominal: D, plusMinus, grade, source },
        { quantity: 'outerDiameterMm', nominal: D + d, plusMinus, grade, source },
        { quantity: 'innerDiameterMm', nominal: D - d, plusMinus, grade, source },
      ]
  points.forEach((point, i) => {
    if (point.momentNmm < 0) return
    rows.push({ quantity: `moment${i + 1}Nmm`, nominal: point.momentNmm, plusMinus: MOMENT_SHARE * point.momentNmm, grade, source: 'Machinery\'s Handbook, load of torsion springs' })
  })
  return rows
}
