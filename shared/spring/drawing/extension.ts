import { halfCoils, type HelixPart, type Placement } from './half-coils'
import { hasShank, hookLines, shankBendPx, type HookLines, type HookStart } from './hooks'
import type { DrawnExtension } from './moved'
import { path, px, type Shape } from './shapes'
import { crownShapes, edgePx, wireShapes } from './wire'

const TAU = 2 * Math.PI

/** Pitch of the body when the spring is `lengthMm` long inside its hooks, mm: the wire at rest, more when pulled. */
export function bodyPitchMm({ wireDiameterMm, bodyCoils, freeLengthMm }: DrawnExtension, lengthMm: number): number {
  return wireDiameterMm + Math.max(0, lengthMm - freeLengthMm) / bodyCoils
}

/** Turn at which the body begins: loops leave it on the axis, a quarter turn from a crown, half loops and crossed ones at a crown. Left-hand bodies are the mirror image. */
function firstTurn({ hookForm, hand }: DrawnExtension): number {
  const turn = hookForm === 'half-loop' ? 0 : hookForm === 'crossover-loop' ? 0.5 : 0.25
  return hand === 'left' ? (turn + 0.5) % 1 : turn
}

interface Body {
  readonly fromTurn: number
  readonly toTurn: number
  /** Up to the bends into shanks, which begin before the axis. */
  readonly drawnFrom: number
  readonly drawnTo: number
  /** Place along the axis, mm from the inside of the left hook. */
  readonly centre: (turns: number) => number
  readonly left: HookStart
  readonly right: HookStart
}

/** The body and where its hooks begin. Both hooks lie in the plane of the paper, so that the turns shown are whole halves; the body's length is exact. */
function bodyOf(spring: DrawnExtension, lengthMm: number, { pxPerMm, x0Px, axisYPx }: Placement): Body {
  const { wireDiameterMm: d, meanDiameterMm, bodyCoils, hookLengthMm, hookForm } = spring
  const shownTurns = Math.max(1, Math.round(2 * bodyCoils)) / 2
  const fromTurn = firstTurn(spring)
  const toTurn = fromTurn + shownTurns
  const pitch = (bodyPitchMm(spring, lengthMm) * bodyCoils) / shownTurns
  const centre = (turns: number) => hookLengthMm + d / 2 + pitch * (turns - fromTurn)
  const isAtCrown = hookForm === 'half-loop' || hookForm === 'crossover-loop'
  const start = (side: 1 | -1, turn: number): HookStart => {
    const leaves = isAtCrown ? Math.cos(TAU * turn) : side * Math.sin(TAU * turn)
    const shape = { form: hookForm, radiusPx: (meanDiameterMm / 2) * pxPerMm, reachPx: pxPerMm * (hookLengthMm + d), wirePx: d * pxPerMm }
    return { ...shape, side, axisYPx, xPx: x0Px + pxPerMm * centre(turn), bendXPx: x0Px + pxPerMm * centre(turn - side * bendTurns(shape)), fall: leaves < 0 ? -1 : 1 }
  }
  const [left, right] = [start(-1, fromTurn), start(1, toTurn)]
  return { fromTurn, toTurn, drawnFrom: fromTurn + bendTurns(left), drawnTo: toTurn - bendTurns(right), centre, left, right }
}

/** Part of a turn before the axis at which the wire begins to bend into a shank; none without one. */
const bendTurns = (shape: Pick<HookStart, 'form' | 'radiusPx' | 'reachPx' | 'wirePx'>): number => (hasShank(shape) ? Math.asin(shankBendPx(shape) / shape.radiusPx) / TAU : 0)

/** The hooks of a spring as lines, left and right: where they begin and end is where the drawing has them. */
export function extensionHooks(spring: DrawnExtension, lengthMm: number, place: Placement): { readonly left: HookLines, readonly right: HookLines } {
  const { left, right } = bodyOf(spring, lengthMm, place)
  return { left: hookLines(left), right: hookLines(right) }
}

/**
 * An extension spring in side view, `lengthMm` long inside its hooks: the inside of the left hook lies at the place's x0. Far
 * strands, hooks in the middle plane, near strands over them. The hooks keep their shape under load.
 */
export function extensionShapes(spring: DrawnExtension, lengthMm: number, place: Placement): Shape[] {
  const { meanDiameterMm, hand, hookForm } = spring
  const wirePx = spring.wireDiameterMm * place.pxPerMm
  const body = bodyOf(spring, lengthMm, place)
  const { left, right, centre, drawnFrom: fromTurn, drawnTo: toTurn } = body
  const isNear = (half: number) => (half % 2 === 0) === (hand === 'right')
  const isAtCrown = hookForm === 'half-loop' || hookForm === 'crossover-loop'
  // A strand on the far side that runs on into a hook is drawn in front of the far ones, so that one wire is seen
  const lastHalf = Math.ceil(2 * body.toTurn - 1e-9) - 1
  const endsFar = !isAtCrown && !isNear(lastHalf) && lastHalf > Math.floor(2 * body.fromTurn + 1e-9)
  const part = (from: number, to: number): HelixPart => ({ centre, meanDiameterMm, fromTurn: from, toTurn: to, hand })
  const strands = halfCoils(part(fromTurn, endsFar ? lastHalf / 2 : toTurn), place)
  const quarter = endsFar ? halfCoils(part(lastHalf / 2, toTurn), place).far : ''
  const hooks = [hookLines(left), hookLines(right)] as const
  const bodyPx = Math.max(0.6, wirePx - edgePx(wirePx))
  const hookShapes = [
    ...hooks.flatMap(hook => [...wireShapes(hook.path, wirePx, true), path('w-cut', hook.cut)]),
    ...(quarter ? [path('w-body near', `M${px(right.xPx)} ${px(right.axisYPx - 2)}V${px(right.axisYPx + 2)}`, bodyPx)] : []),
  ]
  if (hookForm === 'crossover-loop') {
    // The crossing lies on the body's face: over the strands and the loop's end, round at the crown where it bends out of the coil
    const starts = [left, right]
    const crowns = starts.map(({ xPx, axisYPx, fall, radiusPx }) => `M${px(xPx)} ${px(axisYPx - fall * radiusPx)}h0`).join('')
    const crossings = starts.map(({ xPx, axisYPx, fall, radiusPx }) => `M${px(xPx)} ${px(axisYPx - fall * radiusPx)}V${px(axisYPx)}`).join('')
    const joints = starts.map(({ xPx, axisYPx, fall }) => `M${px(xPx)} ${px(axisYPx - fall)}V${px(axisYPx + fall)}`).join('')
    return [
      ...wireShapes(strands.far, wirePx, false), ...wireShapes(strands.near, wirePx, true), ...crownShapes(strands.crowns, wirePx, true), ...hookShapes,
      path('w-edge near round', crowns, wirePx + edgePx(wirePx)), path('w-edge near', crossings, wirePx + edgePx(wirePx)),
      path('w-body near', crossings, bodyPx), path('w-body near round', crowns, bodyPx), path('w-body near', joints, bodyPx),
    ]
  }
  return [
    ...wireShapes(strands.far, wirePx, false),
    ...wireShapes(quarter, wirePx, true),
    ...hookShapes,
    ...wireShapes(strands.near, wirePx, true),
    ...crownShapes(strands.crowns, wirePx, true),
  ]
}
