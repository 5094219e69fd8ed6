/*
 * A straight wire pulled along its length: why it makes a poor spring. All of it is strained alike, and metal stays elastic only
 * to a fraction of a percent; the wire of a coil twists a little along all its length instead.
 */

const areaMm2 = (radiusMm: number) => Math.PI * radiusMm * radiusMm

/** Rate of a straight wire, N/mm: E A/L. */
export function straightWireRateNPerMm({ youngsModulusMpa, radiusMm, lengthMm }: { readonly youngsModulusMpa: number, readonly radiusMm: number, readonly lengthMm: number }): number {
  return (youngsModulusMpa * areaMm2(radiusMm)) / lengthMm
}

/** Elongation of a straight wire at a stress, mm: L sigma/E. */
export function straightWireElongationMm({ youngsModulusMpa, stressMpa, lengthMm }: { readonly youngsModulusMpa: number, readonly stressMpa: number, readonly lengthMm: number }): number {
  return (lengthMm * stressMpa) / youngsModulusMpa
}

/** Length of straight wire that gives an elongation at a stress, mm: x E/sigma. */
export function straightWireLengthMm({ youngsModulusMpa, stressMpa, elongationMm }: { readonly youngsModulusMpa: number, readonly stressMpa: number, readonly elongationMm: number }): number {
  return (elongationMm * youngsModulusMpa) / stressMpa
}

/** Radius of a straight wire of a length that has a rate, mm: sqrt(R L/(pi E)). */
export function straightWireRadiusMm({ youngsModulusMpa, rateNPerMm, lengthMm }: { readonly youngsModulusMpa: number, readonly rateNPerMm: number, readonly lengthMm: number }): number {
  return Math.sqrt((rateNPerMm * lengthMm) / (Math.PI * youngsModulusMpa))
}

/** Twist of one coil of a helical spring under a load, turns: 8 F D^2/(pi G d^4), by which each active coil turns about its own wire. */
export function twistOfOneCoilTurns({ forceN, meanDiameterMm, shearModulusMpa, wireDiameterMm }: {
  readonly forceN: number
  readonly meanDiameterMm: number
  readonly shearModulusMpa: number
  readonly wireDiameterMm: number
}): number {
  // Torque F D/2 along pi D of wire of polar moment pi d^4/32: an angle of 16 F D^2/(G d^4) radians.
  return (16 * forceN * meanDiameterMm ** 2) / (shearModulusMpa * wireDiameterMm ** 4) / (2 * Math.PI)
}
