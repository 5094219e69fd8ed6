import { fromSi, unitSymbol } from '../../units/convert'
import { formatAngle, formatLength, formatMoment, formatNumber, formatShare, formatWireDiameter, THIN_SPACE } from '../../units/format'
import { arrow } from './dimensions'
import { lineChartShapes, movingPointShapes, uprightTicks, type LineCharted, type LineFrame } from './line-chart'
import { drawnTorsion, isDrawableTorsion, type DrawnTorsion, type MovedTorsion } from './moved'
import type { Motion, MotionOptions, Reading } from './motion'
import { path, px, text, textWidthPx, type Shape } from './shapes'
import { sliderStops } from './stops'
import { legTurnDeg, loadedLegMm, meanDiameterAtMm, torsionEndShapes, type EndPlacement } from './torsion'

const WIDE_PX = 430
const LEAST_WIDTH_PX = 280
const TALLEST_PX = 230
const THUMB_PX = 28
// The sizes stand in a line above the spring.
const LETTERING_PX = 40

const coils = (count: number): string => formatNumber(count, 2).replace(/\.?0+$/, '')

/** One sentence that names the drawing of a torsion spring for those who do not see it. */
export function torsionSentence(spring: DrawnTorsion, units: MotionOptions['units']): string {
  const { wireDiameterMm: d, meanDiameterMm: D, legs } = spring
  const legWords = legs.length === 0 ? 'no legs' : `legs ${legs.map(leg => formatLength(leg.lengthMm, units)).join(' and ')}`
  return `Torsion spring seen from its end, outside diameter ${formatLength(D + d, units)}, inside diameter ${formatLength(D - d, units)}, wire ${formatWireDiameter(d, units)}, ${coils(spring.bodyCoils)} coils in the body, ${legWords}, ${spring.hand}-hand.`
}

/** The angle it is drawn to: past the last point, up to the limit where that is near. */
function drawnReachDeg({ greatestAngleDeg, points }: MovedTorsion['evaluation']): number {
  const last = Math.max(...points.map(point => point.angleDeg), 0)
  const limit = greatestAngleDeg ?? (last || 90)
  return Math.max(1, last, Math.min(limit, last > 0 ? 2.5 * last : limit))
}

interface Extent { readonly left: number, readonly right: number, readonly top: number, readonly bottom: number }

/** Room that ring and legs take about the axis at any angle from free to `reachDeg`, mm: the scale is the same however it is turned. */
function extentMm(drawn: DrawnTorsion, reachDeg: number): Extent {
  const radius = (Math.max(drawn.meanDiameterMm, meanDiameterAtMm(drawn, reachDeg)) + drawn.wireDiameterMm) / 2
  const half = drawn.wireDiameterMm / 2
  let [left, right, top, bottom] = [-radius, radius, -radius, radius]
  const include = (x: number, y: number) => {
    left = Math.min(left, x - half)
    right = Math.max(right, x + half)
    top = Math.min(top, y - half)
    bottom = Math.max(bottom, y + half)
  }
  const [first, second] = drawn.legs
  if (first?.form === 'tangential') include((drawn.hand === 'left' ? 1 : -1) * first.lengthMm, radius)
  if (second?.form === 'tangential') {
    const steps = Math.min(180, Math.max(2, Math.ceil(reachDeg / 4)))
    for (let i = 0; i <= steps; i++) {
      const { toX, toY } = loadedLegMm(drawn, (reachDeg * i) / steps, second.lengthMm)
      include(toX, toY)
    }
  }
  return { left, right, top, bottom }
}

/** The way from free to where it is held, as an arc about the axis with an arrow. */
function turnArc(drawn: DrawnTorsion, angleDeg: number, place: EndPlacement, radiusPx: number, label: string): Shape[] {
  if (angleDeg < 2) return []
  const mirror = drawn.hand === 'left' ? -1 : 1
  const directionAt = (angle: number) => ((90 - legTurnDeg(drawn, angle)) * Math.PI) / 180
  const at = (angle: number) => [place.xPx + mirror * radiusPx * Math.cos(directionAt(angle)), place.yPx + radiusPx * Math.sin(directionAt(angle))] as const
  const shown = Math.min(angleDeg, 359)
  const steps = Math.max(2, Math.ceil(shown / 4))
  let d = ''
  for (let i = 0; i <= steps; i++) {
    const [x, y] = at((shown * i) / steps)
    d += `${i === 0 ? 'M' : 'L'}${px(x)} ${px(y)}`
  }
  const [endX, endY] = at(shown)
  const [beforeX, beforeY] = at(shown - 1)
  const size = Math.hypot(endX - beforeX, endY - beforeY) || 1
  return [path('dim-line', d), arrow(endX, endY, (endX - beforeX) / size, (endY - beforeY) / size), text('dim-text halo', place.xPx, place.yPx + 5, 'middle', label)]
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
  const extent = extentMm(drawn, reachDeg)
  const pxPerMm = Math.min(TALLEST_PX / (extent.bottom - extent.top), (widthPx - 40) / (extent.right - extent.left))
  const endHeightPx = pxPerMm * (extent.bottom - extent.top)
  const place: EndPlacement = { pxPerMm, xPx: widthPx / 2 - (pxPerMm * (extent.left + extent.right)) / 2, yPx: LETTERING_PX - pxPerMm * extent.top }
  const mostX = reachDeg * 1.06
  const frame: LineFrame = {
    x0Px: leftPx, pxPerX: (widthPx - leftPx - rightPx) / mostX, topPx: LETTERING_PX + endHeightPx + 66, heightPx: options.chartHeightPx ?? (isWide ? 190 : 160), mostX, ...ticks, titleXPx: 2,
  }
  const [, second] = drawn.legs
  // Where the loaded leg points when free, to be compared with.
  const free = loadedLegMm(drawn, 0, second?.form === 'tangential' ? second.lengthMm : drawn.meanDiameterMm * 0.4)
  const line = ({ fromX, fromY, toX, toY }: ReturnType<typeof loadedLegMm>) =>
    `M${px(place.xPx + fromX * place.pxPerMm)} ${px(place.yPx + fromY * place.pxPerMm)}L${px(place.xPx + toX * place.pxPerMm)} ${px(place.yPx + toY * place.pxPerMm)}`
  const still: Shape[] = [
    path('ghost', line(free)),
    path('axis', `M${px(place.xPx - 9)} ${px(place.yPx)}h18M${px(place.xPx)} ${px(place.yPx - 9)}v18`),
    text('dim-text', 2, 24, 'start', `${'\u2300'}${THIN_SPACE}${formatLength(drawn.meanDiameterMm + drawn.wireDiameterMm, units)} outside`),
    text('dim-text', widthPx - 2, 24, 'end', `${formatWireDiameter(drawn.wireDiameterMm, units)} wire`),
    ...lineChartShapes(charted, frame),
  ]
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
        ...torsionEndShapes(drawn, at, place),
        ...turnArc(drawn, at, place, Math.max(12, ((meanDiameterAtMm(drawn, at) - drawn.wireDiameterMm) / 2) * place.pxPerMm - 10), formatAngle(at)),
      ],
      over: movingPointShapes(frame, at, moment(momentAt(at)), null),
    }),
    low: 0,
    high: reachDeg,
    free: 0,
    stops: isCoarse => sliderStops(0, reachDeg, 1, isCoarse),
    slider: { leftPx: frame.x0Px - THUMB_PX / 2, widthPx: frame.pxPerX * reachDeg + THUMB_PX },
    grip: null,
    reading,
    words: { act: 'Turn it', does: 'turns back with', place: 'angle from free', share: 'of the moment allowed' },
    sentence: `${torsionSentence(drawn, units)} Below it, its moment at each angle.`,
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
