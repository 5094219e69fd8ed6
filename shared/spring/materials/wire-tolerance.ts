// Steel wire suppliers' tables of EN 10270-1 and ISO 8458-2, coiled wire: plus or minus, mm, up to the diameter.
const FINE_WIRE_ROWS = [
  { upToMm: 0.09, plusMinusMm: 0.003 },
  { upToMm: 0.16, plusMinusMm: 0.004 },
  { upToMm: 0.25, plusMinusMm: 0.005 },
  { upToMm: 0.5, plusMinusMm: 0.008 },
] as const

/**
 * Tolerance of the wire's diameter, plus or minus, mm: published rows to 0.5 mm; above that EN 10218-2 class T4,
 * 0.015 sqrt(d) rounded to 0.001 mm (coefficient from memory).
 */
export function wireDiameterToleranceMm(wireDiameterMm: number): number {
  const row = FINE_WIRE_ROWS.find(r => wireDiameterMm <= r.upToMm)
  return row ? row.plusMinusMm : Math.round(15 * Math.sqrt(wireDiameterMm)) / 1000
}

/** Greatest diameter the wire may have, mm: the d_max of EN 13906-1. */
export function greatestWireDiameterMm(wireDiameterMm: number): number {
  return wireDiameterMm + wireDiameterToleranceMm(wireDiameterMm)
}
