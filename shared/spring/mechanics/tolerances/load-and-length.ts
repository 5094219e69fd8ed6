import type { ToleranceGrade } from '../../codes'

// Quality factor of EN 15800 grades 1, 2, 3 (from memory).
const QUALITY: Readonly<Record<ToleranceGrade, number>> = { 1: 0.63, 2: 1, 3: 1.6 }
// Squareness and parallelism of ground ends, as fractions of L0 and De (EN 15800, from memory).
const SQUARENESS: Readonly<Record<ToleranceGrade, number>> = { 1: 0.03, 2: 0.05, 3: 0.08 }
const PARALLELISM: Readonly<Record<ToleranceGrade, number>> = { 1: 0.015, 2: 0.03, 3: 0.06 }

interface Coil {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
}

// a_F of EN 15800 (from memory; coefficients to be confirmed against the standard).
function basicLoadToleranceN({ wireDiameterMm: d, meanDiameterMm: D }: Coil): number {
  const w = D / d / 10
  return ((65.92 * d ** 3.3) / D ** 1.6) * (-0.84 * w ** 3 + 3.781 * w ** 2 - 4.244 * w + 2.274)
}

// k_F of EN 15800 (from memory).
function coilFactor({ activeCoils: n }: Coil): number {
  return -1 / (3 * n * n) + 8 / (5 * n) + 0.803
}

/** Load tolerance, plus or minus N: (a_F k_F + 1.5 F/100) Q (EN 15800, from memory). */
export function loadToleranceN(coil: Coil, forceN: number, grade: ToleranceGrade): number {
  return (basicLoadToleranceN(coil) * coilFactor(coil) + (1.5 * forceN) / 100) * QUALITY[grade]
}

/** Free length tolerance, plus or minus mm: a_F k_F Q / R (EN 15800, from memory). */
export function freeLengthToleranceMm(coil: Coil, rateNPerMm: number, grade: ToleranceGrade): number {
  return (basicLoadToleranceN(coil) * coilFactor(coil) * QUALITY[grade]) / rateNPerMm
}

/** Squareness e1 of ground ends, mm over the free length (EN 15800, from memory). */
export function squarenessMm(freeLengthMm: number, grade: ToleranceGrade): number {
  return SQUARENESS[grade] * freeLengthMm
}

/** Parallelism e2 of ground ends, mm over the outside diameter (EN 15800, from memory). */
export function parallelismMm(outerDiameterMm: number, grade: ToleranceGrade): number {
  return PARALLELISM[grade] * outerDiameterMm
}
