/**
 * Length of wire in a compression spring, mm: the active coils rise by the pitch, the other coils lie flat,
 * n sqrt((pi D)^2 + p^2) + (nt - n) pi D. Computed from the geometry of the helix.
 */
export function wireLengthMm(meanDiameterMm: number, activeCoils: number, totalCoils: number, pitchMm: number): number {
  const turn = Math.PI * meanDiameterMm
  return activeCoils * Math.sqrt(turn * turn + pitchMm * pitchMm) + (totalCoils - activeCoils) * turn
}

/** Mass of a length of round wire, g: pi/4 d^2 L rho. */
export function wireMassG(wireDiameterMm: number, lengthMm: number, densityKgPerM3: number): number {
  return (Math.PI / 4) * wireDiameterMm * wireDiameterMm * lengthMm * densityKgPerM3 * 1e-6
}
