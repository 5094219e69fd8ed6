/** Numbers a helical spring's rate depends on; mm and MPa. */
export interface RateInput {
  readonly shearModulusMpa: number
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly activeCoils: number
}

/**
 * Rate R = G d^4 / (8 D^3 n), N/mm (EN 13906-1; Shigley ch. 10). It leaves out the pitch angle and direct shear: within
 * 1 % of the exact rate to 8 degrees of pitch angle.
 */
export function rateNPerMm({ shearModulusMpa: G, wireDiameterMm: d, meanDiameterMm: D, activeCoils: n }: RateInput): number {
  // Products, not powers: this runs in the inner loop of sizing.
  return (G * d * d * d * d) / (8 * D * D * D * n)
}

/** Active coils that give a rate: n = G d^4 / (8 D^3 R). */
export function activeCoilsForRate(input: {
  readonly shearModulusMpa: number
  readonly wireDiameterMm: number
  readonly meanDiameterMm: number
  readonly rateNPerMm: number
}): number {
  const { shearModulusMpa: G, wireDiameterMm: d, meanDiameterMm: D, rateNPerMm: R } = input
  return (G * d * d * d * d) / (8 * D * D * D * R)
}
