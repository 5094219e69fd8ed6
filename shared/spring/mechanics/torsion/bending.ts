import type { StressMethod } from '../../codes'

/** Uncorrected bending stress 32 M/(pi d^3), MPa. */
export function bendingStressMpa(momentNmm: number, wireDiameterMm: number): number {
  return (32 * momentNmm) / (Math.PI * wireDiameterMm * wireDiameterMm * wireDiameterMm)
}

/** Moment at an uncorrected bending stress, N mm. */
export function momentAtStressNmm(stressMpa: number, wireDiameterMm: number): number {
  return (stressMpa * Math.PI * wireDiameterMm * wireDiameterMm * wireDiameterMm) / 32
}

/** Factor of the inner fibre, Ki = (4C^2 - C - 1)/(4C(C - 1)) (Bhandari ch. 10; Jindal ch. 8). */
export function innerFibreFactor(springIndex: number): number {
  const C = springIndex
  return (4 * C * C - C - 1) / (4 * C * (C - 1))
}

/** EN 13906-3 factor q = (w + 0.07)/(w - 0.75), from memory. */
export function en13906BendingFactor(springIndex: number): number {
  return (springIndex + 0.07) / (springIndex - 0.75)
}

/** The factor a method corrects bending stress with. */
export function bendingCorrectionFactor(method: StressMethod, springIndex: number): number {
  return method === 'wahl' ? innerFibreFactor(springIndex) : en13906BendingFactor(springIndex)
}

// Degrees of E d^4/(c D n): bending theory, 64/(2 pi) * 360 = 3666.9 (EN 13906-3), and with friction between the coils
// allowed for, 10.8 * 360 (Jindal ch. 8; Shigley).
const RATE_CONSTANT: Readonly<Record<StressMethod, number>> = { en13906: (64 * 180) / Math.PI, wahl: 3888 }

/** Rate, N mm per degree: E d^4/(c D n) with the constant of the method. */
export function momentRateNmmPerDeg(method: StressMethod, youngsModulusMpa: number, wireDiameterMm: number, meanDiameterMm: number, activeCoils: number): number {
  const d2 = wireDiameterMm * wireDiameterMm
  return (youngsModulusMpa * d2 * d2) / (RATE_CONSTANT[method] * meanDiameterMm * activeCoils)
}

/** Turns that the two legs work like, (l1 + l2)/(3 pi D) (Jindal ch. 8; Shigley). */
export function legCoils(legsLengthMm: number, meanDiameterMm: number): number {
  return legsLengthMm / (3 * Math.PI * meanDiameterMm)
}

/**
 * Mean diameter of the body after `turns` more (wound up) or less (opened), mm: D Nb/(Nb + turns) (Jindal ch. 8; Shigley).
 * Unturned where no coil would be left: the check of order stops such a spring.
 */
export function turnedMeanDiameterMm(meanDiameterMm: number, bodyCoils: number, turns: number): number {
  return bodyCoils + turns > 0 ? (meanDiameterMm * bodyCoils) / (bodyCoils + turns) : meanDiameterMm
}

/** Work stored at a moment, J: half of moment times angle. */
export function storedEnergyJ(momentNmm: number, angleDeg: number): number {
  return (momentNmm * angleDeg * Math.PI) / 360_000
}
