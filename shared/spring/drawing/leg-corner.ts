import { endExtentMm, fixedLegMm, loadedLegMm, type Extent, type LegLine } from './legs'
import type { DrawnTorsion } from './moved'

/** The angle between free tangential legs, dimensioned where their lines meet: mm about the axis, y down. */
export interface LegCorner {
  readonly xMm: number
  readonly yMm: number
  readonly radiusMm: number
  /** Direction of the fixed leg, and the way to the loaded one, radians, clockwise positive. */
  readonly fromRad: number
  readonly turnRad: number
  /** Lines from a leg's end to the arc, where the leg is shorter. */
  readonly extensionsMm: readonly LegLine[]
  /** Room that the arc takes. */
  readonly extent: Extent
}

/** Legs nearer than this to one line meet too far away, or not at all. */
const LEAST_RAD = (12 / 180) * Math.PI

/** Null without two tangential legs, or where they lie almost in one line. */
export function legCorner(spring: DrawnTorsion): LegCorner | null {
  const { wireDiameterMm: d, meanDiameterMm: D, legs: [first, second] } = spring
  if (first?.form !== 'tangential' || second?.form !== 'tangential') return null
  const fixed = fixedLegMm(spring, 0, first.lengthMm)
  const loaded = loadedLegMm(spring, 0, second.lengthMm)
  const alongFixed = Math.atan2(0, fixed.toX - fixed.fromX)
  const alongLoaded = Math.atan2(loaded.toY - loaded.fromY, loaded.toX - loaded.fromX)
  const apart = alongLoaded - alongFixed
  const turnRad = Math.atan2(Math.sin(apart), Math.cos(apart))
  if (Math.abs(turnRad) < LEAST_RAD || Math.abs(turnRad) > Math.PI - LEAST_RAD) return null
  // The fixed leg's line is level
  const yMm = fixed.toY
  const xMm = loaded.fromX + ((yMm - loaded.fromY) / Math.sin(alongLoaded)) * Math.cos(alongLoaded)
  const offMm = Math.hypot(xMm, yMm)
  if (offMm > 2.5 * D) return null
  const tipMm = (leg: LegLine, angle: number) => (leg.toX - xMm) * Math.cos(angle) + (leg.toY - yMm) * Math.sin(angle)
  const tips = [[tipMm(fixed, alongFixed), alongFixed], [tipMm(loaded, alongLoaded), alongLoaded]] as const
  // Clear of the ring, and on the legs where they are long enough
  const radiusMm = Math.max(0.72 * Math.min(tips[0][0], tips[1][0]), offMm + (D + d) / 2 + 0.16 * D)
  const extensionsMm = tips.flatMap(([reachMm, angle]) => {
    if (reachMm >= radiusMm) return []
    const from = Math.max(reachMm, 0) + 0.06 * D
    const to = radiusMm + 0.12 * D
    return from < to ? [{ fromX: xMm + from * Math.cos(angle), fromY: yMm + from * Math.sin(angle), toX: xMm + to * Math.cos(angle), toY: yMm + to * Math.sin(angle) }] : []
  })
  const legs = endExtentMm(spring, 0)
  let { left, right, top, bottom } = legs
  for (let i = 0; i <= 24; i++) {
    const angle = alongFixed + (turnRad * i) / 24
    const [x, y] = [xMm + radiusMm * Math.cos(angle), yMm + radiusMm * Math.sin(angle)]
    left = Math.min(left, x)
    right = Math.max(right, x)
    top = Math.min(top, y)
    bottom = Math.max(bottom, y)
  }
  return { xMm, yMm, radiusMm, fromRad: alongFixed, turnRad, extensionsMm, extent: { left, right, top, bottom } }
}
