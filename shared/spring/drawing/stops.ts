import { niceStep } from './scale'

const FINE_STOPS = 350
/** With reduced motion the spring steps visibly instead of gliding. */
const COARSE_STOPS = 20

/** Places a slider stops at from `low` to `high`, at round numbers of a unit of `unitSize`, measured from `low`. */
export function sliderStops(low: number, high: number, unitSize: number, isCoarse: boolean): { last: number, at: (index: number) => number, indexOf: (at: number) => number } {
  const step = niceStep((high - low) / unitSize / (isCoarse ? COARSE_STOPS : FINE_STOPS)) * unitSize
  const last = Math.max(1, Math.ceil((high - low) / step - 1e-9))
  return {
    last,
    at: index => Math.min(high, Math.max(low, low + index * step)),
    indexOf: at => Math.min(last, Math.max(0, Math.round((at - low) / step))),
  }
}
