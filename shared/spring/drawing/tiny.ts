import { compressionShapes } from './compression'
import { arrow } from './dimensions'
import { halfCoils } from './half-coils'
import { lineH, path, px, type Shape } from './shapes'
import { wireShapes } from './wire'

/** The way a spring works, as the choice on the order form names it: compression, extension, torsion. */
export type SpringAction = 'push' | 'pull' | 'twist'

/** Size of each small picture. */
export const TINY_PX = { widthPx: 120, heightPx: 64 } as const

const AXIS_Y_PX = 32

function pushing(): Shape[] {
  const spring = { wireDiameterMm: 2.4, meanDiameterMm: 13, activeCoils: 4.5, totalCoils: 6.5, freeLengthMm: 34, ends: 'closed-ground', hand: 'right' } as const
  return [
    ...compressionShapes(spring, 30, { pxPerMm: 2.6, x0Px: 21, axisYPx: AXIS_Y_PX }),
    lineH('force', 2, 11, AXIS_Y_PX), arrow(18, AXIS_Y_PX, 1, 0, 'force-arrow'),
    lineH('force', 109, 118, AXIS_Y_PX), arrow(102, AXIS_Y_PX, -1, 0, 'force-arrow'),
  ]
}

/** A close-wound body; both loops rise from the axis, one wire's circle round, 331 degrees. */
function pulling(): Shape[] {
  const pxPerMm = 2.1
  const wireDiameterMm = 2.2
  const coils = 7
  const wirePx = wireDiameterMm * pxPerMm
  const radiusPx = 6 * pxPerMm
  const place = { pxPerMm, x0Px: 60 - (coils + 1.5) * wirePx / 2, axisYPx: AXIS_Y_PX }
  const centre = (turns: number) => wireDiameterMm * (0.5 + turns)
  const strands = halfCoils({ centre, meanDiameterMm: 12, fromTurn: 0.25, toTurn: coils + 0.25, hand: 'right' }, place)
  const loop = (turns: number, side: 1 | -1) => {
    const startPx = place.x0Px + pxPerMm * centre(turns)
    const middlePx = startPx - side * radiusPx
    const angle = 2 * Math.PI * 0.92
    return `M${px(startPx)} ${AXIS_Y_PX}A${px(radiusPx)} ${px(radiusPx)} 0 1 0 ${px(middlePx + side * radiusPx * Math.cos(angle))} ${px(AXIS_Y_PX - side * radiusPx * Math.sin(angle))}`
  }
  return [
    ...wireShapes(strands.far, wirePx, false),
    ...wireShapes(loop(0.25, 1) + loop(coils + 0.25, -1), wirePx, true),
    ...wireShapes(strands.near, wirePx, true),
  ]
}

/** A ring seen from its end with two legs as tangents. */
function twisting(): Shape[] {
  const radiusPx = 17
  const middle = { xPx: 60, yPx: 37 }
  const { xPx, yPx } = middle
  const ring = `M${xPx + radiusPx} ${yPx}A${radiusPx} ${radiusPx} 0 1 0 ${xPx - radiusPx} ${yPx}A${radiusPx} ${radiusPx} 0 1 0 ${xPx + radiusPx} ${yPx}`
  return [
    ...wireShapes(`M${xPx + radiusPx} ${yPx}V4M${xPx} ${yPx + radiusPx}H8`, 5, true),
    ...wireShapes(ring, 5, true),
    // The body goes over the joints, so that leg and ring read as one wire
    path('w-body near', `M${xPx + radiusPx} ${yPx + 3}V${yPx - 6}M${xPx + 3} ${yPx + radiusPx}H${xPx - 6}`, 3.8),
  ]
}

/** A small picture, 120 by 64 px, of a spring that pushes, pulls or twists. */
export function tinyShapes(action: SpringAction): Shape[] {
  return { push: pushing, pull: pulling, twist: twisting }[action]()
}
