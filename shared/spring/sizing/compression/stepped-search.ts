import { totalCoilsFor } from '../../mechanics/compression/end-geometry'
import { passesStopChecks } from '../../mechanics/compression/checks'
import type { CompressionModel } from '../../mechanics/compression/model'
import { fillState, greatestForceN, stateMassG, type CompressionState } from '../../mechanics/compression/state'
import type { WireGoal, WireSpring } from '../kind-search'
import { greatestThatHolds, leastThatHolds } from '../numeric-search'
import { LEAST_INDEX, MOST_INDEX, isContinuous, stepped, type Steps } from '../steps'
import { CONSTANT_CHECKS, LEAST_DIAMETER_CHECKS, MOST_DIAMETER_CHECKS, feasibleDiameters, fillAtDiameter } from './fixed-travel'
import { boreCheck } from '../../mechanics/compression/checks/fit'
import { LEAST_ACTIVE_COILS, allHold } from './search-state'
import { freeLengthForRateMm, rateTolerance, withRate, type FixedTravel } from './travel'

/** `any`: the first that passes, whichever it is. */
export type SteppedGoal = WireGoal | 'any'

const EDGE = 1e-9

/**
 * Springs of the wire whose coils and diameter are whole steps and that pass every stop check: all of them, or the best for
 * the goal. With one of the two in steps the other makes the rate exact. With both, every pair is looked at whose rate is
 * within the tolerance of the steps (see `rateTolerance`), so the best is the best.
 */
export function searchStepped(model: CompressionModel, state: CompressionState, travel: FixedTravel, goal: SteppedGoal, steps: Steps): WireSpring[] {
  const { coilStep, diameterStepMm } = steps
  const d = model.wireDiameterMm
  const stiffness = (model.shearModulusMpa * d * d * d * d) / 8
  const every: WireSpring[] = []
  let best: WireSpring | null = null
  let least = Infinity
  // True where the search may end.
  const take = (D: number, n: number): boolean => {
    const rate = stiffness / (D * D * D * n)
    fillState(state, model, D, n, totalCoilsFor(model.ends, n), freeLengthForRateMm(travel, rate))
    const value = goal === 'mass' ? stateMassG(model, state) : goal === 'stress' ? loadedForceN(travel, state) * D : 0
    if ((goal === 'mass' || goal === 'stress') && !(value < least)) return false
    if (!passesStopChecks(model, state)) return false
    const spring = { meanDiameterMm: D, activeCoils: n, totalCoils: state.totalCoils, freeLengthMm: state.freeLengthMm }
    if (goal === 'every') every.push(spring)
    else best = spring
    least = value
    return goal === 'any'
  }
  forEachSpring(model, state, travel, steps, take, { stiffness, coilStep, diameterStepMm })
  return best ? [best] : every
}

/** True where some stepped spring of the wire passes every stop check. */
export function hasSteppedSpring(model: CompressionModel, state: CompressionState, travel: FixedTravel, steps: Steps): boolean {
  return searchStepped(model, state, travel, 'any', steps).length > 0
}

/** The load a spring is judged by: the greatest asked, or when solid where none is. */
const loadedForceN = (travel: FixedTravel, state: CompressionState) => (travel.points.length > 0 ? greatestForceN(state) : state.solidForceN)

interface Grid extends Steps {
  readonly stiffness: number
}

function forEachSpring(
  model: CompressionModel, state: CompressionState, travel: FixedTravel, steps: Steps, take: (D: number, n: number) => boolean, { stiffness, coilStep, diameterStepMm }: Grid,
): void {
  const bothStepped = !Number.isNaN(coilStep) && !Number.isNaN(diameterStepMm)
  if (isContinuous(steps)) return
  if (bothStepped) {
    const tolerance = rateTolerance(travel)
    const range = steppedDiameters(model, state, travel, tolerance)
    if (!range) return
    for (let i = Math.ceil(range.low / diameterStepMm - EDGE); i <= range.high / diameterStepMm + EDGE; i++) {
      const D = stepped(i, diameterStepMm)
      const exact = stiffness / (D * D * D * travel.rateNPerMm)
      const most = exact / (1 - tolerance) / coilStep + EDGE
      for (let j = Math.ceil(Math.max(LEAST_ACTIVE_COILS, exact / (1 + tolerance)) / coilStep - EDGE); j <= most; j++) {
        if (take(D, stepped(j, coilStep))) return
      }
    }
    return
  }
  for (const { lowMm, highMm } of feasibleDiameters(model, state, travel)) {
    if (Number.isNaN(diameterStepMm)) {
      const most = stiffness / (lowMm * lowMm * lowMm * travel.rateNPerMm) / coilStep + EDGE
      for (let j = Math.ceil(stiffness / (highMm * highMm * highMm * travel.rateNPerMm) / coilStep - EDGE); j <= most; j++) {
        const n = stepped(j, coilStep)
        if (take(Math.cbrt(stiffness / (n * travel.rateNPerMm)), n)) return
      }
    } else {
      for (let i = Math.ceil(lowMm / diameterStepMm - EDGE); i <= highMm / diameterStepMm + EDGE; i++) {
        const D = stepped(i, diameterStepMm)
        if (take(D, stiffness / (D * D * D * travel.rateNPerMm))) return
      }
    }
  }
}

const LARGE_FAILS = MOST_DIAMETER_CHECKS.filter(check => check !== boreCheck)

/**
 * Mean diameters outside which no stepped spring passes. At a diameter the springs differ in coils, n_exact/(1 + t) to
 * n_exact/(1 - t). With more coils the rate falls and the free length does not, F1 (1 - e) rises and F2 (1 + e) falls; so order,
 * gaps, lengths and buckling are easiest with the fewest coils (the stiffest rate, its free length), while coils, both
 * stresses (when solid F2 + R (L2 - Lc), each part falls) and the life are easiest with the most. Each of these two travels is
 * a fixed one, for which the claims of fixed-travel.ts hold. Of bore and rod only the bare wire is asked here.
 */
function steppedDiameters(model: CompressionModel, state: CompressionState, travel: FixedTravel, tolerance: number): { low: number, high: number } | null {
  const d = model.wireDiameterMm
  const stiffest = withRate(travel, travel.rateNPerMm * (1 + tolerance))
  const softest = withRate(travel, travel.rateNPerMm * (1 - tolerance))
  const from = Math.max(LEAST_INDEX * d, Number.isNaN(model.rodMm) ? 0 : model.rodMm + d)
  const to = Math.min(MOST_INDEX * d, Number.isNaN(model.boreMm) ? Infinity : model.boreMm - d)
  if (!(from <= to)) return null
  if (!allHold(CONSTANT_CHECKS, model, fillAtDiameter(model, state, stiffest, from))) return null
  const isSmallEnough = (D: number) => allHold(LARGE_FAILS, model, fillAtDiameter(model, state, softest, D))
  if (!isSmallEnough(from)) return null
  const low = leastThatHolds(D => allHold(LEAST_DIAMETER_CHECKS, model, fillAtDiameter(model, state, stiffest, D)), from, to)
  if (Number.isNaN(low)) return null
  const high = greatestThatHolds(isSmallEnough, low, to)
  return Number.isNaN(high) ? null : { low: low * (1 - EDGE), high: high * (1 + EDGE) }
}
