import { formatLength, formatWireDiameter } from '../../units/format'
import { axisAcross, breakLine, dimensionAcross, dimensionUpright, leader } from './dimensions'
import { extensionShapes } from './extension'
import type { Figure, FigureOptions } from './figure'
import type { DrawnExtension } from './moved'
import { diameterSign, lengthLabel } from './press'
import { px, textWidthPx, type Shape } from './shapes'

const LEAST_WIDTH_PX = 280
const LEFT_PX = 52
const RIGHT_PX = 46
const TOP_PX = 42
/** A spring thinner than this on the page is drawn larger and interrupted, so that its coils can be seen. */
const THINNEST_PX = 24
const BREAK_GAP_PX = 12

/** An extension spring in side view at a length, free where none is given, with that length inside its hooks, its outside diameter, body and wire. */
export function extensionFigure(spring: DrawnExtension, { units, tallestPx = 260, ...options }: FigureOptions): Figure {
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const { wireDiameterMm: d, meanDiameterMm: D, hookLengthMm } = spring
  const lengthMm = Math.max(spring.freeLengthMm, options.shownLengthMm ?? 0)
  const isFree = lengthMm <= spring.freeLengthMm * (1 + 1e-9)
  const outerMm = D + d
  // Between the insides of the hooks and a wire beyond at each end
  const roomPx = widthPx - LEFT_PX - RIGHT_PX
  const wholePxPerMm = Math.min(roomPx / (lengthMm + 2 * d), tallestPx / outerMm)
  const isInterrupted = outerMm * wholePxPerMm < Math.min(THINNEST_PX, tallestPx)
  const pxPerMm = isInterrupted ? Math.min(THINNEST_PX, tallestPx) / outerMm : wholePxPerMm
  const lengthPx = Math.min(roomPx - 2 * d * pxPerMm, pxPerMm * lengthMm)
  const x0Px = LEFT_PX + (roomPx - lengthPx) / 2
  const endPx = x0Px + lengthPx
  const wirePx = d * pxPerMm
  const axisYPx = TOP_PX + (outerMm * pxPerMm) / 2
  const bottomPx = axisYPx + (outerMm * pxPerMm) / 2
  const heightPx = bottomPx + 66
  const place = { pxPerMm, x0Px, axisYPx }
  const endPlace = { ...place, x0Px: endPx - pxPerMm * lengthMm }

  const body = (): Shape[] => {
    if (lengthPx >= pxPerMm * lengthMm - 0.01) return extensionShapes(spring, lengthMm, place)
    const cutPx = x0Px + (lengthPx - BREAK_GAP_PX) / 2
    return [
      { kind: 'clip', box: { xPx: 0, yPx: 0, widthPx: cutPx, heightPx }, shapes: extensionShapes(spring, lengthMm, place) },
      { kind: 'clip', box: { xPx: cutPx + BREAK_GAP_PX, yPx: 0, widthPx: widthPx - cutPx - BREAK_GAP_PX, heightPx }, shapes: extensionShapes(spring, lengthMm, endPlace) },
      breakLine(cutPx, TOP_PX - 6, bottomPx + 6), breakLine(cutPx + BREAK_GAP_PX, TOP_PX - 6, bottomPx + 6),
    ]
  }
  const bodyFromPx = x0Px + pxPerMm * hookLengthMm
  const bodyToPx = endPx - pxPerMm * hookLengthMm
  const bodyMm = lengthMm - 2 * hookLengthMm
  const label = `${diameterSign}${formatWireDiameter(d, units, { unit: false })} wire`
  const [wireX, wireY] = wirePlace(spring, lengthMm, endPlace)
  const elbowX = Math.max(wireX, bodyToPx + 8)
  const isOutside = elbowX + 16 + textWidthPx(label) <= widthPx
  const shapes: Shape[] = [
    axisAcross(x0Px - wirePx - 14, endPx + wirePx + 14, axisYPx),
    ...body(),
    ...dimensionUpright({ y1Px: TOP_PX, y2Px: bottomPx, xPx: Math.max(20, x0Px - wirePx - 18), partPx: [bodyFromPx, bodyFromPx], label: diameterSign + formatLength(outerMm, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: endPx, yPx: TOP_PX - 20, partPx: [axisYPx, axisYPx], label: lengthLabel(isFree ? '0' : '', lengthMm, units) }),
    ...dimensionAcross({ x1Px: bodyFromPx, x2Px: bodyToPx, yPx: bottomPx + 24, partPx: [bottomPx, bottomPx], label: lengthLabel('K', bodyMm, units) }),
    ...leader({ fromPx: [wireX, wireY], elbowPx: [elbowX + (isOutside ? 6 : 0), bottomPx + 50], label, isLeft: !isOutside }),
  ]
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(heightPx)), shapes, pxPerMm, isInterrupted }
}

/** A place on the right hook from which a leader can go straight down: its wire, low and outward. */
function wirePlace(spring: DrawnExtension, lengthMm: number, place: { readonly pxPerMm: number, readonly x0Px: number, readonly axisYPx: number }): readonly [x: number, y: number] {
  const { pxPerMm, x0Px, axisYPx } = place
  const { meanDiameterMm: D, wireDiameterMm: d, hookLengthMm, hookForm } = spring
  const farX = x0Px + pxPerMm * (lengthMm + d / 2)
  if (hookForm === 'half-loop') {
    const reachPx = pxPerMm * (hookLengthMm + d)
    return [farX - reachPx * (1 - Math.SQRT1_2), axisYPx + (Math.SQRT1_2 * pxPerMm * D) / 2]
  }
  // The loop is as wide as the hook reaches, or as the coil where it stands on a shank; its end is on the body's side
  const radiusPx = Math.min((pxPerMm * D) / 2, (pxPerMm * (hookLengthMm + d)) / (hookForm === 'extended-hook' ? 2.7 : 2))
  return [farX - radiusPx * (1 - Math.SQRT1_2), axisYPx + radiusPx * Math.SQRT1_2]
}
