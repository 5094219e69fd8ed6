import { formatLength, formatWireDiameter } from '../../units/format'
import type { UnitSystem } from '../../units/convert'
import { compressionShapes } from './compression'
import { axisAcross, breakLine, dimensionAcross, dimensionUpright, leader } from './dimensions'
import { centreLine, type DrawnSpring } from './drawn-spring'
import { diameterSign, lengthLabel } from './press'
import { px, type Shape } from './shapes'

export interface FigureOptions {
  readonly widthPx: number
  readonly units: UnitSystem
  /** Length at which it is shown; the free length if absent. */
  readonly shownLengthMm?: number
  /** Height that the spring itself may take. */
  readonly tallestPx?: number
}

export interface Figure {
  readonly widthPx: number
  readonly heightPx: number
  readonly shapes: readonly Shape[]
  /** The scale it is drawn at. */
  readonly pxPerMm: number
  /** True if a long thin spring is drawn with its middle left out between break lines. */
  readonly isInterrupted: boolean
}

const LEAST_WIDTH_PX = 280
const LEFT_PX = 52
const RIGHT_PX = 46
const TOP_PX = 42
/** A spring thinner than this on the page is drawn larger and interrupted, so that its coils can be seen. */
const THINNEST_PX = 34
const BREAK_GAP_PX = 12

/** A compression spring in side view with its length, outside and inside diameter and wire, at the width there is. */
export function figureShapes(spring: DrawnSpring, options: FigureOptions): Figure {
  const { units } = options
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const lengthMm = options.shownLengthMm ?? spring.freeLengthMm
  const outerMm = spring.meanDiameterMm + spring.wireDiameterMm
  const innerMm = spring.meanDiameterMm - spring.wireDiameterMm
  const roomPx = widthPx - LEFT_PX - RIGHT_PX
  const wholePxPerMm = Math.min(roomPx / spring.freeLengthMm, (options.tallestPx ?? 260) / outerMm)
  const isInterrupted = outerMm * wholePxPerMm < THINNEST_PX
  const pxPerMm = isInterrupted ? THINNEST_PX / outerMm : wholePxPerMm
  const lengthPx = Math.min(roomPx, pxPerMm * lengthMm)
  const x0Px = LEFT_PX + (roomPx - (isInterrupted ? lengthPx : pxPerMm * spring.freeLengthMm)) / 2
  const endPx = x0Px + lengthPx
  const axisYPx = TOP_PX + outerMm * pxPerMm / 2
  const bottomPx = axisYPx + outerMm * pxPerMm / 2
  const heightPx = bottomPx + 44
  const place = { pxPerMm, x0Px, axisYPx }

  const body = (): Shape[] => {
    if (!isInterrupted || pxPerMm * lengthMm <= roomPx) return compressionShapes(spring, lengthMm, place)
    const cutPx = x0Px + (lengthPx - BREAK_GAP_PX) / 2
    const box = { yPx: 0, heightPx, xPx: x0Px - 2, widthPx: cutPx - x0Px + 2 }
    const far = { ...box, xPx: cutPx + BREAK_GAP_PX, widthPx: endPx + 2 - cutPx - BREAK_GAP_PX }
    return [
      { kind: 'clip', box, shapes: compressionShapes(spring, lengthMm, place) },
      { kind: 'clip', box: far, shapes: compressionShapes(spring, lengthMm, { ...place, x0Px: endPx - pxPerMm * lengthMm }) },
      breakLine(cutPx, TOP_PX - 6, bottomPx + 6),
      breakLine(cutPx + BREAK_GAP_PX, TOP_PX - 6, bottomPx + 6),
    ]
  }
  const topPx = TOP_PX
  const innerRadiusPx = innerMm / 2 * pxPerMm
  const shownFree = Math.abs(lengthMm - spring.freeLengthMm) < spring.freeLengthMm * 1e-6
  const crownXPx = x0Px + pxPerMm * centreLine(spring, lengthMm)(1.5)
  const wireRadiusPx = spring.wireDiameterMm / 2 * pxPerMm
  const shapes: Shape[] = [
    axisAcross(x0Px - 16, endPx + 16, axisYPx),
    ...body(),
    ...dimensionUpright({ y1Px: topPx, y2Px: bottomPx, xPx: x0Px - 24, partPx: [x0Px - 2, x0Px - 2], label: diameterSign + formatLength(outerMm, units, { unit: false }) }),
    ...dimensionUpright({ y1Px: axisYPx - innerRadiusPx, y2Px: axisYPx + innerRadiusPx, xPx: endPx + 30, partPx: [endPx, endPx], label: diameterSign + formatLength(innerMm, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: endPx, yPx: topPx - 20, partPx: [topPx, topPx], label: lengthLabel(shownFree ? '0' : '', lengthMm, units) }),
    ...leader({ fromPx: [crownXPx, bottomPx - wireRadiusPx / 2], elbowPx: [crownXPx + 20, bottomPx + 26], label: `${diameterSign}${formatWireDiameter(spring.wireDiameterMm, units, { unit: false })} wire` }),
  ]
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(heightPx)), shapes, pxPerMm, isInterrupted }
}
