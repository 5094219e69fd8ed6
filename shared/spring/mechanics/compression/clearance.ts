/**
 * Sum of the least gaps between coils at the shortest working length, mm: Sa = n (0.0015 D^2/d + 0.1 d) for static duty,
 * 1.5 times that for dynamic duty (EN 13906-1, cold coiled, from memory).
 */
export function minimumClearanceMm(meanDiameterMm: number, wireDiameterMm: number, activeCoils: number, dynamic: boolean): number {
  const gaps = activeCoils * ((0.0015 * meanDiameterMm * meanDiameterMm) / wireDiameterMm + 0.1 * wireDiameterMm)
  return dynamic ? 1.5 * gaps : gaps
}
