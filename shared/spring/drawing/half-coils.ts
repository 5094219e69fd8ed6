import type { CentreLine } from './drawn-spring'
import { px } from './shapes'

const TAU = 2 * Math.PI

/** Where a spring stands on the drawing: its left face at x0Px, its axis at axisYPx. */
export interface Placement {
  readonly pxPerMm: number
  readonly x0Px: number
  readonly axisYPx: number
}

/** Strands of a helix in side view: one path each for the near and the far ones, and the crowns where near strands are cut. */
export interface HalfCoils {
  readonly near: string
  readonly far: string
  readonly crowns: string
}

export interface HelixPart {
  readonly centre: CentreLine
  readonly meanDiameterMm: number
  readonly fromTurn: number
  readonly toTurn: number
  readonly hand: 'right' | 'left'
}

// A curve piece spans at most an eighth of a turn: a cubic follows the cosine there to 1/1000 of the radius
const PIECE_TURNS = 0.125
const SLOPE_STEP_TURNS = 1e-4
const LEVEL_LEAD_PX = 0.3

/** True at the top and bottom of a coil, where the wire runs level. */
const isLevel = (turns: number): boolean => Math.abs(Math.sin(TAU * turns)) < 1e-6

/**
 * The projected centre line x(t), y = D/2 cos 2 pi t, cut into half coils at the top and bottom, where the wire runs
 * level and a cut across it is upright. Right-hand coils: near strands fall from top to bottom as x grows.
 */
export function halfCoils(part: HelixPart, place: Placement): HalfCoils {
  const { centre, meanDiameterMm, fromTurn, toTurn, hand } = part
  const radiusPx = meanDiameterMm / 2 * place.pxPerMm
  const xAt = (t: number) => place.x0Px + place.pxPerMm * centre(t)
  const yAt = (t: number) => place.axisYPx - radiusPx * Math.cos(TAU * t)
  const xSlope = (t: number) => (xAt(t + SLOPE_STEP_TURNS) - xAt(t - SLOPE_STEP_TURNS)) / (2 * SLOPE_STEP_TURNS)
  const ySlope = (t: number) => TAU * radiusPx * Math.sin(TAU * t)
  const strands = { near: '', far: '' }
  let crowns = ''

  for (let from = fromTurn; from < toTurn - 1e-9;) {
    const half = Math.floor(from * 2 + 1e-9)
    const to = Math.min(toTurn, (half + 1) / 2)
    const side = (half % 2 === 0) === (hand === 'right') ? 'near' : 'far'
    // A short level lead keeps the cut at the crown upright whatever the first piece's direction
    let d = isLevel(from) ? `M${px(xAt(from) - LEVEL_LEAD_PX)} ${px(yAt(from))}H${px(xAt(from))}` : `M${px(xAt(from))} ${px(yAt(from))}`
    for (let a = from; a < to - 1e-9;) {
      const b = Math.min(to, (Math.floor(a / PIECE_TURNS + 1e-9) + 1) * PIECE_TURNS)
      const third = (b - a) / 3
      d += `C${px(xAt(a) + third * xSlope(a))} ${px(yAt(a) + third * ySlope(a))} ${px(xAt(b) - third * xSlope(b))} ${px(yAt(b) - third * ySlope(b))} ${px(xAt(b))} ${px(yAt(b))}`
      a = b
    }
    if (isLevel(to)) d += `H${px(xAt(to) + LEVEL_LEAD_PX)}`
    strands[side] += d
    if (side === 'near') for (const t of [from, to]) if (isLevel(t)) crowns += `M${px(xAt(t))} ${px(yAt(t))}h0`
    from = to
  }
  return { ...strands, crowns }
}
