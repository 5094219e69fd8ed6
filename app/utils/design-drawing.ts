import type { StoredDesign } from '#shared/schemas/quote'

/** The sizes of a design as `SpringFigure` draws them. */
export function figureProps({ wireDiameterMm, meanDiameterMm, activeCoils, totalCoils, freeLengthMm, ends, hand }: StoredDesign) {
  return { wireDiameterMm, meanDiameterMm, activeCoils, totalCoils, freeLengthMm, ends, hand }
}

/** A design as `SpringPress` draws and presses it, with the loads it gives and their tolerances. */
export function pressProps(design: StoredDesign) {
  const { evaluation } = design
  const toleranceN = (at: number) => evaluation.tolerances.find(one => one.quantity === `force${at + 1}N`)?.plusMinus ?? null
  return {
    ...figureProps(design), rateNPerMm: evaluation.rateNPerMm, solidLengthMm: evaluation.solidLengthMm, leastWorkingLengthMm: evaluation.shortestLengthMm,
    allowableStressMpa: evaluation.allowableStressMpa,
    points: evaluation.points.map(({ lengthMm, forceN }, at) => ({ lengthMm, forceN, toleranceN: toleranceN(at) })),
  }
}
