import { lineH, lineV, path, px, text, textWidthPx, type PathShape, type Shape, type TextRun } from './shapes'

/** ISO 129 filled arrow, 10 by 3.4 px. */
export const ARROW_LENGTH_PX = 10
const ARROW_HALF_WIDTH_PX = 1.7
/** In a narrower gap the arrows stand outside and point inward. */
export const TIGHT_GAP_PX = 2.6 * ARROW_LENGTH_PX
const TAIL_PX = 20
/** Extension lines begin off the part and run past the arrow. */
const OFF_PART_PX = 2
const PAST_ARROW_PX = 5
const TEXT_ABOVE_PX = 5

/** A filled arrow with its tip at (x, y), pointing along the unit vector (dx, dy). */
export function arrow(xPx: number, yPx: number, dx: number, dy: number, look = 'dim-arrow'): PathShape {
  const backX = xPx - ARROW_LENGTH_PX * dx
  const backY = yPx - ARROW_LENGTH_PX * dy
  const sideX = ARROW_HALF_WIDTH_PX * dy
  const sideY = ARROW_HALF_WIDTH_PX * dx
  return path(look, `M${px(xPx)} ${px(yPx)}L${px(backX + sideX)} ${px(backY - sideY)}L${px(backX - sideX)} ${px(backY + sideY)}Z`)
}

interface DimensionOptions {
  readonly label: string | readonly TextRun[]
  /** Where the part ends, for the extension lines: at the first and at the second arrow; null leaves that line out. */
  readonly partPx: readonly [number | null, number | null]
}

interface AcrossDimension extends DimensionOptions {
  readonly x1Px: number
  readonly x2Px: number
  readonly yPx: number
}

/**
 * A dimension across the page. Arrows turn outward in a gap under 26 px; lettering wider than the gap moves past the
 * right arrow on a longer tail, so that it never lies over another line's arrow.
 */
export function dimensionAcross({ x1Px, x2Px, yPx, label, partPx }: AcrossDimension): Shape[] {
  const shapes: Shape[] = []
  for (const [xPx, partYPx] of [[x1Px, partPx[0]], [x2Px, partPx[1]]] as const) {
    if (partYPx === null) continue
    const away = Math.sign(yPx - partYPx) || 1
    shapes.push(lineV('dim-line', xPx, partYPx + away * OFF_PART_PX, yPx + away * PAST_ARROW_PX))
  }
  const gap = x2Px - x1Px
  const isTight = gap < TIGHT_GAP_PX
  const width = textWidthPx(label)
  const isOutside = width > gap - 6
  const textStart = x2Px + (isTight ? TAIL_PX : 6)
  shapes.push(lineH('dim-line', isTight ? x1Px - TAIL_PX : x1Px, isOutside ? textStart + width : isTight ? x2Px + TAIL_PX : x2Px, yPx))
  shapes.push(arrow(x1Px, yPx, isTight ? 1 : -1, 0), arrow(x2Px, yPx, isTight ? -1 : 1, 0))
  shapes.push(isOutside ? text('dim-text halo', textStart, yPx - TEXT_ABOVE_PX, 'start', label) : text('dim-text', (x1Px + x2Px) / 2, yPx - TEXT_ABOVE_PX, 'middle', label))
  return shapes
}

interface UprightDimension extends DimensionOptions {
  readonly y1Px: number
  readonly y2Px: number
  readonly xPx: number
}

/** A dimension up the page, read from the right; arrows turn outward in a gap under 26 px. */
export function dimensionUpright({ y1Px, y2Px, xPx, label, partPx }: UprightDimension): Shape[] {
  const shapes: Shape[] = []
  for (const [yPx, partXPx] of [[y1Px, partPx[0]], [y2Px, partPx[1]]] as const) {
    if (partXPx === null) continue
    const away = Math.sign(xPx - partXPx) || 1
    shapes.push(lineH('dim-line', partXPx + away * OFF_PART_PX, xPx + away * PAST_ARROW_PX, yPx))
  }
  const isTight = y2Px - y1Px < TIGHT_GAP_PX
  const tail = isTight ? TAIL_PX : 0
  shapes.push(lineV('dim-line', xPx, y1Px - tail, y2Px + tail))
  shapes.push(arrow(xPx, y1Px, 0, isTight ? 1 : -1), arrow(xPx, y2Px, 0, isTight ? -1 : 1))
  shapes.push(text('dim-text', xPx - TEXT_ABOVE_PX, (y1Px + y2Px) / 2, 'middle', label, true))
  return shapes
}

interface AlongDimension {
  readonly fromPx: readonly [x: number, y: number]
  readonly toPx: readonly [x: number, y: number]
  /** Unit vector at right angles to the line, away from the part. */
  readonly outward: readonly [x: number, y: number]
  /** From the line to the part's edge, and to the dimension line. */
  readonly partPx: number
  readonly offPx: number
  readonly label: string
  /** Lettering is kept between these. */
  readonly betweenPx: readonly [left: number, right: number]
}

/** A dimension along a slanting line, its lettering level beside the middle; arrows turn outward in a gap under 26 px. */
export function dimensionAlong({ fromPx: [x1, y1], toPx: [x2, y2], outward: [ox, oy], partPx, offPx, label, betweenPx: [left, right] }: AlongDimension): Shape[] {
  const gap = Math.hypot(x2 - x1, y2 - y1) || 1
  const [dx, dy] = [(x2 - x1) / gap, (y2 - y1) / gap]
  const at = (x: number, y: number, off: number, along = 0) => `${px(x + ox * off + dx * along)} ${px(y + oy * off + dy * along)}`
  const isTight = gap < TIGHT_GAP_PX
  const tail = isTight ? TAIL_PX : 0
  const ends = [[x1, y1], [x2, y2]] as const
  const widthPx = textWidthPx(label)
  const anchor = ox > 0.35 ? 'start' : ox < -0.35 ? 'end' : 'middle'
  const before = anchor === 'start' ? 0 : anchor === 'end' ? widthPx : widthPx / 2
  const [middleX, middleY] = [(x1 + x2) / 2 + ox * (offPx + 7), (y1 + y2) / 2 + oy * (offPx + 7)]
  return [
    path('dim-line', ends.map(([x, y]) => `M${at(x, y, partPx + OFF_PART_PX)}L${at(x, y, offPx + PAST_ARROW_PX)}`).join('')),
    path('dim-line', `M${at(x1, y1, offPx, -tail)}L${at(x2, y2, offPx, tail)}`),
    arrow(x1 + ox * offPx, y1 + oy * offPx, isTight ? dx : -dx, isTight ? dy : -dy), arrow(x2 + ox * offPx, y2 + oy * offPx, isTight ? -dx : dx, isTight ? -dy : dy),
    text('dim-text halo', Math.min(right - widthPx + before, Math.max(left + before, middleX)), middleY + 5 + 5 * oy, anchor, label),
  ]
}

interface Leader {
  readonly fromPx: readonly [x: number, y: number]
  readonly elbowPx: readonly [x: number, y: number]
  readonly label: string | readonly TextRun[]
  /** True where the lettering stands to the left of the elbow. */
  readonly isLeft?: boolean
}

/** A leader from a place on the part to an elbow, and lettering beside it, to the right unless told otherwise. */
export function leader({ fromPx: [xPx, yPx], elbowPx: [elbowX, elbowY], label, isLeft = false }: Leader): Shape[] {
  const length = Math.hypot(xPx - elbowX, yPx - elbowY) || 1
  const side = isLeft ? -1 : 1
  return [
    path('dim-line', `M${px(xPx)} ${px(yPx)}L${px(elbowX)} ${px(elbowY)}H${px(elbowX + side * 12)}`),
    arrow(xPx, yPx, (xPx - elbowX) / length, (yPx - elbowY) / length),
    text('dim-text', elbowX + side * 16, elbowY + 4.5, isLeft ? 'end' : 'start', label),
  ]
}

/** Chain-dotted centre line, past the part at both ends. */
export const axisAcross = (x1Px: number, x2Px: number, yPx: number): PathShape => lineH('axis', x1Px, x2Px, yPx)

/** A long break line (ISO 128): straight up the page with two zigzags, one on a thin part; for a part drawn shortened. */
export function breakLine(xPx: number, y1Px: number, y2Px: number): PathShape {
  const zigzag = (yPx: number) => `V${px(yPx - 4)}L${px(xPx - 5)} ${px(yPx - 2)}L${px(xPx + 5)} ${px(yPx + 2)}L${px(xPx)} ${px(yPx + 4)}`
  const height = y2Px - y1Px
  const places = height < 80 ? [height / 2] : [height / 3, height * 2 / 3]
  return path('break', `M${px(xPx)} ${px(y1Px)}${places.map((place) => zigzag(y1Px + place)).join('')}V${px(y2Px)}`)
}
