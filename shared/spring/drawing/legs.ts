import { turnedMeanDiameterMm } from '../mechanics/torsion/bending'
import type { DrawnTorsion } from './moved'

const RAD = Math.PI / 180

/** Mean diameter of the body at an angle from free, mm. */
export function meanDiameterAtMm({ meanDiameterMm, bodyCoils, bodyShare, loadOpens }: DrawnTorsion, angleDeg: number): number {
  const turns = (angleDeg / 360) * bodyShare
  return turnedMeanDiameterMm(meanDiameterMm, bodyCoils, loadOpens ? -Math.min(turns, bodyCoils / 2) : turns)
}

/**
 * Direction in which the loaded leg leaves the ring, degrees, turned from the first leg's place: the wire runs along the ring from
 * the bottom to the right and up, Nb turns and as much more as it is wound up. Left-hand springs are the mirror image.
 */
export function legTurnDeg({ bodyCoils, loadOpens }: Pick<DrawnTorsion, 'bodyCoils' | 'loadOpens'>, angleDeg: number): number {
  return 360 * bodyCoils + (loadOpens ? -angleDeg : angleDeg)
}

/** A leg in end view, mm about the axis, y down the page. */
export interface LegLine {
  readonly fromX: number
  readonly fromY: number
  readonly toX: number
  readonly toY: number
}

const mirrorOf = ({ hand }: Pick<DrawnTorsion, 'hand'>): 1 | -1 => (hand === 'left' ? -1 : 1)

/** The loaded leg in end view, or where it would point if it were bent out: from the ring along the tangent. */
export function loadedLegMm(spring: DrawnTorsion, angleDeg: number, lengthMm: number): LegLine {
  const radius = meanDiameterAtMm(spring, angleDeg) / 2
  const beta = (90 - legTurnDeg(spring, angleDeg)) * RAD
  const mirror = mirrorOf(spring)
  const x = radius * Math.cos(beta)
  const y = radius * Math.sin(beta)
  return { fromX: mirror * x, fromY: y, toX: mirror * (x + lengthMm * Math.sin(beta)), toY: y - lengthMm * Math.cos(beta) }
}

/** The fixed leg in end view: from the bottom of the ring to the left, or to the right of a left-hand spring. */
export function fixedLegMm(spring: DrawnTorsion, angleDeg: number, lengthMm: number): LegLine {
  const radius = meanDiameterAtMm(spring, angleDeg) / 2
  return { fromX: 0, fromY: radius, toX: -mirrorOf(spring) * lengthMm, toY: radius }
}

/** Where the loaded leg is at a distance from the axis, as an angle on the page in radians, y down: on its tangent, or at the wire itself where that is nearer. */
export function legAngleAt(spring: DrawnTorsion, angleDeg: number, distanceMm: number): number {
  const radius = meanDiameterAtMm(spring, angleDeg) / 2
  const { toX, toY } = loadedLegMm(spring, angleDeg, distanceMm > radius ? Math.sqrt(distanceMm * distanceMm - radius * radius) : 0)
  return Math.atan2(toY, toX)
}

/** The way round the page in which the loaded leg turns under load: 1 clockwise, -1 against it. */
export const turnSense = (spring: Pick<DrawnTorsion, 'hand' | 'loadOpens'>): 1 | -1 => ((spring.hand === 'left') === spring.loadOpens ? -1 : 1)

/** Angle between the directions of the two legs when free, degrees from 0 to 180. */
export function freeAngleDeg(spring: Pick<DrawnTorsion, 'bodyCoils'>): number {
  const turned = (((360 * spring.bodyCoils) % 360) + 360) % 360
  return Math.abs(180 - turned)
}

/** Room in end view about the axis, mm, y down. */
export interface Extent {
  readonly left: number
  readonly right: number
  readonly top: number
  readonly bottom: number
}

/** Room that ring and legs take about the axis at every angle from free to `reachDeg`, so that the scale stays however it is turned. */
export function endExtentMm(spring: DrawnTorsion, reachDeg: number): Extent {
  const radius = (Math.max(spring.meanDiameterMm, meanDiameterAtMm(spring, reachDeg)) + spring.wireDiameterMm) / 2
  const half = spring.wireDiameterMm / 2
  let [left, right, top, bottom] = [-radius, radius, -radius, radius]
  const include = (x: number, y: number) => {
    left = Math.min(left, x - half)
    right = Math.max(right, x + half)
    top = Math.min(top, y - half)
    bottom = Math.max(bottom, y + half)
  }
  const [first, second] = spring.legs
  if (first?.form === 'tangential') include(fixedLegMm(spring, 0, first.lengthMm).toX, 0)
  if (second?.form === 'tangential') {
    const steps = Math.min(180, Math.max(1, Math.ceil(reachDeg / 4)))
    for (let i = 0; i <= steps; i++) {
      const { toX, toY } = loadedLegMm(spring, (reachDeg * i) / steps, second.lengthMm)
      include(toX, toY)
    }
  }
  return { left, right, top, bottom }
}
