/**
 * Deflection at which the spring bows out sideways, mm, or Infinity where it cannot (EN 13906-1, from memory; the same
 * expression as Shigley's with C1' = E/(2(E - G)), C2' = 2 pi^2 (E - G)/(E + 2G)).
 */
export function criticalBucklingDeflectionMm(input: {
  readonly freeLengthMm: number
  readonly meanDiameterMm: number
  readonly seatingCoefficient: number
  readonly shearModulusMpa: number
  readonly youngsModulusMpa: number
}): number {
  return bucklingDeflection(
    input.freeLengthMm, input.meanDiameterMm, input.seatingCoefficient, input.shearModulusMpa / input.youngsModulusMpa,
  )
}

/** The same on plain arguments, for the search: `moduli` is G/E. */
export function bucklingDeflection(freeLengthMm: number, meanDiameterMm: number, seating: number, moduli: number): number {
  const ratio = (Math.PI * meanDiameterMm) / (seating * freeLengthMm)
  const a = (ratio * ratio) / (0.5 + moduli)
  const b = 1 - moduli
  // At G = E the bracket over b tends to a/2.
  if (Math.abs(b) < 1e-9) return freeLengthMm * 0.25 * a
  const root = 1 - b * a
  return root < 0 ? Infinity : ((freeLengthMm * 0.5) / b) * (1 - Math.sqrt(root))
}
