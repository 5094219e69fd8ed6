/** Least ratio of natural to working frequency that keeps surge away (15 to 20, Shigley, from memory). */
export const SURGE_RATIO = 15

/**
 * First natural frequency with both ends seated, Hz: d/(2 pi n D^2) sqrt(G/(2 rho)) (EN 13906-1 in SI, from memory; agrees
 * with 0.5 sqrt(k g/W) of Shigley). d and D in mm, G in MPa, rho in kg/m3.
 */
export function naturalFrequencyHz(input: {
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
  readonly shearModulusMpa: number
  readonly densityKgPerM3: number
}): number {
  const { wireDiameterMm: d, meanDiameterMm: D, activeCoils: n, shearModulusMpa: G, densityKgPerM3: rho } = input
  const waveSpeedMPerS = Math.sqrt((G * 1e6) / (2 * rho))
  return ((d * 1e-3) / (2 * Math.PI * n * (D * 1e-3) ** 2)) * waveSpeedMPerS
}
