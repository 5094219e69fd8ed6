import { arrow, ARROW_LENGTH_PX, TIGHT_GAP_PX } from './dimensions'
import { bestPlace, boxesMeet, type LabelPlace } from './label-place'
import { path, px, text, textWidthPx, type Box, type Shape, type TextRun } from './shapes'

const TAIL_PX = 18
const TEXT_OFF_PX = 10
/** More than this is not drawn round: the arc would meet itself. */
const MOST_SHOWN = 0.97 * 2 * Math.PI

interface AngleDimension {
  /** Where the two lines meet. */
  readonly xPx: number
  readonly yPx: number
  readonly radiusPx: number
  /** Direction of the first line on the page, radians, y down, and the way from it to the second: positive is clockwise. */
  readonly fromRad: number
  readonly turnRad: number
  readonly label: string | readonly TextRun[]
  /** True for a turn that has been made: an arrow at its end alone. */
  readonly isTurn?: boolean
  /** True where the lettering stands on the side of the corner. */
  readonly isInside?: boolean
  /** Parts of the way round at which the lettering may stand, best first: half where absent. */
  readonly labelAt?: readonly number[]
  /** What the lettering must not lie upon. */
  readonly avoid?: readonly Box[]
  /** Lettering is kept between these. */
  readonly betweenPx: readonly [left: number, right: number]
}

/** An angle as an arc with filled arrows and its lettering level beside it; arrows turn outward in a gap under 26 px. */
export function dimensionAngle({ xPx, yPx, radiusPx, fromRad, turnRad, label, isTurn = false, isInside = false, labelAt = [0.5], avoid = [], betweenPx }: AngleDimension): Shape[] {
  const sense = turnRad < 0 ? -1 : 1
  const turn = Math.min(Math.abs(turnRad), MOST_SHOWN)
  const at = (angle: number, radius = radiusPx) => [xPx + radius * Math.cos(angle), yPx + radius * Math.sin(angle)] as const
  const arc = (a: number, b: number): string => {
    const [[x1, y1], [x2, y2]] = [at(a), at(b)]
    return `M${px(x1)} ${px(y1)}A${px(radiusPx)} ${px(radiusPx)} 0 ${Math.abs(b - a) > Math.PI ? 1 : 0} ${b > a ? 1 : 0} ${px(x2)} ${px(y2)}`
  }
  // An arrow on the arc points along its chord, so that its back lies on the line
  const tip = (angle: number, way: number): Shape => {
    const half = ARROW_LENGTH_PX / radiusPx / 2
    const [x, y] = at(angle)
    return arrow(x, y, -way * Math.sin(angle - way * half), way * Math.cos(angle - way * half))
  }
  const toRad = fromRad + sense * turn
  const gapPx = turn * radiusPx
  const isTight = gapPx < TIGHT_GAP_PX && !isTurn
  const tail = isTight ? TAIL_PX / radiusPx : 0
  const shapes: Shape[] = [path('dim-line', arc(fromRad - sense * tail, toRad + sense * tail))]
  if (!isTurn) shapes.push(tip(fromRad, isTight ? sense : -sense))
  if (!isTurn || gapPx >= ARROW_LENGTH_PX) shapes.push(tip(toRad, isTight ? -sense : sense))
  // Lettering stands on the arc, or past its end where the arc is shorter than the lettering, outside unless told otherwise
  const widthPx = textWidthPx(label)
  const [left, right] = betweenPx
  const labelPlace = (angle: number, side: 1 | -1): LabelPlace => {
    const [x, y] = at(angle, radiusPx + side * TEXT_OFF_PX)
    const [cos, sin] = [side * Math.cos(angle), side * Math.sin(angle)]
    const anchor = cos > 0.35 ? 'start' : cos < -0.35 ? 'end' : 'middle'
    const before = anchor === 'start' ? 0 : anchor === 'end' ? widthPx : widthPx / 2
    return { xPx: Math.min(right - widthPx + before, Math.max(left + before, x)), yPx: y + 5 + 5 * sin, anchor }
  }
  const past = toRad + sense * (tail + 16 / radiusPx)
  const on = gapPx > widthPx + 12 ? labelAt.map(share => fromRad + sense * turn * share) : []
  const side = isInside ? -1 : 1
  const [first = past, ...others] = [...on, past]
  const place = bestPlace([labelPlace(first, side), ...others.map(angle => labelPlace(angle, side)), ...[...on, past].map(angle => labelPlace(angle, side === 1 ? -1 : 1))], widthPx, box => avoid.filter(other => boxesMeet(box, other)).length)
  shapes.push(text('dim-text halo', place.xPx, place.yPx, place.anchor, label))
  return shapes
}
