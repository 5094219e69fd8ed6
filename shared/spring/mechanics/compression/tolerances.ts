import type { CompressionModel } from './model'
import type { CompressionState } from './state'
import { freeLengthToleranceMm, loadToleranceN, parallelismMm, squarenessMm } from '../tolerances/load-and-length'
import { meanDiameterToleranceMm } from '../tolerances/mean-diameter'
import type { PointResult, Tolerance } from '../types'

const PUBLISHED = 'EN 15800 (DIN 2095)'
const MEMORY = 'EN 15800, coefficients from memory'
// Scope of EN 15800: wire, index, coils and free length.
const SCOPE = { wireLeastMm: 0.07, wireMostMm: 16, coilsLeast: 2, freeLengthMostMm: 630 } as const

/** True where the load and length formulas of EN 15800 apply. */
export function isWithinToleranceScope(model: CompressionModel, state: CompressionState): boolean {
  return !Number.isNaN(meanDiameterToleranceMm(state.meanDiameterMm, state.springIndex, model.grade))
    && model.wireDiameterMm >= SCOPE.wireLeastMm
    && model.wireDiameterMm <= SCOPE.wireMostMm
    && state.activeCoils >= SCOPE.coilsLeast
    && state.freeLengthMm <= SCOPE.freeLengthMostMm
}

/** What the grade allows: diameters, free length, each load, and the faces of ground ends; empty outside the standard. */
export function listTolerances(model: CompressionModel, state: CompressionState, points: readonly PointResult[]): Tolerance[] {
  if (!isWithinToleranceScope(model, state)) return []
  const { grade } = model
  const D = state.meanDiameterMm
  const d = model.wireDiameterMm
  const diameter = meanDiameterToleranceMm(D, state.springIndex, grade)
  const coil = { wireDiameterMm: d, meanDiameterMm: D, activeCoils: state.activeCoils }
  const rows: Tolerance[] = [
    { quantity: 'meanDiameterMm', nominal: D, plusMinus: diameter, grade, source: PUBLISHED },
    { quantity: 'outerDiameterMm', nominal: D + d, plusMinus: diameter, grade, source: PUBLISHED },
    { quantity: 'innerDiameterMm', nominal: D - d, plusMinus: diameter, grade, source: PUBLISHED },
    {
      quantity: 'freeLengthMm',
      nominal: state.freeLengthMm,
      plusMinus: freeLengthToleranceMm(coil, state.rateNPerMm, grade),
      grade,
      source: MEMORY,
    },
  ]
  points.forEach((point, i) => {
    if (point.forceN < 0) return
    rows.push({ quantity: `force${i + 1}N`, nominal: point.forceN, plusMinus: loadToleranceN(coil, point.forceN, grade), grade, source: MEMORY })
  })
  if (model.ends === 'closed-ground' || model.ends === 'open-ground') {
    rows.push({ quantity: 'squarenessMm', nominal: 0, plusMinus: squarenessMm(state.freeLengthMm, grade), grade, source: MEMORY })
    rows.push({ quantity: 'parallelismMm', nominal: 0, plusMinus: parallelismMm(D + d, grade), grade, source: MEMORY })
  }
  return rows
}
