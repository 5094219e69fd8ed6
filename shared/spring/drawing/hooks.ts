import type { HookForm } from '../codes'
import { px } from './shapes'

/** A full loop goes 333 degrees round, so that it stops short of the body. */
const LOOP_ANGLE = (333 / 180) * Math.PI
/** The loop on a shank is left open, so that the shank can be seen to join it. */
const OPEN_ANGLE = (318 / 180) * Math.PI
/** Half a loop stops before it meets the body again. */
const HALF_ANGLE = (160 / 180) * Math.PI
/** A loop is drawn round up to this share of the coil's diameter; a longer hook gets a shank. */
const WIDEST_LOOP = 1.25

/** Where a hook leaves the body, in px: the last strand's end, and which way the wire runs there as it leaves. */
export interface HookStart {
  readonly form: HookForm
  /** 1 at the right end, -1 at the left. */
  readonly side: 1 | -1
  /** Centre of the wire at the body's end; on the axis for full loops and shanks, else at the crown. */
  readonly xPx: number
  /** Centre of the wire where it begins to bend into a shank, before the axis; the same as `xPx` for other hooks. */
  readonly bendXPx: number
  readonly axisYPx: number
  /** From the axis to the centre of the wire in the body. */
  readonly radiusPx: number
  /** 1 where the wire leaves downward. */
  readonly fall: 1 | -1
  /** From the start to the centre of the wire at the far side, where it is pulled. */
  readonly reachPx: number
  readonly wirePx: number
}

/** The centre line of a hook, and the line in which its end is cut. */
export interface HookLines {
  readonly path: string
  readonly cut: string
  /** Where the cut lies on the centre line. */
  readonly endPx: readonly [x: number, y: number]
}

const at = (x: number, y: number): string => `${px(x)} ${px(y)}`

/** A cut across the wire: through (x, y), along the unit vector. */
const cutAcross = (x: number, y: number, dx: number, dy: number, wirePx: number): string =>
  `M${at(x - (dx * wirePx) / 2, y - (dy * wirePx) / 2)}L${at(x + (dx * wirePx) / 2, y + (dy * wirePx) / 2)}`

/** An arc of a circle about (x, axis) from the angle it has already gone to `angle`; angles from the body's side, in the way the wire leaves. */
function loopTo(start: HookStart, middleX: number, radius: number, angle: number): HookLines {
  const { side, fall, axisYPx, wirePx } = start
  const [dx, dy] = [-side * Math.cos(angle), fall * Math.sin(angle)]
  const [x, y] = [middleX + radius * dx, axisYPx + radius * dy]
  return { path: `A${px(radius)} ${px(radius)} 0 1 ${side * fall === 1 ? 0 : 1} ${at(x, y)}`, cut: cutAcross(x, y, dx, dy, wirePx), endPx: [x, y] }
}

function fullLoop(start: HookStart): HookLines {
  const { side, xPx, axisYPx, reachPx } = start
  const loop = loopTo(start, xPx + (side * reachPx) / 2, reachPx / 2, LOOP_ANGLE)
  return { ...loop, path: `M${at(xPx, axisYPx)}${loop.path}` }
}

/** The wire turns into the shank by a bend of this radius; the strand is drawn up to where the bend begins. */
export const shankBendPx = ({ wirePx, radiusPx }: Pick<HookStart, 'wirePx' | 'radiusPx'>): number => Math.min(0.6 * radiusPx, Math.max(wirePx, 0.3 * radiusPx))

function onShank(start: HookStart): HookLines {
  const { side, fall, xPx, bendXPx, axisYPx, radiusPx, reachPx, wirePx } = start
  const bend = shankBendPx(start)
  // Shank and loop meet in a second bend, half as wide as the loop: the loop's radius, that bend and the first one use up the reach
  const radius = Math.min(radiusPx, (reachPx - bend) / (1 + Math.SQRT2))
  if (radius < 0.75 * wirePx) return fullLoop(start)
  const second = radius / 2
  const middleX = xPx + side * (reachPx - radius)
  const turnX = middleX - side * Math.SQRT2 * radius
  const share = radius / (radius + second)
  const [meetX, meetY] = [middleX + share * (turnX - middleX), axisYPx + fall * share * second]
  const loop = loopTo(start, middleX, radius, OPEN_ANGLE)
  const isTurning = side * fall === 1
  return {
    ...loop,
    path: `M${at(bendXPx, axisYPx - fall * bend)}A${px(bend)} ${px(bend)} 0 0 ${isTurning ? 0 : 1} ${at(bendXPx + side * bend, axisYPx)}H${px(turnX)}`
      + `A${px(second)} ${px(second)} 0 0 ${isTurning ? 1 : 0} ${at(meetX, meetY)}${loop.path}`,
  }
}

/** From the crown straight over the body's face to the axis, then a full loop. */
function crossed(start: HookStart): HookLines {
  const { xPx, axisYPx, radiusPx, fall } = start
  const loop = fullLoop(start)
  return { ...loop, path: `M${at(xPx, axisYPx - fall * radiusPx)}L${loop.path.slice(1)}` }
}

function halfLoop(start: HookStart): HookLines {
  const { side, fall, xPx, axisYPx, radiusPx, reachPx, wirePx } = start
  const [sin, cos] = [Math.sin(HALF_ANGLE), Math.cos(HALF_ANGLE)]
  const [x, y] = [xPx + side * reachPx * sin, axisYPx - fall * radiusPx * cos]
  const [alongX, alongY] = [side * reachPx * cos, fall * radiusPx * sin]
  const size = Math.hypot(alongX, alongY) || 1
  return {
    path: `M${at(xPx, axisYPx - fall * radiusPx)}A${px(reachPx)} ${px(radiusPx)} 0 0 ${side * fall === 1 ? 1 : 0} ${at(x, y)}`,
    cut: cutAcross(x, y, -alongY / size, alongX / size, wirePx), endPx: [x, y],
  }
}

/** True where the hook is drawn on a shank: an extended hook, and any loop far longer than it is wide. */
export const hasShank = ({ form, reachPx, radiusPx }: Pick<HookStart, 'form' | 'reachPx' | 'radiusPx'>): boolean =>
  form === 'extended-hook' || (form === 'full-loop' && reachPx > 2 * WIDEST_LOOP * radiusPx)

/** The lines of one hook, in the plane of the paper. */
export function hookLines(start: HookStart): HookLines {
  if (hasShank(start)) return onShank(start)
  return start.form === 'half-loop' ? halfLoop(start) : start.form === 'crossover-loop' ? crossed(start) : fullLoop(start)
}
