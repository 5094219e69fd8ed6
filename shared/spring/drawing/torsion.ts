import { halfCoils, type Placement } from './half-coils'
import { fixedLegMm, loadedLegMm, meanDiameterAtMm, type LegLine } from './legs'
import type { DrawnTorsion } from './moved'
import { path, px, type Shape } from './shapes'
import { crownShapes, edgePx, wireShapes } from './wire'

/** Where a torsion spring stands in end view: its axis, and the scale. */
export interface EndPlacement {
  readonly pxPerMm: number
  readonly xPx: number
  readonly yPx: number
}

/** A straight piece of wire with its end cut across. */
function cutWire(x1: number, y1: number, x2: number, y2: number, wirePx: number, near: boolean): Shape[] {
  const length = Math.hypot(x2 - x1, y2 - y1)
  if (!(length > 0)) return []
  const [acrossX, acrossY] = [(-(y2 - y1) / length) * (wirePx / 2), ((x2 - x1) / length) * (wirePx / 2)]
  return [
    ...wireShapes(`M${px(x1)} ${px(y1)}L${px(x2)} ${px(y2)}`, wirePx, near),
    path('w-cut', `M${px(x2 + acrossX)} ${px(y2 + acrossY)}L${px(x2 - acrossX)} ${px(y2 - acrossY)}`),
  ]
}

/**
 * A torsion spring seen from its end, turned by an angle from free: the fixed leg behind the ring, the loaded leg in front of it.
 * A leg along the axis is seen end-on; the fixed one lies hidden.
 */
export function torsionEndShapes(spring: DrawnTorsion, angleDeg: number, { pxPerMm, xPx, yPx }: EndPlacement): Shape[] {
  const wirePx = spring.wireDiameterMm * pxPerMm
  const radiusPx = (meanDiameterAtMm(spring, angleDeg) / 2) * pxPerMm
  const [first, second] = spring.legs
  const leg = ({ fromX, fromY, toX, toY }: LegLine, near: boolean) =>
    cutWire(xPx + fromX * pxPerMm, yPx + fromY * pxPerMm, xPx + toX * pxPerMm, yPx + toY * pxPerMm, wirePx, near)
  const ring = `M${px(xPx + radiusPx)} ${px(yPx)}A${px(radiusPx)} ${px(radiusPx)} 0 1 0 ${px(xPx - radiusPx)} ${px(yPx)}A${px(radiusPx)} ${px(radiusPx)} 0 1 0 ${px(xPx + radiusPx)} ${px(yPx)}`
  const shapes: Shape[] = []
  if (first?.form === 'tangential') shapes.push(...leg(fixedLegMm(spring, angleDeg, first.lengthMm), false))
  shapes.push(...wireShapes(ring, wirePx, true))
  if (second) {
    const loaded = loadedLegMm(spring, angleDeg, second.lengthMm)
    if (second.form === 'tangential') shapes.push(...leg(loaded, true))
    else shapes.push(...wireShapes(`M${px(xPx + loaded.fromX * pxPerMm)} ${px(yPx + loaded.fromY * pxPerMm)}h0`, wirePx, true, true))
  }
  return shapes
}

/** Room in side view, mm: along the axis from the body's left face, and above and below the axis, y down. */
export function sideExtentMm(spring: DrawnTorsion): { readonly left: number, readonly right: number, readonly top: number, readonly bottom: number } {
  const { wireDiameterMm: d, meanDiameterMm: D, bodyCoils, legs: [first, second] } = spring
  const radius = (D + d) / 2
  const tipY = second?.form === 'tangential' ? loadedLegMm(spring, 0, second.lengthMm).toY : 0
  return {
    left: second?.form === 'straight' ? -second.lengthMm : 0,
    right: (bodyCoils + 1) * d + (first?.form === 'straight' ? first.lengthMm : 0),
    top: Math.min(-radius, tipY - d / 2), bottom: Math.max(radius, tipY + d / 2),
  }
}

/**
 * A torsion spring in side view, unloaded: the closed body with its left face at the place's x0. It is the end view seen from the
 * right, its front to the left: the loaded leg leaves at the left end, the fixed leg at the right end, at the bottom.
 */
export function torsionSideShapes(spring: DrawnTorsion, place: Placement): Shape[] {
  const { wireDiameterMm: d, meanDiameterMm, bodyCoils, hand, legs: [first, second] } = spring
  const { pxPerMm, x0Px, axisYPx } = place
  const wirePx = d * pxPerMm
  // From the top of a coil; the last turn ends at the bottom, where the fixed leg is
  const fromTurn = (((0.5 - bodyCoils) % 1) + 1) % 1
  const strands = halfCoils({ centre: turns => d / 2 + d * (turns - fromTurn), meanDiameterMm, fromTurn, toTurn: fromTurn + bodyCoils, hand }, place)
  const loaded = loadedLegMm(spring, 0, second?.lengthMm ?? 0)
  const isNear = loaded.fromX + 1e-6 * (loaded.toX - loaded.fromX) >= 0
  const [startX, startY] = [x0Px + (d / 2) * pxPerMm, axisYPx + loaded.fromY * pxPerMm]
  const [endX, endY] = [x0Px + (d / 2 + d * bodyCoils) * pxPerMm, axisYPx + (meanDiameterMm / 2) * pxPerMm]
  const ball = (x: number, y: number) => `M${px(x)} ${px(y)}h0`

  const leg: Shape[] = []
  if (second?.form === 'tangential') {
    const downPx = (loaded.toY - loaded.fromY) * pxPerMm
    leg.push(...(Math.abs(downPx) > wirePx / 2 ? cutWire(startX, startY, startX, startY + downPx, wirePx, isNear) : wireShapes(ball(startX, startY), wirePx, isNear, true)))
  }
  else if (second) {
    // A bend from the coil into the axis' direction, drawn as a round corner over the wire
    leg.push(...wireShapes(ball(startX, startY), wirePx, isNear, true), ...cutWire(startX, startY, startX - second.lengthMm * pxPerMm, startY, wirePx, isNear), ...crownShapes(ball(startX, startY), wirePx, isNear))
  }
  const fixed: Shape[] = []
  if (first?.form === 'straight') fixed.push(...cutWire(endX - 0.3, endY, endX + first.lengthMm * pxPerMm, endY, wirePx, hand === 'right'))
  // A tangential one of a left-hand spring comes towards the viewer
  else if (first && hand === 'left') fixed.push(...wireShapes(ball(endX, endY), wirePx, true, true))
  const nearJoint = isNear && second?.form === 'tangential' ? [path('w-body near', `M${px(startX)} ${px(startY - 1.5)}V${px(startY + 1.5)}`, Math.max(0.6, wirePx - edgePx(wirePx)))] : []
  return [
    ...(isNear ? [] : leg),
    ...wireShapes(strands.far, wirePx, false),
    ...wireShapes(strands.near, wirePx, true), ...crownShapes(strands.crowns, wirePx, true),
    ...(isNear ? leg : []), ...nearJoint,
    ...fixed,
  ]
}
