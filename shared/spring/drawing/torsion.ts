import { turnedMeanDiameterMm } from '../mechanics/torsion/bending'
import { halfCoils, type Placement } from './half-coils'
import type { DrawnTorsion } from './moved'
import { path, px, type Shape } from './shapes'
import { crownShapes, edgePx, wireShapes } from './wire'

const RAD = Math.PI / 180

/** Where a torsion spring stands in end view: its axis, and the scale. */
export interface EndPlacement {
  readonly pxPerMm: number
  readonly xPx: number
  readonly yPx: number
}

/** Mean diameter of the body at an angle from free, mm. */
export function meanDiameterAtMm({ meanDiameterMm, bodyCoils, bodyShare, loadOpens }: DrawnTorsion, angleDeg: number): number {
  const turns = (angleDeg / 360) * bodyShare
  return turnedMeanDiameterMm(meanDiameterMm, bodyCoils, loadOpens ? -Math.min(turns, bodyCoils / 2) : turns)
}

/**
 * Direction in which the loaded leg leaves the ring, degrees, turned from the first leg's place: the wire runs along the ring from
 * the bottom to the right and up, Nb turns and as much more as it is wound up. Left-hand springs are the mirror image.
 */
export function legTurnDeg({ bodyCoils, loadOpens }: DrawnTorsion, angleDeg: number): number {
  return 360 * bodyCoils + (loadOpens ? -angleDeg : angleDeg)
}

interface LegLine {
  readonly fromX: number
  readonly fromY: number
  readonly toX: number
  readonly toY: number
}

/** The loaded leg in end view, or where it would point if it were bent out: from the ring along the tangent, mm about the axis. */
export function loadedLegMm(spring: DrawnTorsion, angleDeg: number, lengthMm: number): LegLine {
  const radius = meanDiameterAtMm(spring, angleDeg) / 2
  const beta = (90 - legTurnDeg(spring, angleDeg)) * RAD
  const mirror = spring.hand === 'left' ? -1 : 1
  const x = radius * Math.cos(beta)
  const y = radius * Math.sin(beta)
  return { fromX: mirror * x, fromY: y, toX: mirror * (x + lengthMm * Math.sin(beta)), toY: y - lengthMm * Math.cos(beta) }
}

/** A torsion spring seen from its end, turned by an angle from free: the ring, the fixed leg, the loaded leg. */
export function torsionEndShapes(spring: DrawnTorsion, angleDeg: number, place: EndPlacement): Shape[] {
  const { pxPerMm, xPx, yPx } = place
  const wirePx = spring.wireDiameterMm * pxPerMm
  const radiusPx = (meanDiameterAtMm(spring, angleDeg) / 2) * pxPerMm
  const mirror = spring.hand === 'left' ? -1 : 1
  const [first, second] = spring.legs
  const ring = `M${px(xPx + radiusPx)} ${px(yPx)}A${px(radiusPx)} ${px(radiusPx)} 0 1 0 ${px(xPx - radiusPx)} ${px(yPx)}A${px(radiusPx)} ${px(radiusPx)} 0 1 0 ${px(xPx + radiusPx)} ${px(yPx)}`
  let legs = ''
  let balls = ''
  let joints = ''
  const add = (line: LegLine, isAlongAxis: boolean) => {
    const at = (x: number, y: number) => `${px(xPx + x * pxPerMm)} ${px(yPx + y * pxPerMm)}`
    if (isAlongAxis) {
      balls += `M${at(line.fromX, line.fromY)}h0`
      return
    }
    legs += `M${at(line.fromX, line.fromY)}L${at(line.toX, line.toY)}`
    const share = Math.min(1, (1.2 * spring.wireDiameterMm) / Math.max(1e-9, Math.hypot(line.toX - line.fromX, line.toY - line.fromY)))
    joints += `M${at(line.fromX, line.fromY)}L${at(line.fromX + share * (line.toX - line.fromX), line.fromY + share * (line.toY - line.fromY))}`
  }
  if (first) {
    const radius = meanDiameterAtMm(spring, angleDeg) / 2
    add({ fromX: 0, fromY: radius, toX: -mirror * first.lengthMm, toY: radius }, first.form === 'straight')
  }
  if (second) add(loadedLegMm(spring, angleDeg, second.lengthMm), second.form === 'straight')
  return [
    ...wireShapes(legs, wirePx, true),
    ...wireShapes(ring, wirePx, true),
    // The body goes over the joints, so that leg and ring read as one wire.
    ...(joints ? [path('w-body near', joints, Math.max(0.6, wirePx - edgePx(wirePx)))] : []),
    ...wireShapes(balls, wirePx, true, true),
  ]
}

/** A torsion spring in side view, unloaded: the closed body, its left face at the place's x0. */
export function torsionSideShapes({ wireDiameterMm: d, meanDiameterMm, bodyCoils, hand }: DrawnTorsion, place: Placement): Shape[] {
  const strands = halfCoils({ centre: turns => d / 2 + d * turns, meanDiameterMm, fromTurn: 0, toTurn: bodyCoils, hand }, place)
  const wirePx = d * place.pxPerMm
  return [...wireShapes(strands.far, wirePx, false), ...wireShapes(strands.near, wirePx, true), ...crownShapes(strands.crowns, wirePx, true)]
}
