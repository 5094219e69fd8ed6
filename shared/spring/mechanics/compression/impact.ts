/**
 * Stress of the wave that runs along the wire when an end is moved at a speed, MPa: v sqrt(2 rho G) (EN 13906-1, from memory). Speed in m/s,
 * G in MPa, rho in kg/m3. It adds to the stress of the load where the wave passes.
 */
export function impactStressMpa(speedMPerS: number, shearModulusMpa: number, densityKgPerM3: number): number {
  return speedMPerS * Math.sqrt(2 * densityKgPerM3 * shearModulusMpa * 1e6) * 1e-6
}

/** Greatest speed of an end that goes to and fro evenly, m/s: pi f s for strokes of s at f (harmonic motion). */
export function greatestStrokeSpeedMPerS(strokeMm: number, strokesPerMinute: number): number {
  return (Math.PI * strokesPerMinute * strokeMm) / 60_000
}
