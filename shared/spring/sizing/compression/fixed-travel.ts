import { COMPRESSION_CHECKS } from '../../mechanics/compression/checks'
import type { CompressionCheck } from '../../mechanics/compression/checks/check'
import { boreCheck, freeLengthCheck, leastInnerDiameterMm, rodCheck, solidLengthCheck } from '../../mechanics/compression/checks/fit'
import { temperatureCheck } from '../../mechanics/checks/place'
import { wireRangeCheck } from '../../mechanics/checks/wire'
import { fatigueCheck } from '../../mechanics/compression/checks/life'
import { coilsCheck } from '../../mechanics/compression/checks/proportion'
import { bucklingCheck } from '../../mechanics/compression/checks/stability'
import { stressSolidCheck, stressWorkingCheck } from '../../mechanics/compression/checks/stress'
import { clearanceCheck, orderCheck } from '../../mechanics/compression/checks/travel'
import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, type CompressionState } from '../../mechanics/compression/state'
import { INDEX_STEPS, MEAN_DIAMETER_STEPS_MM, MOST_MEAN_DIAMETER_MM } from '../../mechanics/tolerances/mean-diameter'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX } from '../steps'
import { LEAST_ACTIVE_COILS, allHold } from './search-state'
import type { FixedTravel } from './travel'

/*
 * With rate R and free length L0 fixed, the mean diameter D is the only unknown: n = c/D^3 with c = G d^4/(8 R). Every stop
 * check is then constant in D, or fails only below some D, or only above it:
 *
 * - Constant: wire, heat, free length.
 * - Failing below: solid length (n + e + x) d falls with D, and so do the least gaps n (0.0015 D^2/d + 0.1 d), each part a
 *   falling power of D: order, clearance, solid length. Buckling: the deflection is fixed and the critical one rises with D.
 * - Failing above: coils fall. Forces at the lengths are fixed, and a stress at a fixed force goes as k w, where k w rises
 *   for w >= 4 with every factor: 1, w + 0.5 (direct shear), w (w + 0.5)/(w - 0.75) and w (4w - 1)/(4w - 4) + 0.615 (their
 *   derivatives have no zero above 1.9). So the working stress rises; the life falls, since amplitude and mean go with
 *   k w; the force when solid R (L0 - Lc) rises besides. Outside: D rises, and so does the growth 0.1 (m^2 - 0.8 m d -
 *   0.2 d^2)/D with m = (L0 - x d) D^3/c, its slope being 0.1 (5 m^2 - 1.6 m d + 0.2 d^2)/D^2, which has no zero; the
 *   tolerance steps up with D and w, until it ends at 200 mm: there the range is cut in two.
 * - The rod alone has gaps: the least inside D - d - tolerance falls at each step of the tolerance.
 *
 * tests/unit/spring/compression-monotone.test.ts tries each claim on random springs.
 */

/** Checks that D does not move. */
export const CONSTANT_CHECKS: readonly CompressionCheck[] = [wireRangeCheck, freeLengthCheck, temperatureCheck]
/** Checks that a small D fails. */
export const LEAST_DIAMETER_CHECKS: readonly CompressionCheck[] = [orderCheck, clearanceCheck, solidLengthCheck, bucklingCheck]
/** Checks that a large D fails. */
export const MOST_DIAMETER_CHECKS: readonly CompressionCheck[] = [coilsCheck, stressWorkingCheck, stressSolidCheck, fatigueCheck, boreCheck]

export interface DiameterInterval {
  readonly lowMm: number
  readonly highMm: number
}

/** Fills the state with the spring of mean diameter D that has the asked rate and free length. */
export function fillAtDiameter(model: CompressionModel, state: CompressionState, travel: FixedTravel, meanDiameterMm: number): CompressionState {
  const d = model.wireDiameterMm
  const n = (model.shearModulusMpa * d * d * d * d) / (8 * meanDiameterMm * meanDiameterMm * meanDiameterMm * travel.rateNPerMm)
  return fillState(state, model, meanDiameterMm, n, totalCoilsFor(model.ends, n), travel.freeLengthMm)
}

// Index, and the fewest coils: fewer than two are left only where D is larger.
function mostDiameter(model: CompressionModel, travel: FixedTravel): number {
  const d = model.wireDiameterMm
  return Math.min(MOST_INDEX * d, Math.cbrt((model.shearModulusMpa * d * d * d * d) / (8 * LEAST_ACTIVE_COILS * travel.rateNPerMm)))
}

const leastHold = (model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number) =>
  allHold(LEAST_DIAMETER_CHECKS, model, fillAtDiameter(model, state, travel, D))
const mostHold = (model: CompressionModel, state: CompressionState, travel: FixedTravel, D: number) =>
  allHold(MOST_DIAMETER_CHECKS, model, fillAtDiameter(model, state, travel, D))

/** Mean diameters at which the wire gives a spring that passes every stop check; empty where there is none. */
export function feasibleDiameters(model: CompressionModel, state: CompressionState, travel: FixedTravel): DiameterInterval[] {
  const low = LEAST_INDEX * model.wireDiameterMm
  const high = mostDiameter(model, travel)
  if (!(low <= high)) return []
  if (!allHold(CONSTANT_CHECKS, model, fillAtDiameter(model, state, travel, low))) return []
  const cut = MOST_MEAN_DIAMETER_MM
  if (Number.isNaN(model.boreMm) || !(low < cut && cut < high)) return intervalsBetween(model, state, travel, low, high)
  return [...intervalsBetween(model, state, travel, low, cut), ...intervalsBetween(model, state, travel, cut * (1 + 1e-12), high)]
}

function intervalsBetween(model: CompressionModel, state: CompressionState, travel: FixedTravel, from: number, to: number): DiameterInterval[] {
  if (!mostHold(model, state, travel, from)) return []
  // Checks that fail the same way fail together, so one bisection serves each side.
  const low = leastThatHolds(D => leastHold(model, state, travel, D), from, to)
  if (Number.isNaN(low)) return []
  const high = greatestThatHolds(D => mostHold(model, state, travel, D), low, to)
  if (Number.isNaN(high)) return []
  return Number.isNaN(model.rodMm) ? [{ lowMm: low, highMm: high }] : intervalsOverRod(model, state, travel, low, high)
}

// Between two steps of the tolerance table the tolerance is constant, so the rod asks for one least diameter there.
function intervalsOverRod(model: CompressionModel, state: CompressionState, travel: FixedTravel, low: number, high: number): DiameterInterval[] {
  const steps = [...MEAN_DIAMETER_STEPS_MM, ...INDEX_STEPS.map(w => w * model.wireDiameterMm)]
    .filter(D => D > low && D < high)
    .sort((a, b) => a - b)
  const intervals: DiameterInterval[] = []
  let from = low
  for (const to of [...steps, high]) {
    fillAtDiameter(model, state, travel, (from + to) / 2)
    const shrink = state.meanDiameterMm - leastInnerDiameterMm(model, state)
    const least = Math.max(from, model.rodMm + shrink)
    if (least <= to) {
      const last = intervals[intervals.length - 1]
      if (last && last.highMm === least) intervals[intervals.length - 1] = { lowMm: last.lowMm, highMm: to }
      else intervals.push({ lowMm: least, highMm: to })
    }
    from = to
  }
  return intervals.filter(({ highMm }) => !rodCheck.stops(model, fillAtDiameter(model, state, travel, highMm)))
}

const BISECTIONS = 48

/** True where `feasibleDiameters` finds some, without finding their ends: it stops at the first diameter that passes. */
export function hasFeasibleDiameter(model: CompressionModel, state: CompressionState, travel: FixedTravel): boolean {
  if (!Number.isNaN(model.rodMm) || (!Number.isNaN(model.boreMm) && model.boreMm > MOST_MEAN_DIAMETER_MM)) {
    return feasibleDiameters(model, state, travel).length > 0
  }
  let low = LEAST_INDEX * model.wireDiameterMm
  let high = mostDiameter(model, travel)
  if (!(low <= high)) return false
  fillAtDiameter(model, state, travel, low)
  if (!allHold(CONSTANT_CHECKS, model, state) || !allHold(MOST_DIAMETER_CHECKS, model, state)) return false
  if (allHold(LEAST_DIAMETER_CHECKS, model, state)) return true
  fillAtDiameter(model, state, travel, high)
  if (!allHold(LEAST_DIAMETER_CHECKS, model, state)) return false
  if (allHold(MOST_DIAMETER_CHECKS, model, state)) return true
  for (let i = 0; i < BISECTIONS && high - low > 1e-10 * high; i++) {
    const D = (low + high) / 2
    fillAtDiameter(model, state, travel, D)
    const isLargeEnough = allHold(LEAST_DIAMETER_CHECKS, model, state)
    const isSmallEnough = allHold(MOST_DIAMETER_CHECKS, model, state)
    if (isLargeEnough === isSmallEnough) return isLargeEnough
    if (isLargeEnough) high = D
    else low = D
  }
  return false
}

/** Checks that can stop a spring and have no place in the search above; empty, or the search would be wrong. */
export function uncoveredChecks(): string[] {
  const covered = new Set([...CONSTANT_CHECKS, ...LEAST_DIAMETER_CHECKS, ...MOST_DIAMETER_CHECKS, rodCheck].map(c => c.code))
  covered.add('index')
  const neverStop = new Set(['resonance', 'impact', 'peening', 'tangling', 'surroundings', 'method'])
  return COMPRESSION_CHECKS.map(c => c.code).filter(code => !covered.has(code) && !neverStop.has(code))
}
