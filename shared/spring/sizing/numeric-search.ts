const BISECTIONS = 48
// Far inside the slack of the checks' own data; the answer is always on the side that holds.
const RELATIVE_WIDTH = 1e-10

/**
 * The least x in [low, high] that holds, for a condition that fails below and holds above; NaN where it holds nowhere.
 * The answer itself always holds.
 */
export function leastThatHolds(holds: (x: number) => boolean, low: number, high: number): number {
  if (holds(low)) return low
  if (!holds(high)) return Number.NaN
  let failing = low
  let holding = high
  for (let i = 0; i < BISECTIONS && holding - failing > RELATIVE_WIDTH * holding; i++) {
    const middle = (failing + holding) / 2
    if (holds(middle)) holding = middle
    else failing = middle
  }
  return holding
}

/** The greatest x in [low, high] that holds, for a condition that holds below and fails above; NaN where it holds nowhere. */
export function greatestThatHolds(holds: (x: number) => boolean, low: number, high: number): number {
  if (holds(high)) return high
  if (!holds(low)) return Number.NaN
  let holding = low
  let failing = high
  for (let i = 0; i < BISECTIONS && failing - holding > RELATIVE_WIDTH * failing; i++) {
    const middle = (failing + holding) / 2
    if (holds(middle)) holding = middle
    else failing = middle
  }
  return holding
}

const GOLDEN = (Math.sqrt(5) - 1) / 2
const GOLDEN_STEPS = 40

/** Place of the least value of a function with one valley on [low, high], by golden section, ends included. */
export function placeOfLeast(value: (x: number) => number, low: number, high: number): number {
  let a = low
  let b = high
  let x1 = b - GOLDEN * (b - a)
  let x2 = a + GOLDEN * (b - a)
  let f1 = value(x1)
  let f2 = value(x2)
  for (let i = 0; i < GOLDEN_STEPS && b - a > 1e-7 * b; i++) {
    if (f1 <= f2) {
      b = x2
      x2 = x1
      f2 = f1
      x1 = b - GOLDEN * (b - a)
      f1 = value(x1)
    } else {
      a = x1
      x1 = x2
      f1 = f2
      x2 = a + GOLDEN * (b - a)
      f2 = value(x2)
    }
  }
  const middle = (a + b) / 2
  let best = middle
  let least = value(middle)
  for (const end of [low, high]) {
    const f = value(end)
    if (f <= least) {
      least = f
      best = end
    }
  }
  return best
}
