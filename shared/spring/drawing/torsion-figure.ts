import { formatAngle, formatLength, formatWireDiameter } from '../../units/format'
import { dimensionAngle } from './angle-dimension'
import { axisAcross, dimensionAcross, dimensionAlong, dimensionUpright, leader } from './dimensions'
import type { Figure, FigureOptions } from './figure'
import { legCorner } from './leg-corner'
import { endExtentMm, fixedLegMm, freeAngleDeg, loadedLegMm, type Extent, type LegLine } from './legs'
import type { DrawnTorsion } from './moved'
import { diameterSign, lengthLabel } from './press'
import { lineV, px, text, textWidthPx, type Shape } from './shapes'
import { sideExtentMm, torsionEndShapes, torsionSideShapes, type EndPlacement } from './torsion'

const LEAST_WIDTH_PX = 280
/** From this width on the two views stand beside each other. */
const BESIDE_PX = 430
/** A narrow figure that must be lower than this has the end view alone, its sizes in words. */
const LEAST_STACKED_PX = 200
const LEFT_PX = 46
const RIGHT_PX = 16
const TOP_PX = 40
const BOTTOM_PX = 46
/** Between side and end view, beside the lettering of the wire. */
const GAP_PX = 44
/** From one row of dimensions to the next. */
const ROW_PX = 24
/** Dimensions outside the loaded leg. */
const OFF_LEG_PX = 20

/** True where there is room for the side view too: beside the end view or, in a figure that may be tall, under it. */
export const hasSideView = ({ widthPx, tallestPx = 260 }: Pick<FigureOptions, 'widthPx' | 'tallestPx'>): boolean => widthPx >= BESIDE_PX || tallestPx >= LEAST_STACKED_PX

/** The end view with its legs, the angle between them and their lengths. */
function endView(spring: DrawnTorsion, place: EndPlacement, { units }: FigureOptions, widthPx: number): Shape[] {
  const { pxPerMm, xPx, yPx } = place
  const { wireDiameterMm: d, meanDiameterMm: D, legs: [first, second] } = spring
  const outerPx = ((D + d) / 2) * pxPerMm
  const at = (xMm: number, yMm: number): readonly [number, number] => [xPx + xMm * pxPerMm, yPx + yMm * pxPerMm]
  const shapes: Shape[] = [
    axisAcross(xPx - outerPx - 10, xPx + outerPx + 10, yPx), lineV('axis', xPx, yPx - outerPx - 10, yPx + outerPx + 10),
    ...torsionEndShapes(spring, 0, place),
  ]
  if (first?.form === 'tangential') {
    const { toX } = fixedLegMm(spring, 0, first.lengthMm)
    const [tipX] = at(toX, 0)
    shapes.push(...dimensionAcross({ x1Px: Math.min(xPx, tipX), x2Px: Math.max(xPx, tipX), yPx: yPx + outerPx + 26, partPx: [yPx + outerPx, yPx + outerPx], label: formatLength(first.lengthMm, units, { unit: false }) }))
  }
  if (second?.form === 'tangential' && first?.lengthMm !== second.lengthMm) {
    const { fromX, fromY, toX, toY }: LegLine = loadedLegMm(spring, 0, second.lengthMm)
    const out = 2 / D
    shapes.push(...dimensionAlong({
      fromPx: at(fromX, fromY), toPx: at(toX, toY), outward: [fromX * out, fromY * out], partPx: (d / 2) * pxPerMm, offPx: (d / 2) * pxPerMm + OFF_LEG_PX,
      label: formatLength(second.lengthMm, units, { unit: false }), betweenPx: [0, widthPx],
    }))
  }
  const corner = legCorner(spring)
  if (corner) {
    const [cornerX, cornerY] = at(corner.xMm, corner.yMm)
    shapes.push(...corner.extensionsMm.map(({ fromX, fromY, toX, toY }) => {
      const [[x1, y1], [x2, y2]] = [at(fromX, fromY), at(toX, toY)]
      return { kind: 'path' as const, look: 'dim-line', d: `M${px(x1)} ${px(y1)}L${px(x2)} ${px(y2)}` }
    }))
    shapes.push(...dimensionAngle({ xPx: cornerX, yPx: cornerY, radiusPx: corner.radiusMm * pxPerMm, fromRad: corner.fromRad, turnRad: corner.turnRad, label: formatAngle(freeAngleDeg(spring)), betweenPx: [0, widthPx] }))
  }
  return shapes
}

function endFigure(spring: DrawnTorsion, options: FigureOptions, widthPx: number, endMm: Extent): Figure {
  const { units, tallestPx = 260 } = options
  const { wireDiameterMm: d, meanDiameterMm: D } = spring
  const marginPx = 30
  const pxPerMm = Math.min((widthPx - 2 * marginPx) / (endMm.right - endMm.left), tallestPx / (endMm.bottom - endMm.top))
  const place = { pxPerMm, xPx: widthPx / 2 - (pxPerMm * (endMm.left + endMm.right)) / 2, yPx: TOP_PX - pxPerMm * endMm.top }
  const shapes: Shape[] = [
    ...endView(spring, place, options, widthPx),
    text('dim-text', 2, 16, 'start', `${diameterSign}${formatLength(D + d, units, { unit: false })} outside`),
    text('dim-text', widthPx - 2, 16, 'end', `${diameterSign}${formatWireDiameter(d, units, { unit: false })} wire`),
  ]
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(place.yPx + pxPerMm * endMm.bottom + BOTTOM_PX)), shapes, pxPerMm, isInterrupted: false }
}

/** A torsion spring, unloaded: side view and end view with their dimensions, beside each other where there is room, else one over the other; the end view alone where the figure must be low and narrow. */
export function torsionFigure(spring: DrawnTorsion, options: FigureOptions): Figure {
  const { units, tallestPx = 260 } = options
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const { wireDiameterMm: d, meanDiameterMm: D, bodyCoils, legs } = spring
  const side = sideExtentMm(spring)
  const end = endExtentMm(spring, 0)
  const corner = legCorner(spring)
  const endMm = corner ? { left: Math.min(end.left, corner.extent.left), right: Math.max(end.right, corner.extent.right), top: Math.min(end.top, corner.extent.top), bottom: Math.max(end.bottom, corner.extent.bottom) } : end
  if (!hasSideView({ widthPx, tallestPx })) return endFigure(spring, options, widthPx, endMm)
  const isBeside = widthPx >= BESIDE_PX
  const [topMm, bottomMm] = isBeside ? [Math.min(side.top, endMm.top), Math.max(side.bottom, endMm.bottom)] : [Math.min(endMm.top, side.top), Math.max(endMm.bottom, side.bottom)]
  const sideMm = side.right - side.left
  const endWidthMm = endMm.right - endMm.left
  // A dimension of the second leg and the lettering of the angle stand outside what is drawn
  const marginPx = corner || legs.length > 0 ? 30 : 0
  const hasAngleWords = !corner && legs.length > 1 && legs.every(leg => leg.form === 'tangential')
  const label = `${diameterSign}${formatWireDiameter(d, units, { unit: false })} wire`
  const gapPx = GAP_PX + textWidthPx(label)
  const roomPx = widthPx - LEFT_PX - RIGHT_PX
  const pxPerMm = Math.min(isBeside ? (roomPx - gapPx - marginPx) / (sideMm + endWidthMm) : (roomPx - marginPx) / Math.max(sideMm, endWidthMm), tallestPx / (bottomMm - topMm))
  const usedPx = isBeside ? pxPerMm * (sideMm + endWidthMm) + gapPx + marginPx : 0
  const x0Px = isBeside ? LEFT_PX + (roomPx - usedPx) / 2 - pxPerMm * side.left : LEFT_PX + (roomPx - pxPerMm * sideMm) / 2 - pxPerMm * side.left
  const endXPx = isBeside ? x0Px + pxPerMm * side.right + gapPx - pxPerMm * endMm.left : (widthPx - marginPx) / 2 - (pxPerMm * (endMm.left + endMm.right)) / 2
  const endYPx = TOP_PX - pxPerMm * (isBeside ? topMm : endMm.top)
  const axisYPx = isBeside ? endYPx : endYPx + pxPerMm * endMm.bottom + BOTTOM_PX + (hasAngleWords ? ROW_PX : 0) + TOP_PX - pxPerMm * side.top
  const radiusPx = ((D + d) / 2) * pxPerMm
  const bodyToPx = x0Px + pxPerMm * (bodyCoils + 1) * d
  const [topPx, bottomPx] = [axisYPx - radiusPx, axisYPx + radiusPx]
  // The loaded leg goes up or down at the left end: the body's length stands on the other side, the wire's leader at the right end
  const goesDown = side.bottom * pxPerMm > radiusPx + 1
  const lastTop = x0Px + pxPerMm * (d / 2 + d * Math.max(0, bodyCoils - 0.5))
  const elbowX = Math.min(Math.max(lastTop + 8, bodyToPx + 4), widthPx - textWidthPx(label) - 18)
  const left = side.left < 0 ? x0Px + pxPerMm * side.left : x0Px
  // Legs along the axis have a row of their own under the body's length
  const alongAxis: readonly (readonly [x1: number, x2: number, lengthMm: number])[] = [
    ...(legs[1]?.form === 'straight' ? [[left, x0Px, legs[1].lengthMm] as const] : []),
    ...(legs[0]?.form === 'straight' ? [[bodyToPx, x0Px + pxPerMm * side.right, legs[0].lengthMm] as const] : []),
  ]
  const legRowPx = bottomPx + 26 + ROW_PX
  const shapes: Shape[] = [
    axisAcross(left - 10, x0Px + pxPerMm * side.right + 12, axisYPx),
    ...torsionSideShapes(spring, { pxPerMm, x0Px, axisYPx }),
    ...endView(spring, { pxPerMm, xPx: endXPx, yPx: endYPx }, options, widthPx),
    ...dimensionUpright({ y1Px: topPx, y2Px: bottomPx, xPx: Math.max(18, left - 22), partPx: [x0Px - 1, x0Px - 1], label: diameterSign + formatLength(D + d, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: bodyToPx, yPx: goesDown ? topPx - 20 : bottomPx + 26, partPx: goesDown ? [topPx, topPx] : [bottomPx, bottomPx], label: lengthLabel('K', (bodyCoils + 1) * d, units) }),
    ...leader({ fromPx: [lastTop, goesDown ? bottomPx - (d / 4) * pxPerMm : topPx + (d / 4) * pxPerMm], elbowPx: [elbowX, goesDown ? bottomPx + 24 : topPx - 20], label }),
    ...alongAxis.flatMap(([x1Px, x2Px, lengthMm]) => dimensionAcross({ x1Px, x2Px, yPx: legRowPx, partPx: [bottomPx + 31, bottomPx + 31], label: formatLength(lengthMm, units, { unit: false }) })),
    ...(hasAngleWords ? [text('dim-text', Math.min(widthPx - 4, endXPx + radiusPx), endYPx + pxPerMm * end.bottom + BOTTOM_PX + 14, 'end', `legs ${formatAngle(freeAngleDeg(spring))} apart`)] : []),
  ]
  const heightPx = (isBeside ? axisYPx + pxPerMm * bottomMm : axisYPx + pxPerMm * side.bottom) + BOTTOM_PX + (alongAxis.length > 0 || (hasAngleWords && isBeside) ? ROW_PX : 0)
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(heightPx)), shapes, pxPerMm, isInterrupted: false }
}
