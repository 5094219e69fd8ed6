/**
 * Growth of the outside diameter from free to solid, mm, ends free to turn:
 * 0.1 (m^2 - 0.8 m d - 0.2 d^2)/D (EN 13906-1, from memory). Greater than the fixed-end form at every pitch above d, so
 * it is the one to clear.
 */
export function growthAtSolidMm(meanDiameterMm: number, wireDiameterMm: number, coilPitchMm: number): number {
  const growth = (0.1 * (coilPitchMm * coilPitchMm - 0.8 * coilPitchMm * wireDiameterMm - 0.2 * wireDiameterMm * wireDiameterMm)) / meanDiameterMm
  return Math.max(0, growth)
}

/** Outside diameter at solid with the ends kept from turning, mm: sqrt(D^2 + (p^2 - d^2)/pi^2) + d (handbook form, from memory). */
export function outerDiameterAtSolidFixedEndsMm(meanDiameterMm: number, wireDiameterMm: number, pitchMm: number): number {
  const spread = (pitchMm * pitchMm - wireDiameterMm * wireDiameterMm) / (Math.PI * Math.PI)
  return Math.sqrt(meanDiameterMm * meanDiameterMm + Math.max(0, spread)) + wireDiameterMm
}

/** The pitch m the growth formula uses: (L0 - d)/n for ground ends, (L0 - 2.5 d)/n for closed, unground ones. */
export function growthPitchMm(closedUnground: boolean, freeLengthMm: number, wireDiameterMm: number, activeCoils: number): number {
  return (freeLengthMm - (closedUnground ? 2.5 : 1) * wireDiameterMm) / activeCoils
}
