import type { Box, TextShape } from './shapes'

/** A place where lettering may stand. */
export interface LabelPlace {
  readonly xPx: number
  readonly yPx: number
  readonly anchor: TextShape['anchor']
}

// Of 14 px lettering about its base line
const ABOVE_PX = 12
const BELOW_PX = 5

/** The box that lettering of a width takes at a place. */
export function labelBox({ xPx, yPx, anchor }: LabelPlace, widthPx: number): Box {
  const left = anchor === 'start' ? xPx : anchor === 'end' ? xPx - widthPx : xPx - widthPx / 2
  return { xPx: left, yPx: yPx - ABOVE_PX, widthPx, heightPx: ABOVE_PX + BELOW_PX }
}

export const boxesMeet = (a: Box, b: Box): boolean =>
  a.xPx < b.xPx + b.widthPx && b.xPx < a.xPx + a.widthPx && a.yPx < b.yPx + b.heightPx && b.yPx < a.yPx + a.heightPx

/** True where a straight line from (x1, y1) to (x2, y2) passes through a box. */
export function lineMeetsBox(x1: number, y1: number, x2: number, y2: number, { xPx, yPx, widthPx, heightPx }: Box): boolean {
  let [from, to] = [0, 1]
  for (const [start, step, low, high] of [[x1, x2 - x1, xPx, xPx + widthPx], [y1, y2 - y1, yPx, yPx + heightPx]] as const) {
    if (step === 0) {
      if (start < low || start > high) return false
      continue
    }
    const [a, b] = [(low - start) / step, (high - start) / step]
    from = Math.max(from, Math.min(a, b))
    to = Math.min(to, Math.max(a, b))
  }
  return from <= to
}

/** The first of the places with the least against it; `cost` weighs what a box would lie upon. */
export function bestPlace<Place extends LabelPlace>(places: readonly [Place, ...Place[]], widthPx: number, cost: (box: Box) => number): Place {
  let best = places[0]
  let least = Infinity
  for (const place of places) {
    const against = cost(labelBox(place, widthPx))
    if (against < least) [best, least] = [place, against]
  }
  return best
}
