import { isDrawable } from './drawn-spring'
import { drawnCompression, type MovedCompression } from './moved'
import type { Motion, MotionOptions } from './motion'
import { clampLength, layoutPress, pressMoving, sliderPlace } from './press'
import { pressSteps } from './press-steps'
import { chartRows, figureSentence, readPress } from './words'

const THUMB_PX = 28

/** A compression spring over its load chart on one length axis; null where it cannot be drawn. */
export function layoutPressing({ spring, evaluation }: MovedCompression, options: MotionOptions): Motion | null {
  const drawn = drawnCompression(spring)
  const { rateNPerMm, solidLengthMm, shortestLengthMm, allowableStressMpa } = evaluation
  if (!isDrawable(drawn) || !(rateNPerMm > 0) || !Number.isFinite(rateNPerMm)) return null
  const toleranceN = (i: number) => evaluation.tolerances.find(one => one.quantity === `force${i + 1}N`)?.plusMinus ?? null
  const points = evaluation.points.map(({ lengthMm, forceN }, i) => ({ lengthMm, forceN, toleranceN: toleranceN(i) }))
  const { units } = options
  const layout = layoutPress({ spring: drawn, rateNPerMm, solidLengthMm, leastWorkingLengthMm: shortestLengthMm, points }, options)
  const { charted, place } = layout
  const outerPx = (drawn.meanDiameterMm + drawn.wireDiameterMm) * place.pxPerMm
  return {
    widthPx: layout.widthPx,
    heightPx: layout.heightPx,
    still: layout.still,
    moving: at => pressMoving(layout, at),
    low: charted.solidLengthMm,
    high: charted.freeLengthMm,
    free: charted.freeLengthMm,
    stops: (isCoarse) => {
      const { last, lengthMmAt, indexOf } = pressSteps(charted, units, isCoarse)
      return { last, at: lengthMmAt, indexOf }
    },
    slider: sliderPlace(layout, THUMB_PX),
    grip: {
      boxAt: at => ({ xPx: place.x0Px + place.pxPerMm * at - 12, yPx: place.axisYPx - outerPx / 2 - 10, widthPx: 26, heightPx: outerPx + 20 }),
      placeOf: xPx => clampLength(charted, (xPx - place.x0Px) / place.pxPerMm),
    },
    reading: (at) => {
      const { length, force, share, state, stateWords } = readPress(drawn, charted, at, units, allowableStressMpa)
      return { where: length, load: force, share, stateWords, tone: state === 'over-stress' ? 'stop' : state === 'too-close' || state === 'solid' ? 'caution' : 'quiet' }
    },
    words: { act: 'Press it', does: 'pushes with', place: 'length of the spring', share: 'of the stress allowed' },
    sentence: `${figureSentence(drawn, drawn.freeLengthMm, units)} Below it, on the same scale, its force at each length.`,
    table: { caption: 'Force at each length', place: 'Length', load: 'Force', rows: chartRows(charted, units) },
  }
}
