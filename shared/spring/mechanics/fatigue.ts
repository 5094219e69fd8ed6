/** Lives below this are not checked for fatigue. */
export const FATIGUE_CYCLES = 1e5
/** The fractions of tensile strength by life end here. */
export const LONGEST_PUBLISHED_LIFE = 1e7

/**
 * Torsional fatigue strength of steel spring wire under 10 mm, independent of size and strength (Zimmerli's data as quoted
 * in Shigley ch. 10): amplitude and mean at unlimited life, MPa.
 */
export const ZIMMERLI_UNPEENED = { amplitudeMpa: 241, meanMpa: 379 } as const
export const ZIMMERLI_PEENED = { amplitudeMpa: 398, meanMpa: 534 } as const
export const ZIMMERLI_THICKEST_WIRE_MM = 10

// Torsional ultimate strength as a fraction of tensile strength (Shigley ch. 10).
const SHEAR_ULTIMATE_FRACTION = 0.67

/** Torsional ultimate strength, MPa: 0.67 Sut. */
export function shearUltimateMpa(tensileStrengthMpa: number): number {
  return SHEAR_ULTIMATE_FRACTION * tensileStrengthMpa
}

/** Goodman's fully reversed strength through a known point of amplitude and mean, MPa: Ssa/(1 - Ssm/Ssu). */
export function goodmanEnduranceMpa(amplitudeMpa: number, meanMpa: number, ultimateMpa: number): number {
  return ultimateMpa > meanMpa ? amplitudeMpa / (1 - meanMpa / ultimateMpa) : 0
}

/** Gerber's fully reversed strength through a known point, MPa: Ssa/(1 - (Ssm/Ssu)^2). */
export function gerberEnduranceMpa(amplitudeMpa: number, meanMpa: number, ultimateMpa: number): number {
  return ultimateMpa > meanMpa ? amplitudeMpa / (1 - (meanMpa / ultimateMpa) ** 2) : 0
}

/** Amplitude allowed on the load line r = amplitude/mean by Goodman, MPa: r Sse Ssu/(r Ssu + Sse). */
export function goodmanAmplitudeMpa(loadLine: number, enduranceMpa: number, ultimateMpa: number): number {
  return (loadLine * enduranceMpa * ultimateMpa) / (loadLine * ultimateMpa + enduranceMpa)
}

/** Amplitude allowed on the load line by Gerber, MPa. */
export function gerberAmplitudeMpa(loadLine: number, enduranceMpa: number, ultimateMpa: number): number {
  const r = loadLine
  return ((r * ultimateMpa) ** 2 / (2 * enduranceMpa)) * (-1 + Math.sqrt(1 + ((2 * enduranceMpa) / (r * ultimateMpa)) ** 2))
}

/**
 * Soderberg-type safety factor of Indian texts (Bhandari ch. 10, Singh ch. 8): 1/n = tm/Ssy + (ta/Se')(2 - Se'/Ssy), with
 * Se' the pulsating limit and the mean stress corrected for direct shear only.
 */
export function soderbergFactor(input: {
  readonly meanStressMpa: number
  readonly amplitudeMpa: number
  readonly pulsatingLimitMpa: number
  readonly shearYieldMpa: number
}): number {
  const { meanStressMpa: tm, amplitudeMpa: ta, pulsatingLimitMpa: se, shearYieldMpa: sy } = input
  return 1 / (tm / sy + (ta / se) * (2 - se / sy))
}

/** Safety factor by Goodman through Zimmerli's point, on the load line of the given stresses. */
export function goodmanZimmerliFactor(amplitudeMpa: number, meanMpa: number, tensileStrengthMpa: number, peened: boolean): number {
  const point = peened ? ZIMMERLI_PEENED : ZIMMERLI_UNPEENED
  const ultimate = shearUltimateMpa(tensileStrengthMpa)
  return factorThroughPoint(amplitudeMpa, meanMpa, ultimate, point.amplitudeMpa, point.meanMpa)
}

// Greatest stress from zero as a fraction of tensile strength, A228 and 302 wire (handbook values, from memory).
const LIFE_FRACTIONS = [
  { decade: 5, unpeened: 0.36, peened: 0.42 },
  { decade: 6, unpeened: 0.33, peened: 0.39 },
  { decade: 7, unpeened: 0.3, peened: 0.36 },
] as const

/** Fraction of tensile strength allowed from zero to greatest stress at a life; straight between decades; over 1e7, where none is published, that of 1e7. */
export function lifeFraction(cycles: number, peened: boolean): number | null {
  if (cycles < 1e5) return null
  const [five, six, seven] = LIFE_FRACTIONS
  const at = (row: (typeof LIFE_FRACTIONS)[number]) => (peened ? row.peened : row.unpeened)
  const decade = Math.log10(cycles)
  if (decade >= 7) return at(seven)
  const [low, high] = decade < 6 ? [five, six] : [six, seven]
  return at(low) + (at(high) - at(low)) * (decade - low.decade)
}

/**
 * Safety factor by the published fractions: the stress allowed from zero is half amplitude, half mean; Goodman's line
 * through that point serves other means (this extension is computed here, not published).
 */
export function lifeFractionFactor(amplitudeMpa: number, meanMpa: number, tensileStrengthMpa: number, cycles: number, peened: boolean): number | null {
  const fraction = lifeFraction(cycles, peened)
  if (fraction === null) return null
  const half = (fraction * tensileStrengthMpa) / 2
  return factorThroughPoint(amplitudeMpa, meanMpa, shearUltimateMpa(tensileStrengthMpa), half, half)
}

function factorThroughPoint(amplitudeMpa: number, meanMpa: number, ultimateMpa: number, pointAmplitudeMpa: number, pointMeanMpa: number): number {
  const endurance = goodmanEnduranceMpa(pointAmplitudeMpa, pointMeanMpa, ultimateMpa)
  if (endurance <= 0) return 0
  return 1 / (amplitudeMpa / endurance + meanMpa / ultimateMpa)
}
