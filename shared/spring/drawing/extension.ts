import { halfCoils, type Placement } from './half-coils'
import type { DrawnExtension } from './moved'
import { px, type Shape } from './shapes'
import { crownShapes, wireShapes } from './wire'

/** A full loop goes 333 degrees round, so that it stops short of the body. */
const LOOP_SHARE = 333 / 360
// The first and the last strand end on the axis, a quarter turn from a crown.
const FROM_TURN = 0.25

/** Pitch of the body when the spring is `lengthMm` long inside its hooks, mm: the wire at rest, more when pulled. */
export function bodyPitchMm({ wireDiameterMm, bodyCoils, freeLengthMm }: DrawnExtension, lengthMm: number): number {
  return wireDiameterMm + Math.max(0, lengthMm - freeLengthMm) / bodyCoils
}

interface Hook {
  readonly path: string
  /** Centre of the wire at the far side of the hook, where it is pulled. */
  readonly farPx: number
}

/** One hook: `side` is -1 at the left end. `startPx` is where it leaves the body on the axis. */
function hook(spring: DrawnExtension, place: Placement, startPx: number, side: 1 | -1): Hook {
  const { hookForm, hookLengthMm, wireDiameterMm, meanDiameterMm } = spring
  const { pxPerMm, axisYPx } = place
  const radiusPx = (meanDiameterMm / 2) * pxPerMm
  // The inside of the hook is a hook length from the body's face, half a wire beyond the start.
  const farPx = startPx + side * pxPerMm * (hookLengthMm + wireDiameterMm)
  const at = (xPx: number, yPx: number) => `${px(xPx)} ${px(yPx)}`
  const loop = (fromPx: number, toPx: number) => {
    const r = Math.abs(toPx - fromPx) / 2
    const middle = (fromPx + toPx) / 2
    const angle = 2 * Math.PI * LOOP_SHARE
    const endX = middle - side * r * Math.cos(angle)
    const endY = axisYPx + side * r * Math.sin(angle)
    return `M${at(fromPx, axisYPx)}A${px(r)} ${px(r)} 0 1 0 ${at(endX, endY)}`
  }
  switch (hookForm) {
    case 'full-loop': return { farPx, path: loop(startPx, farPx) }
    case 'crossover-loop': return { farPx, path: `M${at(startPx, axisYPx - side * radiusPx)}L${at(startPx, axisYPx)}${loop(startPx, farPx)}` }
    case 'extended-hook': {
      const neckPx = farPx - side * Math.min(2 * radiusPx, Math.abs(farPx - startPx))
      return { farPx, path: `M${at(startPx, axisYPx)}L${at(neckPx, axisYPx)}${loop(neckPx, farPx)}` }
    }
    case 'half-loop': {
      const bulgePx = Math.abs(farPx - startPx)
      const sweep = side === 1 ? 1 : 0
      return { farPx, path: `M${at(startPx, axisYPx - radiusPx)}A${px(bulgePx)} ${px(radiusPx)} 0 0 ${sweep} ${at(startPx + side * bulgePx * 0.42, axisYPx + radiusPx * 0.907)}` }
    }
  }
}

/**
 * An extension spring in side view, `lengthMm` long inside its hooks: the inside of the left hook lies at the place's x0. Far
 * strands, hooks, near strands over them. The hooks keep their shape under load.
 */
export function extensionShapes(spring: DrawnExtension, lengthMm: number, place: Placement): Shape[] {
  const { wireDiameterMm: d, meanDiameterMm, bodyCoils, hookLengthMm, hand } = spring
  const pitch = bodyPitchMm(spring, lengthMm)
  const wirePx = d * place.pxPerMm
  const centre = (turns: number) => hookLengthMm + d / 2 + pitch * (turns - FROM_TURN)
  const toTurn = FROM_TURN + bodyCoils
  const strands = halfCoils({ centre, meanDiameterMm, fromTurn: FROM_TURN, toTurn, hand }, place)
  const left = hook(spring, place, place.x0Px + place.pxPerMm * centre(FROM_TURN), -1)
  const right = hook(spring, place, place.x0Px + place.pxPerMm * (lengthMm - hookLengthMm - d / 2), 1)
  return [
    ...wireShapes(strands.far, wirePx, false),
    ...wireShapes(left.path + right.path, wirePx, true, true),
    ...wireShapes(strands.near, wirePx, true),
    ...crownShapes(strands.crowns, wirePx, true),
  ]
}
