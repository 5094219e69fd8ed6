import type { CompressionEnds } from '../../codes'

/**
 * Which solid length is meant. `en`: EN 13906-1, with the thickest wire its tolerance allows and 1.5 d for unground ends
 * (from memory). `textbook`: nominal wire, as in Shigley Table 10-1 and Machinery's Handbook. The two differ by 0.5 d for
 * closed, unground ends.
 */
export type SolidLengthConvention = 'en' | 'textbook'

// Coils that do not work: Shigley Table 10-1; EN 13906-1 has n + 2 for closed ends.
const END_COILS: Readonly<Record<CompressionEnds, number>> = { 'closed-ground': 2, 'closed': 2, 'open': 0, 'open-ground': 1 }

/** Wire diameters the solid length has beyond the total coils. */
const SOLID_EXTRA: Readonly<Record<SolidLengthConvention, Readonly<Record<CompressionEnds, number>>>> = {
  // The standard covers closed ends; open ends keep the textbook form.
  en: { 'closed-ground': 0, 'closed': 1.5, 'open': 1, 'open-ground': 0 },
  textbook: { 'closed-ground': 0, 'closed': 1, 'open': 1, 'open-ground': 0 },
}

/** Total coils that go with the active coils where none are stated. */
export function totalCoilsFor(ends: CompressionEnds, activeCoils: number): number {
  return activeCoils + END_COILS[ends]
}

/** Active coils of a spring whose total is counted. */
export function activeCoilsFor(ends: CompressionEnds, totalCoils: number): number {
  return totalCoils - END_COILS[ends]
}

/** Solid length, mm; `wireMm` is the wire the convention asks for: greatest for `en`, nominal for `textbook`. */
export function solidLengthMm(convention: SolidLengthConvention, ends: CompressionEnds, totalCoils: number, wireMm: number): number {
  return (totalCoils + SOLID_EXTRA[convention][ends]) * wireMm
}

/**
 * Pitch of the free spring, mm (Shigley Table 10-1): what the end coils take of the free length is left out, the rest is
 * shared by the coils between.
 */
export function pitchMm(input: {
  readonly ends: CompressionEnds
  readonly freeLengthMm: number
  readonly wireDiameterMm: number
  readonly activeCoils: number
  readonly totalCoils: number
}): number {
  const { ends, freeLengthMm: L0, wireDiameterMm: d, activeCoils: n, totalCoils: nt } = input
  const endCoils = nt - n
  switch (ends) {
    case 'closed-ground': return (L0 - endCoils * d) / n
    case 'closed': return (L0 - (endCoils + 1) * d) / n
    case 'open': return (L0 - d) / n
    case 'open-ground': return L0 / nt
  }
}
