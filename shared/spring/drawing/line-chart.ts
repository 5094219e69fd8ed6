import { hatchBox } from './hatch'
import { niceStep, stepDecimals, ticksTo } from './scale'
import { formatNumber } from '../../units/format'
import { bestPlace, boxesMeet, labelBox, lineMeetsBox, type LabelPlace } from './label-place'
import { lineH, lineV, path, px, symbol, text, textWidthPx, type Box, type PathShape, type Shape } from './shapes'

/** A point that is asked for, in the units shown; the tolerance is plus or minus. */
export interface ChartPoint {
  readonly x: number
  readonly y: number
  readonly tolerance: number | null
  readonly label: string
}

/** A straight line in the units shown, with its working points and the limit beyond which it must not go. */
export interface LineCharted {
  readonly title: string
  readonly xTitle: string
  readonly yTitle: string
  readonly letter: string
  readonly from: { readonly x: number, readonly y: number }
  readonly to: { readonly x: number, readonly y: number }
  readonly points: readonly ChartPoint[]
  /** Where the zone that must not be entered begins; null where no limit is known. */
  readonly limitX: number | null
  readonly limitWords: string
}

/** Where the values fall on the drawing. */
export interface LineFrame {
  readonly x0Px: number
  readonly pxPerX: number
  readonly topPx: number
  readonly heightPx: number
  readonly mostX: number
  readonly yTicks: readonly number[]
  readonly yDecimals: number
  readonly titleXPx: number
}

/** Ticks of the upright axis, past everything shown. */
export function uprightTicks({ to, points }: Pick<LineCharted, 'to' | 'points'>): { readonly yTicks: number[], readonly yDecimals: number } {
  const greatest = Math.max(to.y * 1.04, ...points.map(point => point.y + (point.tolerance ?? 0)), 1e-9)
  const step = niceStep(greatest / 5)
  return { yTicks: ticksTo(Math.max(1, Math.ceil(greatest / step - 1e-9)) * step, step), yDecimals: stepDecimals(step) }
}

export const lineX = (frame: Pick<LineFrame, 'x0Px' | 'pxPerX'>, x: number): number => frame.x0Px + frame.pxPerX * x
export const lineY = ({ topPx, heightPx, yTicks }: Pick<LineFrame, 'topPx' | 'heightPx' | 'yTicks'>, y: number): number => topPx + heightPx * (1 - y / (yTicks.at(-1) ?? 1))

function axes(charted: LineCharted, frame: LineFrame): Shape[] {
  const { topPx, heightPx, x0Px, pxPerX, mostX } = frame
  const bottomPx = topPx + heightPx
  const endPx = lineX(frame, mostX)
  const shapes: Shape[] = []
  for (const tick of frame.yTicks) {
    const yPx = lineY(frame, tick)
    shapes.push(lineH(tick ? 'gridline' : 'base', x0Px, endPx, yPx), text('tick', x0Px - 8, yPx + 4.5, 'end', formatNumber(tick, frame.yDecimals)))
  }
  const step = niceStep(44 / pxPerX)
  for (const tick of ticksTo(mostX, step)) {
    const xPx = lineX(frame, tick)
    shapes.push(lineV('base', xPx, bottomPx, bottomPx + 8), text('tick', xPx, bottomPx + 23, 'middle', formatNumber(tick, stepDecimals(step))))
  }
  shapes.push(text('chart-title', frame.titleXPx, topPx - 31, 'start', charted.title))
  shapes.push(text('tick', frame.titleXPx, topPx - 12, 'start', charted.yTitle))
  shapes.push(text('tick', endPx, bottomPx + 43, 'end', charted.xTitle))
  return shapes
}

/** Where the words of the zone stand, up the page. */
function zoneWords(fromPx: number, words: string, frame: LineFrame): { readonly xPx: number, readonly yPx: number, readonly box: Box } {
  const lengthPx = textWidthPx(words)
  // Low, where the line has risen past
  const [xPx, yPx] = [fromPx + (lineX(frame, frame.mostX) - fromPx) / 2 + 4.5, frame.topPx + frame.heightPx - lengthPx / 2 - 4]
  return { xPx, yPx, box: { xPx: xPx - 12, yPx: yPx - lengthPx / 2, widthPx: 16, heightPx: lengthPx } }
}

function limitZone({ limitX, limitWords }: LineCharted, frame: LineFrame): Shape[] {
  if (limitX === null || limitX >= frame.mostX) return []
  const fromPx = lineX(frame, limitX)
  const widthPx = lineX(frame, frame.mostX) - fromPx
  const shapes: Shape[] = [hatchBox({ xPx: fromPx, yPx: frame.topPx, widthPx, heightPx: frame.heightPx }), lineV('solid-edge', fromPx, frame.topPx, frame.topPx + frame.heightPx)]
  const { xPx, yPx } = zoneWords(fromPx, limitWords, frame)
  if (widthPx > 20) shapes.push(text('tick halo', xPx, yPx, 'middle', limitWords, true))
  return shapes
}

/** A working point: its tolerance as a bar, its circle, and its name where it lies on nothing else. */
function workingPoints({ points, letter, from, to, limitX, limitWords }: LineCharted, frame: LineFrame): Shape[] {
  const shapes: Shape[] = []
  const shown = points.map((point, i) => ({ ...point, i, xPx: lineX(frame, point.x), yPx: lineY(frame, point.y) })).filter(({ x }) => x >= from.x - 1e-9 && x <= frame.mostX)
  const taken: Box[] = shown.map(({ xPx, yPx, y, tolerance }) => {
    const halfPx = Math.max(8, yPx - lineY(frame, y + (tolerance ?? 0)))
    return { xPx: xPx - 8, yPx: yPx - halfPx, widthPx: 16, heightPx: 2 * halfPx }
  })
  if (limitX !== null && limitX < frame.mostX) taken.push(zoneWords(lineX(frame, limitX), limitWords, frame).box)
  const [bottomPx, endPx] = [frame.topPx + frame.heightPx, lineX(frame, frame.mostX)]
  const against = (box: Box): number => {
    const isBeside = box.xPx < frame.x0Px + 2 || box.xPx + box.widthPx > endPx + 14
    const isOff = box.yPx < frame.topPx - 4 || box.yPx + box.heightPx > bottomPx - 1
    const isOnLine = lineMeetsBox(lineX(frame, from.x), lineY(frame, from.y), lineX(frame, to.x), lineY(frame, to.y), box)
    const isInZone = limitX !== null && box.xPx + box.widthPx > lineX(frame, limitX)
    return (isBeside ? 20 : 0) + (isOff ? 8 : 0) + 6 * taken.filter(other => boxesMeet(box, other)).length + (isOnLine ? 3 : 0) + (isInZone ? 1 : 0)
  }
  for (const { y, tolerance, label, i, xPx, yPx } of shown) {
    if (tolerance) {
      const upperPx = lineY(frame, y + tolerance)
      const lowerPx = lineY(frame, Math.max(0, y - tolerance))
      shapes.push(path('tolerance', `M${px(xPx)} ${px(upperPx)}V${px(lowerPx)}M${px(xPx - 5)} ${px(lowerPx)}h10M${px(xPx - 5)} ${px(upperPx)}h10`))
    }
    shapes.push({ kind: 'circle', look: 'wanted', xPx, yPx, radiusPx: 5 })
    const lettering = symbol(letter, String(i + 1), label)
    const widthPx = textWidthPx(lettering)
    // The line rises to the right: above left and below right are free of it
    const left = (dy: number): LabelPlace => ({ xPx: xPx - 11, yPx: yPx + dy, anchor: 'end' })
    const right = (dy: number): LabelPlace => ({ xPx: xPx + 12, yPx: yPx + dy, anchor: 'start' })
    const place = bestPlace([left(-8), right(17), left(-24), right(32), left(5), right(13), right(-30), right(-48)], widthPx, against)
    taken.push(labelBox(place, widthPx))
    shapes.push(text('dim-text halo', place.xPx, place.yPx, place.anchor, lettering))
  }
  return shapes
}

/** The chart but for the point that moves. */
export function lineChartShapes(charted: LineCharted, frame: LineFrame): Shape[] {
  const { from, to } = charted
  return [
    ...axes(charted, frame), ...limitZone(charted, frame),
    path('load-line', `M${px(lineX(frame, from.x))} ${px(lineY(frame, from.y))}L${px(lineX(frame, to.x))} ${px(lineY(frame, to.y))}`),
    ...workingPoints(charted, frame),
  ]
}

/** The plumb lines of the point that moves; they lie under the lettering. */
export function plumbShapes(frame: LineFrame, x: number, y: number, plumbFromPx: number | null): Shape[] {
  const xPx = lineX(frame, x)
  const yPx = lineY(frame, y)
  return [
    plumbFromPx === null ? lineV('plumb', xPx, yPx, frame.topPx + frame.heightPx) : lineV('plumb', xPx, plumbFromPx, yPx),
    lineH('plumb', frame.x0Px, xPx, yPx),
  ]
}

/** The mark of the point that moves. */
export function nowShape(xPx: number, yPx: number): PathShape {
  return path('now', `M${px(xPx - 7)} ${px(yPx)}L${px(xPx)} ${px(yPx - 7)}L${px(xPx + 7)} ${px(yPx)}L${px(xPx)} ${px(yPx + 7)}Z`)
}

/** Room on the page that the zone over the limit takes at least, so that its words can be read. */
export const ZONE_PX = 28
