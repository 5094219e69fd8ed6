import type { UnitSystem } from '../../units/convert'
import { formatLength, formatWireDiameter } from '../../units/format'
import { axisAcross, dimensionAcross, dimensionUpright, leader } from './dimensions'
import { isDrawable } from './drawn-spring'
import { bodyPitchMm, extensionShapes } from './extension'
import { figureShapes, type Figure, type FigureOptions } from './figure'
import { drawnCompression, drawnExtension, drawnTorsion, isDrawableExtension, isDrawableTorsion, type DrawnExtension, type DrawnTorsion, type MovedSpring } from './moved'
import { diameterSign, lengthLabel } from './press'
import { extensionSentence } from './pulling'
import { path, px, type Shape } from './shapes'
import { torsionEndShapes, torsionSideShapes } from './torsion'
import { torsionSentence } from './turning'
import { figureSentence } from './words'

/** A still figure with its dimensions, and the sentence that names it. */
export type NamedFigure = Pick<Figure, 'widthPx' | 'heightPx' | 'shapes' | 'pxPerMm'> & { readonly sentence: string }

const LEAST_WIDTH_PX = 280
const LEFT_PX = 52
const RIGHT_PX = 46
const TOP_PX = 42

/** A spring of any kind, unloaded, true to scale with its dimensions, at the width there is; null where it cannot be drawn. */
export function figureOf(design: MovedSpring, options: FigureOptions): NamedFigure | null {
  switch (design.kind) {
    case 'compression': {
      const drawn = drawnCompression(design.spring)
      return isDrawable(drawn) ? { ...figureShapes(drawn, options), sentence: figureSentence(drawn, options.shownLengthMm ?? drawn.freeLengthMm, options.units) } : null
    }
    case 'extension': {
      const drawn = drawnExtension(design)
      return isDrawableExtension(drawn) ? { ...extensionFigure(drawn, options), sentence: extensionSentence(drawn, drawn.freeLengthMm, options.units) } : null
    }
    case 'torsion': {
      const drawn = drawnTorsion(design)
      return isDrawableTorsion(drawn) ? { ...torsionFigure(drawn, options), sentence: torsionSentence(drawn, options.units) } : null
    }
  }
}

const wireLabel = (wireDiameterMm: number, units: UnitSystem) => `${diameterSign}${formatWireDiameter(wireDiameterMm, units, { unit: false })} wire`

function extensionFigure(spring: DrawnExtension, { units, tallestPx = 260, ...options }: FigureOptions): Omit<NamedFigure, 'sentence'> {
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const { wireDiameterMm: d, meanDiameterMm: D, freeLengthMm: L0, hookLengthMm } = spring
  const outerMm = D + d
  const pxPerMm = Math.min((widthPx - LEFT_PX - RIGHT_PX) / (L0 + 2 * d), tallestPx / outerMm)
  const x0Px = LEFT_PX + (widthPx - LEFT_PX - RIGHT_PX - pxPerMm * L0) / 2
  const endPx = x0Px + pxPerMm * L0
  const axisYPx = TOP_PX + (outerMm * pxPerMm) / 2
  const bottomPx = axisYPx + (outerMm * pxPerMm) / 2
  const bodyFromPx = x0Px + pxPerMm * hookLengthMm
  const bodyToPx = endPx - pxPerMm * hookLengthMm
  // A crown at the bottom of the body, as near its middle as there is one.
  const crownTurns = Math.floor(spring.bodyCoils / 2) + 0.5
  const crownPx = bodyFromPx + pxPerMm * (d / 2 + bodyPitchMm(spring, L0) * (crownTurns - 0.25))
  const shapes: Shape[] = [
    axisAcross(x0Px - pxPerMm * d - 14, endPx + pxPerMm * d + 14, axisYPx),
    ...extensionShapes(spring, L0, { pxPerMm, x0Px, axisYPx }),
    ...dimensionUpright({ y1Px: TOP_PX, y2Px: bottomPx, xPx: Math.max(18, x0Px - pxPerMm * d - 18), partPx: [bodyFromPx, bodyFromPx], label: diameterSign + formatLength(outerMm, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: endPx, yPx: TOP_PX - 20, partPx: [axisYPx, axisYPx], label: lengthLabel('0', L0, units) }),
    ...dimensionAcross({ x1Px: bodyFromPx, x2Px: bodyToPx, yPx: bottomPx + 24, partPx: [bottomPx, bottomPx], label: lengthLabel('K', bodyToPx / pxPerMm - bodyFromPx / pxPerMm, units) }),
    ...leader({ fromPx: [crownPx, bottomPx - (d / 4) * pxPerMm], elbowPx: [crownPx + 18, bottomPx + 52], label: wireLabel(d, units) }),
  ]
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(bottomPx + 70)), shapes, pxPerMm }
}

function torsionFigure(spring: DrawnTorsion, { units, tallestPx = 260, ...options }: FigureOptions): Omit<NamedFigure, 'sentence'> {
  const widthPx = Math.max(LEAST_WIDTH_PX, options.widthPx)
  const { wireDiameterMm: d, meanDiameterMm: D, bodyCoils } = spring
  const radiusMm = (D + d) / 2
  const bodyMm = (bodyCoils + 1) * d
  const reachMm = Math.max(radiusMm, ...spring.legs.map(leg => (leg.form === 'tangential' ? Math.hypot(D / 2, leg.lengthMm) + d / 2 : radiusMm)))
  const gapPx = 64
  const roomPx = widthPx - LEFT_PX - 18
  const pxPerMm = Math.min((roomPx - gapPx) / (bodyMm + 2 * reachMm), tallestPx / (2 * reachMm))
  const axisYPx = TOP_PX + reachMm * pxPerMm
  const x0Px = LEFT_PX + (roomPx - gapPx - pxPerMm * (bodyMm + 2 * reachMm)) / 2
  const bodyToPx = x0Px + pxPerMm * bodyMm
  const topPx = axisYPx - radiusMm * pxPerMm
  const bottomPx = axisYPx + radiusMm * pxPerMm
  const endXPx = bodyToPx + gapPx + reachMm * pxPerMm
  const shapes: Shape[] = [
    axisAcross(x0Px - 14, bodyToPx + 14, axisYPx),
    ...torsionSideShapes(spring, { pxPerMm, x0Px, axisYPx }),
    path('axis', `M${px(endXPx - 9)} ${px(axisYPx)}h18M${px(endXPx)} ${px(axisYPx - 9)}v18`),
    ...torsionEndShapes(spring, 0, { pxPerMm, xPx: endXPx, yPx: axisYPx }),
    ...dimensionUpright({ y1Px: topPx, y2Px: bottomPx, xPx: x0Px - 24, partPx: [x0Px - 2, x0Px - 2], label: diameterSign + formatLength(D + d, units, { unit: false }) }),
    ...dimensionAcross({ x1Px: x0Px, x2Px: bodyToPx, yPx: topPx - 20, partPx: [topPx, topPx], label: lengthLabel('K', bodyMm, units) }),
    ...leader({ fromPx: [x0Px + pxPerMm * d * 1.0, bottomPx - (d / 4) * pxPerMm], elbowPx: [x0Px + pxPerMm * d + 18, bottomPx + 28], label: wireLabel(d, units) }),
  ]
  return { widthPx: Number(px(widthPx)), heightPx: Number(px(Math.max(axisYPx + reachMm * pxPerMm + 12, bottomPx + 44))), shapes, pxPerMm }
}
