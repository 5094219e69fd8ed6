/** What a measured oscillation says, or why it says nothing. */
export type OscillationResult =
  | {
    readonly ok: true
    readonly rateNPerMm: number
    readonly frequencyHz: number
    /** Standard error of the rate from the scatter of the taps, N/mm, and as a share of the rate. */
    readonly standardErrorNPerMm: number
    readonly relativeError: number
    readonly taps: number
    /** A tap that was missed or doubled stands out: the taps should be made again. */
    readonly isIrregular: boolean
  }
  | { readonly ok: false, readonly reason: 'too-few-taps' | 'no-mass' | 'not-in-order' }

/** Taps that are needed before a rate is worked out. */
export const LEAST_TAPS = 8
// A period that differs from the middle one by more than this share is a tap that was missed or doubled.
const IRREGULAR_SHARE = 0.4

/**
 * Rate of a spring from a known mass that bounces on it, N/mm: k = (2 pi f)^2 (m + ms/3), a third of the spring's own mass
 * moving with it (Rayleigh; common practice, no source). `tapTimesS` are the moments of the same point of each swing, seconds; `periodsS`
 * the times between them, one fewer.
 * The frequency is the slope of the straight line through taps and their numbers (least squares), so that the error of one tap
 * weighs little; the error of the rate is twice that of the slope.
 */
export function rateFromOscillation({ massG, springMassG = 0, ...measured }: ({ readonly tapTimesS: readonly number[] } | { readonly periodsS: readonly number[] }) & {
  readonly massG: number
  readonly springMassG?: number | undefined
}): OscillationResult {
  const tapTimesS = 'tapTimesS' in measured ? measured.tapTimesS : momentsOf(measured.periodsS)
  const n = tapTimesS.length
  if (n < LEAST_TAPS) return { ok: false, reason: 'too-few-taps' }
  if (!(massG > 0) || !(springMassG >= 0)) return { ok: false, reason: 'no-mass' }
  const periods = tapTimesS.slice(1).map((time, i) => time - (tapTimesS[i] as number))
  if (periods.some(period => !(period > 0))) return { ok: false, reason: 'not-in-order' }

  const meanNumber = (n - 1) / 2
  const meanTime = tapTimesS.reduce((sum, time) => sum + time, 0) / n
  let squares = 0
  let products = 0
  tapTimesS.forEach((time, i) => {
    squares += (i - meanNumber) ** 2
    products += (i - meanNumber) * (time - meanTime)
  })
  const periodS = products / squares
  const residuals = tapTimesS.reduce((sum, time, i) => sum + (time - meanTime - periodS * (i - meanNumber)) ** 2, 0)
  const periodErrorS = Math.sqrt(residuals / (n - 2) / squares)
  const movingKg = (massG + springMassG / 3) / 1000
  // N/m to N/mm.
  const rateNPerMm = ((2 * Math.PI) / periodS) ** 2 * movingKg / 1000
  const relativeError = (2 * periodErrorS) / periodS
  const middle = [...periods].sort((a, b) => a - b)[Math.floor(periods.length / 2)] as number
  return {
    ok: true, rateNPerMm, frequencyHz: 1 / periodS, standardErrorNPerMm: relativeError * rateNPerMm, relativeError, taps: n,
    isIrregular: periods.some(period => Math.abs(period / middle - 1) > IRREGULAR_SHARE),
  }
}

/** The moments that follow from the times between them, from nought. */
function momentsOf(periodsS: readonly number[]): number[] {
  const moments = [0]
  for (const period of periodsS) moments.push((moments[moments.length - 1] as number) + period)
  return moments
}
