import { formatAngle } from '../../units/format'
import { dimensionAngle } from './angle-dimension'
import { boxesMeet, labelBox } from './label-place'
import { fixedLegMm, legAngleAt, loadedLegMm, meanDiameterAtMm, turnSense } from './legs'
import type { DrawnTorsion } from './moved'
import { lineH, path, px, symbol, text, type Box, type Shape } from './shapes'
import type { EndPlacement } from './torsion'

/** Under this a turn has no arc. */
const LEAST_SHOWN_DEG = 0.5
/** From the tip of a leg to the lettering of its place. */
const OFF_TIP_PX = 14

const RAD = Math.PI / 180

/** Distance from the axis to the tip of the loaded leg, or to the outside of the ring where it has none to be seen, mm. */
function tipMm(spring: DrawnTorsion): number {
  const [, second] = spring.legs
  const { meanDiameterMm: D, wireDiameterMm: d } = spring
  return second?.form === 'tangential' ? Math.hypot(D / 2, second.lengthMm) : (D + d) / 2
}

/** A line along the loaded leg's place, from one distance off the axis to another; straight out from the axis where it has no leg to be seen. */
function legPiece(spring: DrawnTorsion, angleDeg: number, { pxPerMm, xPx, yPx }: EndPlacement, fromMm: number, toMm: number): string {
  const hasLeg = spring.legs[1]?.form === 'tangential'
  const at = (distanceMm: number) => {
    const angle = legAngleAt(spring, angleDeg, hasLeg ? distanceMm : 0)
    return `${px(xPx + distanceMm * pxPerMm * Math.cos(angle))} ${px(yPx + distanceMm * pxPerMm * Math.sin(angle))}`
  }
  return `M${at(fromMm)}L${at(toMm)}`
}

/** Marks about a spring, and the boxes that their lettering takes. */
interface PlaceMarks {
  readonly shapes: readonly Shape[]
  readonly lettering: readonly Box[]
}

/** Where the loaded leg stands when free and at its working points, by the points' numbers; and what the fixed leg lies on. */
export function placeMarks(spring: DrawnTorsion, anglesDeg: readonly number[], place: EndPlacement): PlaceMarks {
  const { pxPerMm, xPx, yPx } = place
  const { meanDiameterMm: D, wireDiameterMm: d, legs: [first, second] } = spring
  const ringMm = (D + d) / 2
  const hasLeg = second?.form === 'tangential'
  const tip = tipMm(spring)
  // Along the whole leg, or a short way off the ring
  const [fromMm, toMm] = hasLeg ? [Math.min(ringMm, tip), tip] : [D / 2, ringMm + 9 / pxPerMm]
  const shapes: Shape[] = [path('ghost', legPiece(spring, 0, place, fromMm, toMm))]
  const taken: Box[] = []
  anglesDeg.forEach((angleDeg, i) => {
    shapes.push(path('dim-line', legPiece(spring, angleDeg, place, hasLeg ? fromMm : ringMm + 2 / pxPerMm, toMm + (hasLeg ? 4 : 0) / pxPerMm)))
    const { fromX, fromY, toX, toY } = loadedLegMm(spring, angleDeg, 1)
    const angle = hasLeg ? Math.atan2(toY - fromY, toX - fromX) : Math.atan2(fromY, fromX)
    const end = hasLeg ? loadedLegMm(spring, angleDeg, second.lengthMm) : { toX: (fromX * 2 * ringMm) / D, toY: (fromY * 2 * ringMm) / D }
    const offPx = OFF_TIP_PX + (hasLeg ? 0 : 7)
    const at = { xPx: xPx + end.toX * pxPerMm + offPx * Math.cos(angle), yPx: yPx + end.toY * pxPerMm + offPx * Math.sin(angle) + 5, anchor: 'middle' as const }
    const box = labelBox(at, 16)
    if (taken.some(other => boxesMeet(box, other))) return
    taken.push(box)
    shapes.push(text('dim-text halo', at.xPx, at.yPx, 'middle', symbol('\u03B1', String(i + 1))))
  })
  if (first?.form === 'tangential') {
    const { toX, toY } = fixedLegMm(spring, 0, first.lengthMm)
    const tipPx = xPx + toX * pxPerMm
    const innerPx = tipPx + Math.sign(xPx - tipPx) * Math.min(0.45 * first.lengthMm * pxPerMm, 60)
    const [leftPx, rightPx] = [Math.min(tipPx, innerPx), Math.max(tipPx, innerPx)]
    const lowPx = yPx + (toY + d / 2) * pxPerMm + 1
    let hatch = ''
    for (let x = leftPx + 8; x <= rightPx; x += 8) hatch += `M${px(x)} ${px(lowPx)}l-8 8`
    shapes.push(path('hatch', hatch), lineH('plate', leftPx, rightPx, lowPx))
  }
  return { shapes, lettering: taken }
}

/** Where the lettering of an arc may stand, as parts of the way round: first what is clear of the marks' lines. */
function labelParts(angleDeg: number, marksDeg: readonly number[], radiusPx: number): number[] {
  const clearDeg = 16 / radiusPx / RAD
  const isClear = (part: number) => marksDeg.every(mark => Math.abs(mark - part * angleDeg) > clearDeg)
  return [0.5, 0.66, 0.34, 0.8, 0.2].sort((a, b) => Number(isClear(b)) - Number(isClear(a)))
}

/** The way from free to where it is held: an arc about the axis with its angle, across the leg or inside a ring without one. */
export function turnArc(spring: DrawnTorsion, angleDeg: number, marksDeg: readonly number[], avoid: readonly Box[], { pxPerMm, xPx, yPx }: EndPlacement, betweenPx: readonly [left: number, right: number]): Shape[] {
  if (angleDeg < LEAST_SHOWN_DEG) return []
  const { meanDiameterMm: D, wireDiameterMm: d, legs: [, second] } = spring
  const hasLeg = second?.form === 'tangential'
  const distanceMm = hasLeg ? Math.max(0.7 * tipMm(spring), (D + d) / 2 + 12 / pxPerMm) : Math.max(0.2 * D, (meanDiameterAtMm(spring, angleDeg) - d) / 2 - 10 / pxPerMm)
  const fromRad = legAngleAt(spring, 0, distanceMm)
  const wanted = turnSense(spring) * angleDeg * RAD
  // The ring gets narrower or wider as it turns, which moves the leg across the arc a little
  const off = legAngleAt(spring, angleDeg, distanceMm) - fromRad - wanted
  const turnRad = wanted + Math.atan2(Math.sin(off), Math.cos(off))
  return dimensionAngle({ xPx, yPx, radiusPx: distanceMm * pxPerMm, fromRad, turnRad, label: formatAngle(angleDeg), isTurn: true, isInside: !hasLeg, labelAt: hasLeg ? labelParts(angleDeg, marksDeg, distanceMm * pxPerMm) : [0.5], avoid, betweenPx })
}
