import { fromSi, toSi, unitSymbol } from '../../units/convert'
import { formatForce, formatLength, formatNumber, formatShare, THIN_SPACE } from '../../units/format'
import { axisAcross, dimensionAcross, dimensionUpright } from './dimensions'
import { extensionShapes } from './extension'
import type { Placement } from './half-coils'
import { lineChartShapes, lineX, lineY, nowShape, plumbShapes, uprightTicks, ZONE_PX, type LineCharted, type LineFrame } from './line-chart'
import { drawnExtension, isDrawableExtension, type MovedExtension } from './moved'
import type { Motion, MotionOptions, Reading } from './motion'
import { diameterSign, lengthLabel } from './press'
import { textWidthPx, type CircleShape, type Shape } from './shapes'
import { sliderStops } from './stops'
import { extensionSentence } from './words'

const WIDE_PX = 430
const LEAST_WIDTH_PX = 280
const TALLEST_PX = 200
const THUMB_PX = 28

/** The length it may be pulled to as it is drawn: past the limit or, where none is known, the last point. */
function drawnReachMm({ insideHooksFreeLengthMm: L0, greatestLengthMm, points }: MovedExtension['evaluation']): number {
  const last = Math.max(...points.map(point => point.lengthMm), L0)
  const limit = greatestLengthMm ?? last
  return Math.max(L0 * 1.02, last, Math.min(limit, L0 + 3 * Math.max(last - L0, L0 / 2)))
}

/** An extension spring over its load chart on one length axis, the inside of its left hook held; null where it cannot be drawn. */
export function layoutPulling(design: MovedExtension, options: MotionOptions): Motion | null {
  const { evaluation } = design
  const drawn = drawnExtension(design)
  const { rateNPerMm, initialTensionN, greatestLengthMm, greatestForceN } = evaluation
  if (!isDrawableExtension(drawn) || !(rateNPerMm > 0) || !Number.isFinite(rateNPerMm)) return null
  const { units } = options
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const isWide = widthPx > WIDE_PX
  const L0 = drawn.freeLengthMm
  const reachMm = drawnReachMm(evaluation)
  const forceAt = (lengthMm: number) => initialTensionN + rateNPerMm * (lengthMm - L0)
  const length = (mm: number) => fromSi(mm, 'length', units)
  const force = (N: number) => fromSi(N, 'force', units)
  const charted: LineCharted = {
    title: 'Pull at each length', xTitle: `length inside the hooks, ${unitSymbol('length', units)}`, yTitle: `force, ${unitSymbol('force', units)}`, letter: 'F',
    from: { x: length(L0), y: force(initialTensionN) }, to: { x: length(reachMm), y: force(forceAt(reachMm)) },
    points: evaluation.points.map(point => ({ x: length(point.lengthMm), y: force(point.forceN), tolerance: null, label: THIN_SPACE + formatForce(point.forceN, units) })),
    limitX: greatestLengthMm === null ? null : length(greatestLengthMm), limitWords: 'over the limit',
  }
  const ticks = uprightTicks(charted)
  const leftPx = Math.max(isWide ? 78 : 56, textWidthPx(formatNumber(ticks.yTicks.at(-1) ?? 0, ticks.yDecimals)) + 14)
  const rightPx = isWide ? 40 : 22
  const outerMm = drawn.meanDiameterMm + drawn.wireDiameterMm
  const roomPx = widthPx - leftPx - rightPx
  // The axis goes on past the reach by the zone over the limit, or by the wire of the right hook
  const pxPerMm = Math.min((roomPx - ZONE_PX) / reachMm, roomPx / (reachMm + drawn.wireDiameterMm), Math.max(TALLEST_PX / outerMm, 140 / reachMm))
  const shownMm = reachMm + ZONE_PX / pxPerMm
  const outerPx = outerMm * pxPerMm
  const place: Placement = { pxPerMm, x0Px: leftPx, axisYPx: 48 + outerPx / 2 }
  const bottomPx = place.axisYPx + outerPx / 2
  const diameter = diameterSign + formatLength(outerMm, units, { unit: false })
  const frame: LineFrame = {
    x0Px: place.x0Px, pxPerX: pxPerMm * toSi(1, 'length', units), topPx: Math.max(bottomPx + 62, place.axisYPx + textWidthPx(diameter) / 2 + 52), heightPx: options.chartHeightPx ?? (isWide ? 190 : 160), mostX: length(shownMm), ...ticks,
    titleXPx: 2,
  }
  const bodyFromPx = place.x0Px + pxPerMm * drawn.hookLengthMm
  const still: Shape[] = [
    ...dimensionUpright({ y1Px: place.axisYPx - outerPx / 2, y2Px: bottomPx, xPx: place.x0Px - (isWide ? 40 : 30), partPx: [bodyFromPx, bodyFromPx], label: diameter }),
    ...dimensionAcross({ x1Px: place.x0Px, x2Px: place.x0Px + pxPerMm * L0, yPx: 24, partPx: [place.axisYPx - outerPx / 2, place.axisYPx - outerPx / 2], label: lengthLabel('0', L0, units) }),
    ...lineChartShapes(charted, frame),
  ]
  // The pins that hold the hooks: they touch the insides, from which lengths are measured
  const pinPx = Math.min(7, Math.max(1.5, 0.3 * drawn.hookLengthMm * pxPerMm), 0.35 * (drawn.meanDiameterMm - drawn.wireDiameterMm) * pxPerMm)
  const pin = (xPx: number, side: 1 | -1): CircleShape => ({ kind: 'circle', look: 'pin', xPx: xPx + side * pinPx, yPx: place.axisYPx, radiusPx: pinPx })
  const reading = (at: number): Reading => {
    const share = greatestForceN === null ? null : forceAt(at) / greatestForceN
    const isFree = at <= L0 * 1.0005
    return {
      where: formatLength(at, units), load: formatForce(forceAt(at), units), share: share === null || isFree ? null : formatShare(share),
      tone: share !== null && share > 1 + 1e-9 ? 'stop' : 'quiet',
      stateWords: isFree ? 'Closed: nothing moves below the initial tension.' : share !== null && share > 1 + 1e-9 ? 'More than body or hooks are allowed.' : 'Within what body and hooks are allowed.',
    }
  }
  return {
    widthPx,
    heightPx: frame.topPx + frame.heightPx + 50,
    still,
    moving: at => ({
      under: [
        axisAcross(place.x0Px - 18, place.x0Px + pxPerMm * at + 22, place.axisYPx),
        ...extensionShapes(drawn, at, place),
        pin(place.x0Px, 1), pin(place.x0Px + pxPerMm * at, -1),
        ...plumbShapes(frame, length(at), force(forceAt(at)), bottomPx + 6),
      ],
      over: [nowShape(lineX(frame, length(at)), lineY(frame, force(forceAt(at))))],
    }),
    low: L0,
    high: reachMm,
    free: L0,
    stops: isCoarse => sliderStops(L0, reachMm, toSi(1, 'length', units), isCoarse),
    slider: { leftPx: place.x0Px + pxPerMm * L0 - THUMB_PX / 2, widthPx: pxPerMm * (reachMm - L0) + THUMB_PX },
    grip: {
      boxAt: at => ({ xPx: place.x0Px + pxPerMm * at - 13, yPx: place.axisYPx - outerPx / 2 - 10, widthPx: 26, heightPx: outerPx + 20 }),
      placeOf: xPx => (xPx - place.x0Px) / pxPerMm,
    },
    reading,
    words: { act: 'Pull it', does: 'pulls with', place: 'length inside the hooks', share: 'of the load allowed' },
    sentence: `${extensionSentence(drawn, L0, units)} Below it, on the same scale, its pull at each length.`,
    table: {
      caption: 'Pull at each length', place: 'Length inside the hooks', load: 'Force',
      rows: [
        { name: 'Free, initial tension', place: formatLength(L0, units), load: formatForce(initialTensionN, units), tolerance: '' },
        ...evaluation.points.map((point, i) => ({ name: `Load F${i + 1}`, place: formatLength(point.lengthMm, units), load: formatForce(point.forceN, units), tolerance: '' })),
        ...(greatestLengthMm === null || greatestForceN === null ? [] : [{ name: 'Limit of body or hooks', place: formatLength(greatestLengthMm, units), load: formatForce(greatestForceN, units), tolerance: '' }]),
      ],
    },
  }
}
