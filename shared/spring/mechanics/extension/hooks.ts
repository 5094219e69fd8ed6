import type { HookForm } from '../../codes'

/** What a hook form takes, for mean diameter D and wire d, mm. */
interface HookShape {
  /** From the body to the inside of the hook. */
  readonly lengthMm: (D: number, d: number) => number
  /** Wire in one hook of that length. */
  readonly wireMm: (D: number, d: number, lengthMm: number) => number
  readonly origin: string
}

const fullLoopLengthMm = (D: number, d: number) => D - d
const fullLoopWireMm = (D: number) => Math.PI * D

/*
 * A full loop adds the inside diameter to the length: L0 = 2(D - d) + (Nb + 1) d (Shigley), and takes about one coil of wire
 * (from memory). The other forms are common practice, no source: half a loop stands half as high, a crossed one as high as
 * a full one, an extended hook has a shank as long as the inside diameter below its loop unless its length is given.
 */
const SHAPES: Readonly<Record<HookForm, HookShape>> = {
  'full-loop': { lengthMm: fullLoopLengthMm, wireMm: fullLoopWireMm, origin: 'full loops, L0 = 2(D - d) + (Nb + 1) d (Shigley)' },
  'half-loop': { lengthMm: (D, d) => (D - d) / 2, wireMm: D => (Math.PI * D) / 2, origin: 'half loops, half as high as full ones (common practice)' },
  'crossover-loop': { lengthMm: fullLoopLengthMm, wireMm: D => Math.PI * D + D / 2, origin: 'crossed loops, as high as full ones (common practice)' },
  'extended-hook': {
    lengthMm: (D, d) => 2 * (D - d),
    wireMm: (D, d, lengthMm) => Math.PI * D + Math.max(0, lengthMm - fullLoopLengthMm(D, d)),
    origin: 'extended hooks, a loop on a shank as long as the inside diameter unless the free length says otherwise (common practice)',
  },
}

/** Usual length of one hook, from the body to its inside, mm. */
export function hookLengthMm(form: HookForm, meanDiameterMm: number, wireDiameterMm: number): number {
  return SHAPES[form].lengthMm(meanDiameterMm, wireDiameterMm)
}

/** Wire in one hook, mm. */
export function hookWireMm(form: HookForm, meanDiameterMm: number, wireDiameterMm: number, lengthMm: number): number {
  return SHAPES[form].wireMm(meanDiameterMm, wireDiameterMm, lengthMm)
}

/** What the form is taken to be, in words with its origin. */
export const hookOrigin = (form: HookForm): string => SHAPES[form].origin

/** Length of the closed body, mm: (Nb + 1) d (Machinery's Handbook). */
export const bodyLengthMm = (bodyCoils: number, wireDiameterMm: number): number => (bodyCoils + 1) * wireDiameterMm

/** Active coils that two hooks are worth: G/E (Shigley, full hooks; taken for the other forms too). */
export const hookCoils = (moduli: number): number => moduli

/** Bending stress at the top of a hook, MPa for 1 N: (K)_A 16 D/(pi d^3) + 4/(pi d^2), C1 = 2 r1/d (Shigley); Infinity where the wire cannot be bent so tightly. */
export function hookBendingMpaPerN(meanDiameterMm: number, wireDiameterMm: number, bendRadiusMm: number): number {
  const d = wireDiameterMm
  const c1 = (2 * bendRadiusMm) / d
  if (!(c1 > 1)) return Infinity
  const factor = (4 * c1 * c1 - c1 - 1) / (4 * c1 * (c1 - 1))
  return (factor * 16 * meanDiameterMm) / (Math.PI * d * d * d) + 4 / (Math.PI * d * d)
}

/** Torsion where a hook leaves the body, MPa for 1 N: (4 C2 - 1)/(4 C2 - 4) 8 D/(pi d^3), C2 = 2 r2/d (Shigley); Infinity as above. */
export function hookTorsionMpaPerN(meanDiameterMm: number, wireDiameterMm: number, sideBendRadiusMm: number): number {
  const d = wireDiameterMm
  const c2 = (2 * sideBendRadiusMm) / d
  if (!(c2 > 1)) return Infinity
  return (((4 * c2 - 1) / (4 * c2 - 4)) * 8 * meanDiameterMm) / (Math.PI * d * d * d)
}

/** Simpler bending stress of a hook, MPa: 32 F rm/(pi d^3) rm/ri (Jindal ex. 8-3); it leaves out the direct tension. */
export function simpleHookBendingMpa(forceN: number, bendRadiusMm: number, wireDiameterMm: number): number {
  return ((32 * forceN * bendRadiusMm) / (Math.PI * wireDiameterMm ** 3)) * (bendRadiusMm / (bendRadiusMm - wireDiameterMm / 2))
}
