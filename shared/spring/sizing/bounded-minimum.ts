/**
 * A function to minimise over a box, known by bounds. `bound` is never above the value of any feasible point of the box
 * between `low` and `high`, and Infinity where the box is known to hold none; `value` is the function at a point, Infinity
 * where the point is not feasible. Neither may keep the arrays it is given.
 */
export interface BoundedProblem {
  readonly low: readonly number[]
  readonly high: readonly number[]
  readonly bound: (low: Float64Array, high: Float64Array) => number
  readonly value: (point: Float64Array) => number
}

export interface BoundedMinimum {
  /** The best point found; null where none is better than the incumbent, or none is feasible. */
  readonly point: readonly number[] | null
  readonly value: number
  /** Boxes that were looked at. */
  readonly boxes: number
}

export interface BoundedOptions {
  /** The answer is within this share of the true minimum. */
  readonly relativeGap?: number | undefined
  /** Only a value below this is of interest. */
  readonly incumbent?: number | undefined
  /** A box whose sides are all shorter than this share of their place counts as a point. */
  readonly leastWidth?: number | undefined
  /** True where any feasible point will do: the search ends at the first. */
  readonly anyPoint?: boolean | undefined
}

const RELATIVE_GAP = 2e-4
const LEAST_WIDTH = 1e-9
const FIRST_ROOM = 64

/**
 * The least value over the box, proven to within the gap: every box left out has a bound above the best value less the gap,
 * or is narrower than `leastWidth` (branch and bound, best half first). Deterministic.
 */
export function minimiseBounded(problem: BoundedProblem, options: BoundedOptions = {}): BoundedMinimum {
  const { relativeGap = RELATIVE_GAP, incumbent = Infinity, leastWidth = LEAST_WIDTH, anyPoint = false } = options
  const n = problem.low.length
  const stride = 2 * n
  let stack = new Float64Array(FIRST_ROOM * stride)
  let bounds = new Float64Array(FIRST_ROOM)
  let depth = 0
  const low = new Float64Array(n)
  const high = new Float64Array(n)
  const point = new Float64Array(n)
  let best = incumbent
  let bestPoint: Float64Array | null = null
  let boxes = 0

  const take = (): void => {
    const value = problem.value(point)
    if (value < best) {
      best = value
      bestPoint = Float64Array.from(point)
    }
  }
  const push = (bound: number): void => {
    if (!(bound < best - relativeGap * Math.abs(best)) && best < Infinity) return
    if (bound === Infinity) return
    if (depth === bounds.length) {
      const more = new Float64Array(stack.length * 2)
      more.set(stack)
      stack = more
      const moreBounds = new Float64Array(bounds.length * 2)
      moreBounds.set(bounds)
      bounds = moreBounds
    }
    stack.set(low, depth * stride)
    stack.set(high, depth * stride + n)
    bounds[depth++] = bound
  }

  for (let i = 0; i < n; i++) {
    low[i] = problem.low[i] ?? 0
    high[i] = problem.high[i] ?? 0
    if (!((low[i] as number) <= (high[i] as number))) return { point: null, value: Infinity, boxes }
  }
  point.set(low)
  take()
  point.set(high)
  take()
  push(problem.bound(low, high))

  while (depth > 0 && !(anyPoint && bestPoint !== null)) {
    depth--
    if (!((bounds[depth] as number) < best - relativeGap * Math.abs(best)) && best < Infinity) continue
    boxes++
    for (let i = 0; i < n; i++) {
      low[i] = stack[depth * stride + i] as number
      high[i] = stack[depth * stride + n + i] as number
      point[i] = ((low[i] as number) + (high[i] as number)) / 2
    }
    take()
    let side = 0
    let widest = -1
    for (let i = 0; i < n; i++) {
      const width = ((high[i] as number) - (low[i] as number)) / (Math.abs(point[i] as number) || 1)
      if (width > widest) {
        widest = width
        side = i
      }
    }
    if (widest <= leastWidth) continue
    const from = low[side] as number
    const to = high[side] as number
    const middle = (from + to) / 2
    high[side] = middle
    const lower = problem.bound(low, high)
    low[side] = middle
    high[side] = to
    const upper = problem.bound(low, high)
    // The half with the lower bound is looked at first, so it goes on the stack last.
    if (lower <= upper) {
      push(upper)
      low[side] = from
      high[side] = middle
      push(lower)
    } else {
      low[side] = from
      high[side] = middle
      push(lower)
      low[side] = middle
      high[side] = to
      push(upper)
    }
  }
  return { point: bestPoint === null ? null : Array.from<number>(bestPoint), value: bestPoint === null ? Infinity : best, boxes }
}
