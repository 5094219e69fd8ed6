/** Uncorrected torsional stress 8 F D / (pi d^3), MPa (EN 13906-1; Shigley ch. 10). */
export function shearStressMpa(forceN: number, meanDiameterMm: number, wireDiameterMm: number): number {
  return (8 * forceN * meanDiameterMm) / (Math.PI * wireDiameterMm * wireDiameterMm * wireDiameterMm)
}

/** Force at an uncorrected torsional stress, N. */
export function forceAtStressN(stressMpa: number, meanDiameterMm: number, wireDiameterMm: number): number {
  return (stressMpa * Math.PI * wireDiameterMm * wireDiameterMm * wireDiameterMm) / (8 * meanDiameterMm)
}
