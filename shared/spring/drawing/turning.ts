import { fromSi, unitSymbol } from '../../units/convert'
import { formatAngle, formatLength, formatMoment, formatNumber, formatShare, formatWireDiameter, THIN_SPACE } from '../../units/format'
import { axisAcross } from './dimensions'
import { endExtentMm, meanDiameterAtMm } from './legs'
import { lineChartShapes, lineX, lineY, nowShape, plumbShapes, uprightTicks, ZONE_PX, type LineCharted, type LineFrame } from './line-chart'
import { drawnTorsion, isDrawableTorsion, type MovedTorsion } from './moved'
import type { Motion, MotionOptions, Reading } from './motion'
import { diameterSign } from './press'
import { lineV, text, textWidthPx, type Shape } from './shapes'
import { sliderStops } from './stops'
import { torsionEndShapes, type EndPlacement } from './torsion'
import { placeMarks, turnArc } from './turn-marks'
import { torsionSentence } from './words'

const WIDE_PX = 430
const LEAST_WIDTH_PX = 280
const TALLEST_PX = 230
const THUMB_PX = 28
/** The sizes stand in a line above the spring. */
const LETTERING_PX = 26
/** Round the spring, for the lettering of its places. */
const MARGIN_PX = 26

/** The angle it is drawn to: past the last point, up to the limit where that is near. */
function drawnReachDeg({ greatestAngleDeg, points }: MovedTorsion['evaluation']): number {
  const last = Math.max(...points.map(point => point.angleDeg), 0)
  const limit = greatestAngleDeg ?? (last || 90)
  return Math.max(1, last, Math.min(limit, last > 0 ? 2.5 * last : limit))
}

/** A torsion spring seen from its end over its moment chart; null where it cannot be drawn. */
export function layoutTurning(design: MovedTorsion, options: MotionOptions): Motion | null {
  const { evaluation } = design
  const drawn = drawnTorsion(design)
  const { rateNmmPerDeg, greatestMomentNmm, greatestAngleDeg } = evaluation
  if (!isDrawableTorsion(drawn) || !(rateNmmPerDeg > 0) || !Number.isFinite(rateNmmPerDeg)) return null
  const { units } = options
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const isWide = widthPx > WIDE_PX
  const reachDeg = drawnReachDeg(evaluation)
  const moment = (Nmm: number) => fromSi(Nmm, 'moment', units)
  const charted: LineCharted = {
    title: 'Moment at each angle', xTitle: 'angle from free, degrees', yTitle: `moment, ${unitSymbol('moment', units)}`, letter: 'M',
    from: { x: 0, y: 0 }, to: { x: reachDeg, y: moment(rateNmmPerDeg * reachDeg) },
    points: evaluation.points.map((point, i) => ({
      x: point.angleDeg, y: moment(point.momentNmm), label: THIN_SPACE + formatMoment(point.momentNmm, units),
      tolerance: moment(evaluation.tolerances.find(one => one.quantity === `moment${i + 1}Nmm`)?.plusMinus ?? 0) || null,
    })),
    limitX: greatestAngleDeg, limitWords: 'over the limit',
  }
  const ticks = uprightTicks(charted)
  const leftPx = Math.max(isWide ? 74 : 54, textWidthPx(formatNumber(ticks.yTicks.at(-1) ?? 0, ticks.yDecimals)) + 14)
  const rightPx = isWide ? 40 : 20
  const extent = endExtentMm(drawn, reachDeg)
  const pxPerMm = Math.min(TALLEST_PX / (extent.bottom - extent.top), (widthPx - 2 * MARGIN_PX) / (extent.right - extent.left))
  const endHeightPx = pxPerMm * (extent.bottom - extent.top)
  const place: EndPlacement = { pxPerMm, xPx: widthPx / 2 - (pxPerMm * (extent.left + extent.right)) / 2, yPx: LETTERING_PX + MARGIN_PX - pxPerMm * extent.top }
  const roomPx = widthPx - leftPx - rightPx
  const mostX = reachDeg * (roomPx / (roomPx - ZONE_PX))
  const frame: LineFrame = {
    x0Px: leftPx, pxPerX: roomPx / mostX, topPx: LETTERING_PX + MARGIN_PX + endHeightPx + 70, heightPx: options.chartHeightPx ?? (isWide ? 190 : 160), mostX, ...ticks, titleXPx: 2,
  }
  const outerPx = ((drawn.meanDiameterMm + drawn.wireDiameterMm) / 2) * pxPerMm
  const still: Shape[] = [
    axisAcross(place.xPx - outerPx - 9, place.xPx + outerPx + 9, place.yPx), lineV('axis', place.xPx, place.yPx - outerPx - 9, place.yPx + outerPx + 9),
    text('dim-text', 2, 18, 'start', `${diameterSign}${formatLength(drawn.meanDiameterMm + drawn.wireDiameterMm, units)} outside`),
    text('dim-text', widthPx - 2, 18, 'end', `${formatWireDiameter(drawn.wireDiameterMm, units)} wire`),
    ...lineChartShapes(charted, frame),
  ]
  const marksDeg = evaluation.points.map(point => point.angleDeg).filter(angleDeg => angleDeg > 0 && angleDeg <= reachDeg)
  const marks = placeMarks(drawn, marksDeg, place)
  const momentAt = (angleDeg: number) => rateNmmPerDeg * angleDeg
  const reading = (at: number): Reading => {
    const share = greatestMomentNmm === null ? null : momentAt(at) / greatestMomentNmm
    const isOver = share !== null && share > 1 + 1e-9
    const inside = formatLength(meanDiameterAtMm(drawn, at) - drawn.wireDiameterMm, units)
    return {
      where: formatAngle(at), load: formatMoment(momentAt(at), units), share: share === null || at < 0.05 ? null : formatShare(share), tone: isOver ? 'stop' : 'quiet',
      stateWords: at < 0.05 ? 'Free: no moment.' : isOver ? 'More stress than the wire is allowed.' : `The coils are ${inside} wide inside.`,
    }
  }
  return {
    widthPx,
    heightPx: frame.topPx + frame.heightPx + 50,
    still,
    moving: at => ({
      under: [
        ...marks.shapes, ...torsionEndShapes(drawn, at, place), ...turnArc(drawn, at, marksDeg, marks.lettering, place, [0, widthPx]),
        ...plumbShapes(frame, at, moment(momentAt(at)), null),
      ],
      over: [nowShape(lineX(frame, at), lineY(frame, moment(momentAt(at))))],
    }),
    low: 0,
    high: reachDeg,
    free: 0,
    stops: isCoarse => sliderStops(0, reachDeg, 1, isCoarse),
    slider: { leftPx: frame.x0Px - THUMB_PX / 2, widthPx: frame.pxPerX * reachDeg + THUMB_PX },
    grip: null,
    reading,
    words: { act: 'Turn it', does: 'turns back with', place: 'angle from free', share: 'of the moment allowed' },
    sentence: `${torsionSentence(drawn, units, 'seen from its end')} Below it, its moment at each angle.`,
    table: {
      caption: 'Moment at each angle', place: 'Angle from free', load: 'Moment',
      rows: [
        { name: 'Free', place: formatAngle(0), load: formatMoment(0, units), tolerance: '' },
        ...evaluation.points.map((point, i) => {
          const plusMinus = evaluation.tolerances.find(one => one.quantity === `moment${i + 1}Nmm`)?.plusMinus
          return { name: `Moment M${i + 1}`, place: formatAngle(point.angleDeg), load: formatMoment(point.momentNmm, units), tolerance: plusMinus ? `±${formatMoment(plusMinus, units)}` : '' }
        }),
        ...(greatestAngleDeg === null || greatestMomentNmm === null ? [] : [{ name: 'Limit of the wire', place: formatAngle(greatestAngleDeg), load: formatMoment(greatestMomentNmm, units), tolerance: '' }]),
      ],
    },
  }
}
